import { afterAll, beforeAll, expect, it } from 'vitest';
import { parseStudy, type Study } from '@/engine';
import { EXPORT_TOKEN, type ExportWire } from '@/lib/schemas/exports';
import { ask } from '../helpers/api';
import { createTestDatabase, type TestDatabase } from '../helpers/database';
import { smallStudy } from '../helpers/documents';
import { killableServer, type KillableServer } from '../helpers/killing';

let db: TestDatabase;
let server: KillableServer;
beforeAll(async () => {
  db = await createTestDatabase();
  server = await killableServer(db.url, crypto.randomUUID() + crypto.randomUUID());
});
afterAll(async () => {
  await server?.end();
  await db?.drop();
});

/** Long enough that a print takes some seconds. */
function longStudy(): Study {
  const instruments = Array.from({ length: 8 }, (_, n) => ({ id: `i${n}`, name: `Pot ${n + 1}`, family: 'found' as const }));
  const lines = instruments.map(({ id }) => ({ instrument: id, rhythm: '[1/8 1/8 1/16 1/16 1/8 1/4 (1/4)]x60' }));
  return parseStudy({ ...smallStudy('Long weir'), instruments, sections: [{ id: 'a', name: 'A', role: 'other', kind: 'free', lines }] });
}

async function untilState(id: string, token: string, wanted: (item: ExportWire['export']) => boolean): Promise<ExportWire['export']> {
  for (;;) {
    const { status, body } = await ask(`/api/exports/${id}`, { headers: { [EXPORT_TOKEN]: token } }, server.url);
    expect(status).toBe(200);
    const item = (body as ExportWire).export;
    if (wanted(item)) return item;
    await new Promise((go) => setTimeout(go, 50));
  }
}

const processesOf = async () => (await db.pool.query<{ state: string; attempts: number; worker: string | null }>('select state, attempts, worker from export_jobs')).rows;

it('a server that is killed in the middle of a print makes it when it is there again', async () => {
  const asked = await ask('/api/exports', { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify({ what: 'score', document: longStudy() }) }, server.url);
  expect([asked.status, asked.headers.get('location')]).toEqual([202, `/api/exports/${(asked.body as ExportWire).export.id}`]);
  const { export: item, token = '' } = asked.body as ExportWire;
  const begun = await untilState(item.id, token, ({ state, done }) => state !== 'queued' && (state !== 'running' || done > 0));
  expect(begun.state).toBe('running');
  const [before] = await processesOf();
  await server.kill();
  expect(await processesOf()).toEqual([{ state: 'running', attempts: 1, worker: before?.worker }]);

  await server.start();
  const made = await untilState(item.id, token, ({ state }) => state !== 'queued' && state !== 'running');
  expect(made).toMatchObject({ state: 'done', file: { name: 'Long weir.pdf', type: 'application/pdf' } });
  expect(await processesOf()).toEqual([{ state: 'done', attempts: 2, worker: null }]);
  const file = await ask(`/api/exports/${item.id}/file`, { headers: { [EXPORT_TOKEN]: token } }, server.url);
  expect([file.status, (file.body as string).startsWith('%PDF-1.7'), (file.body as string).trimEnd().endsWith('%%EOF')]).toEqual([200, true, true]);
});
