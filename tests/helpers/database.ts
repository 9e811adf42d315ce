import { randomBytes } from 'node:crypto';
import pg from 'pg';
import { connect, type Database } from '@/db/connect';
import { migrateDatabase } from '@/db/migrate';
import { setting } from './settings';

export const MIGRATIONS = 'db/migrations';

async function onServer(sql: string): Promise<void> {
  const client = new pg.Client({ connectionString: setting('TEST_DATABASE_URL') });
  await client.connect();
  await client.query(sql);
  await client.end();
}

export type TestDatabase = { database: Database; pool: pg.Pool; url: string; drop: () => Promise<void> };

/** A database of its own for one test file, empty. */
export async function createEmptyDatabase(): Promise<TestDatabase> {
  const name = `t_${randomBytes(6).toString('hex')}`;
  await onServer(`create database ${name}`);
  const url = Object.assign(new URL(setting('TEST_DATABASE_URL')), { pathname: `/${name}` }).href;
  const { database, pool } = connect(url, 4);
  const drop = async () => {
    await pool.end();
    await onServer(`drop database ${name} with (force)`);
  };
  return { database, pool, url, drop };
}

/** A database of its own for one test file, with the tables of this release. */
export async function createTestDatabase(): Promise<TestDatabase> {
  const made = await createEmptyDatabase();
  await migrateDatabase(made.database, MIGRATIONS);
  return made;
}
