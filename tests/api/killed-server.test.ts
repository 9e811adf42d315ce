import type pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { connect, type Database } from '@/db/connect';
import { migrateDatabase } from '@/db/migrate';
import { ask } from '../helpers/api';
import { MIGRATIONS } from '../helpers/database';
import { killableCluster, killableServer, untilGone, type KillableCluster, type KillableServer } from '../helpers/killing';
import { ManySaves } from '../helpers/many-saves';
import { applicationDatabase, newPerson } from '../helpers/people';
import { setting } from '../helpers/settings';

const SAVES = 200;
const AT_ONCE = 4;

/** Four people with two studies each; every save names itself. */
async function newSaves(database: Database, base: string, secret: string): Promise<ManySaves> {
  const people = [];
  for (let i = 0; i < AT_ONCE; i += 1) people.push(await newPerson(database, 'composer', { base, secret }));
  return new ManySaves(people);
}

/** Lets everybody save until so many are acknowledged in all, then kills, with the others’ saves under way. */
async function saveUntil(saves: ManySaves, acknowledged: number, kill: () => Promise<void>): Promise<void> {
  let killed: Promise<void> | undefined;
  await saves.run(() => {
    if (saves.acknowledged >= acknowledged) killed ??= kill();
  });
  expect(killed).toBeDefined();
  await killed;
}

describe('a server that is killed while it saves', () => {
  const name = `killed-${crypto.randomUUID()}`;
  let database: Database;
  let pool: pg.Pool;
  let server: KillableServer;
  beforeAll(async () => {
    ({ database, pool } = applicationDatabase());
    const url = new URL(setting('TEST_APPLICATION_DATABASE_URL'));
    url.searchParams.set('application_name', name);
    server = await killableServer(url.href, setting('TEST_SECRET'));
  });
  afterAll(async () => {
    await server.end();
    await pool.end();
  });

  it(`has kept every one of ${SAVES} saves that it acknowledged, whole; those without an answer can be sent again, and are kept once`, async () => {
    const saves = await newSaves(database, server.url, setting('TEST_SECRET'));
    for (const acknowledged of [3, 40, 110, 170]) {
      await saveUntil(saves, acknowledged, server.kill);
      await untilGone(pool, name);
      const kept = await saves.check(pool);
      console.info(`killed after ${saves.acknowledged} acknowledged: ${saves.pending} without an answer, ${kept} of them kept`);
      expect(saves.pending).toBeGreaterThan(0);
      await server.start();
      await saves.resend();
      await saves.repeat();
      expect(await saves.check(pool)).toBe(0);
    }
    await saves.run(() => undefined);
    expect([saves.acknowledged, saves.pending, await saves.check(pool)]).toEqual([SAVES, 0, 0]);
  });
});

describe('a database that is killed while it saves', () => {
  const secret = crypto.randomUUID() + crypto.randomUUID();
  let cluster: KillableCluster;
  let server: KillableServer;
  let opened: { database: Database; pool: pg.Pool };
  beforeAll(async () => {
    cluster = await killableCluster();
    opened = connect(cluster.url, 4);
    await migrateDatabase(opened.database, MIGRATIONS);
    server = await killableServer(cluster.url, secret, true);
  });
  afterAll(async () => {
    await server?.end();
    await opened?.pool.end();
    await cluster?.end();
  });

  it(`has kept every one of ${SAVES} saves that it acknowledged, whole, and the server goes on with it`, async () => {
    const saves = await newSaves(opened.database, server.url, secret);
    for (const acknowledged of [3, 60, 130]) {
      await saveUntil(saves, acknowledged, cluster.kill);
      expect((await ask('/api/health', {}, server.url)).status).toBe(503);
      await cluster.start();
      const kept = await saves.check(opened.pool);
      console.info(`database killed after ${saves.acknowledged} acknowledged: ${saves.pending} without an answer, ${kept} of them kept`);
      await saves.resend();
      await saves.repeat();
      expect(await saves.check(opened.pool)).toBe(0);
    }
    await saves.run(() => undefined);
    expect([saves.acknowledged, saves.pending, await saves.check(opened.pool)]).toEqual([SAVES, 0, 0]);
    expect(saves.refused.length).toBeGreaterThan(0);
    expect(saves.refused.filter((status) => status !== 503)).toEqual([]);
  });
});
