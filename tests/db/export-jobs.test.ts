import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import {
  askForExport, ATTEMPTS, cancelExport, failExport, finishExport, getExportFile, getExportJob, renewExport, sweepExports, takeExport, type Asker,
} from '@/db/queries/export-jobs';
import { createStudy } from '@/db/queries/save-study';
import { deleteStudy } from '@/db/queries/own-studies';
import { users } from '@/db/schema';
import { createTestDatabase, type TestDatabase } from '../helpers/database';
import { smallStudy } from '../helpers/documents';

let db: TestDatabase;
let userId: string;
beforeAll(async () => {
  db = await createTestDatabase();
  const [user] = await db.database.insert(users).values({ name: 'Invented', email: 'owner@sesqui.example' }).returning({ id: users.id });
  userId = user!.id;
});
afterAll(() => db.drop());
beforeEach(() => db.pool.query('delete from export_jobs'));

const LIMITS = { own: 10, all: 20 };
const options = { what: 'score', as: 'pdf', page: { paper: 'a4', orientation: 'portrait', staff: 5.5 } } as const;
const guest = (name: string): Asker => ({ userId: null, tokenHash: name });
const NOBODY: Asker = { userId: null, tokenHash: null };
const file = { bytes: Buffer.from([0, 1, 255]), type: 'application/pdf', name: 'Weir.pdf' };

let asked = 0;
/** Asks for a print, a little later each time: moments are kept to the millisecond. */
async function order(key: string, asker = guest('a'), limits = LIMITS): Promise<string> {
  const answer = await askForExport(db.database, { for: asker, key, options, source: { document: smallStudy(key) } }, limits);
  if (answer.kind !== 'job') throw new Error(answer.whose);
  asked += 1;
  if (answer.isNew) await db.pool.query("update export_jobs set created_at = now() - interval '1 minute' + $2 * interval '1 millisecond' where id = $1", [answer.id, asked]);
  return answer.id;
}
const worker = () => crypto.randomUUID();
const rowOf = async (id: string) => (await db.pool.query('select * from export_jobs where id = $1', [id])).rows[0] as Record<string, unknown>;
/** As when whoever made it was killed so long ago. */
const loseLease = (id: string) => db.pool.query("update export_jobs set lease_until = now() - interval '1 second' where id = $1", [id]);

describe('prints that wait', () => {
  it('are taken in the order they were asked for, each by one worker', async () => {
    const ids = [await order('1'), await order('2'), await order('3'), await order('4')];
    const taken = await Promise.all([1, 2, 3, 4, 5].map(() => takeExport(db.database, worker())));
    expect(taken.map((job) => job?.id).filter((id) => id !== undefined).sort()).toEqual([...ids].sort());
    expect(await takeExport(db.database, worker())).toBeUndefined();
    await db.pool.query("update export_jobs set state = 'queued'");
    for (const [n, id] of ids.entries()) expect(await takeExport(db.database, worker())).toMatchObject({ id, study: smallStudy(String(n + 1)), version: null });
  });

  it('are taken in turn where several readers wait, so that nobody waits for all of another’s', async () => {
    const [a1, a2, a3] = [await order('1', guest('a')), await order('2', guest('a')), await order('3', guest('a'))];
    const [b1, b2] = [await order('1', guest('b')), await order('2', guest('b'))];
    const own = await askForExport(db.database, { for: { userId, tokenHash: null }, key: '1', options, source: { document: smallStudy() } }, LIMITS);
    const c1 = own.kind === 'job' ? own.id : '';
    const w = worker();
    const taken: string[] = [];
    for (let job = await takeExport(db.database, w); job; job = await takeExport(db.database, w)) {
      taken.push(job.id);
      await finishExport(db.database, { id: job.id, worker: w, file, pages: 1 });
    }
    expect(taken).toEqual([a1, b1, c1, a2, b2, a3]);
  });

  it('are the same where the same is asked for again by the same reader, however often at once', async () => {
    const all = await Promise.all(Array.from({ length: 6 }, () => order('same')));
    expect(new Set(all).size).toBe(1);
    expect(await order('same', guest('b'))).not.toBe(all[0]);
    expect(await order('other')).not.toBe(all[0]);
    const by = { id: (await takeExport(db.database, 'f0000000-0000-4000-8000-000000000000'))!.id, worker: 'f0000000-0000-4000-8000-000000000000' };
    expect(await order('same')).toBe(by.id);
    await finishExport(db.database, { ...by, file, pages: 2 });
    expect(await order('same')).toBe(by.id);
  });

  it('are asked for anew where they were cancelled or could not be made', async () => {
    const first = await order('again');
    expect(await cancelExport(db.database, { id: first, ...guest('a') })).toBe(true);
    const second = await order('again');
    expect(second).not.toBe(first);
    const w = worker();
    await takeExport(db.database, w);
    await failExport(db.database, { id: second, worker: w, code: 'unspellable', message: 'No.' });
    expect(await order('again')).not.toBe(second);
  });

  it('are so many at most, of one reader and in all', async () => {
    const few = { own: 2, all: 3 };
    await order('1', guest('a'), few);
    await order('2', guest('a'), few);
    await expect(order('3', guest('a'), few)).rejects.toThrow('own');
    expect(await order('2', guest('a'), few)).toBeDefined();
    await order('1', guest('b'), few);
    await expect(order('1', guest('c'), few)).rejects.toThrow('all');
  });

  it('are of the version that was asked for, and of none where the study was thrown away', async () => {
    const made = await createStudy(db.database, { userId, document: smallStudy('Kept') });
    if (made.kind !== 'saved') throw new Error(made.kind);
    const { id: studyId, version, updatedAt } = made.study;
    const own = { userId, tokenHash: null };
    await askForExport(db.database, { for: own, key: 'v', options, source: { studyId, version } }, LIMITS);
    expect(await takeExport(db.database, worker())).toMatchObject({ study: { title: 'Kept' }, version: 1, madeAt: updatedAt });
    await askForExport(db.database, { for: own, key: 'w', options, source: { studyId, version } }, LIMITS);
    await deleteStudy(db.database, { id: studyId, userId });
    expect((await takeExport(db.database, worker()))?.study).toBeUndefined();
  });
});

describe('a print that is being made', () => {
  it('stays its worker’s while it is renewed, and tells how far it is', async () => {
    const id = await order('1');
    const w = worker();
    await takeExport(db.database, w);
    expect(await renewExport(db.database, { id, worker: w, done: 3, total: 9 })).toBe(true);
    expect(await getExportJob(db.database, { id, ...guest('a') })).toMatchObject({ state: 'running', done: 3, total: 9 });
    expect(await takeExport(db.database, worker())).toBeUndefined();
  });

  it('is taken by another where its worker has gone, who can then neither renew nor finish it', async () => {
    const id = await order('1');
    const [gone, next] = [worker(), worker()];
    await takeExport(db.database, gone);
    await loseLease(id);
    expect((await takeExport(db.database, next))?.id).toBe(id);
    expect(await renewExport(db.database, { id, worker: gone, done: 1, total: 1 })).toBe(false);
    expect(await finishExport(db.database, { id, worker: gone, file, pages: 1 })).toBe(false);
    await failExport(db.database, { id, worker: gone, code: 'x', message: 'x' });
    expect(await getExportJob(db.database, { id, ...guest('a') })).toMatchObject({ state: 'running', done: 0 });
    expect(await finishExport(db.database, { id, worker: next, file, pages: 1 })).toBe(true);
  });

  it(`is begun ${ATTEMPTS} times at most, and then fails with a sentence`, async () => {
    const id = await order('1');
    for (let n = 0; n < ATTEMPTS; n += 1) {
      expect((await takeExport(db.database, worker()))?.id).toBe(id);
      await loseLease(id);
    }
    expect(await takeExport(db.database, worker())).toBeUndefined();
    await sweepExports(db.database);
    const job = await getExportJob(db.database, { id, ...guest('a') });
    expect(job).toMatchObject({ state: 'failed', errorCode: 'export_lost' });
    expect(job?.errorMessage).toMatch(/^This could not be made: it was begun three times/);
  });

  it('is given up where it is cancelled', async () => {
    const id = await order('1');
    const w = worker();
    await takeExport(db.database, w);
    expect(await cancelExport(db.database, { id, ...guest('b') })).toBe(false);
    expect(await cancelExport(db.database, { id, ...NOBODY })).toBe(false);
    expect(await cancelExport(db.database, { id, ...guest('a') })).toBe(true);
    expect(await renewExport(db.database, { id, worker: w, done: 1, total: 1 })).toBe(false);
    expect(await cancelExport(db.database, { id, ...guest('a') })).toBe(false);
    expect(await rowOf(id)).toMatchObject({ state: 'cancelled', document: null });
  });
});

describe('a print that is made', () => {
  async function made(asker: Asker, key = '1'): Promise<string> {
    const id = await order(key, asker);
    const w = worker();
    await takeExport(db.database, w);
    await finishExport(db.database, { id, worker: w, file, pages: 2 });
    return id;
  }

  it('keeps its file to the byte, and no longer the document', async () => {
    const id = await made(guest('a'));
    const kept = await getExportFile(db.database, { id, ...guest('a') });
    expect([kept?.resultName, Buffer.from(kept!.result!).equals(file.bytes)]).toEqual(['Weir.pdf', true]);
    expect(await rowOf(id)).toMatchObject({ state: 'done', document: null, done: 2, total: 2, lease_until: null });
  });

  it('is its reader’s alone, or anybody’s where it was asked for by nobody', async () => {
    const own: Asker = { userId, tokenHash: null };
    const readers = [NOBODY, guest('a'), guest('b'), own, { userId: crypto.randomUUID(), tokenHash: null }];
    const seenBy = async (id: string) => {
      const seen = await Promise.all(readers.map(async (reader) => [await getExportJob(db.database, { id, ...reader }), await getExportFile(db.database, { id, ...reader })]));
      return seen.map((both) => both.map((one) => one !== undefined).join());
    };
    const [yes, no] = ['true,true', 'false,false'];
    expect(await seenBy(await made(guest('a'), '1'))).toEqual([no, yes, no, no, no]);
    expect(await seenBy(await made(own, '2'))).toEqual([no, no, no, yes, no]);
    expect(await seenBy(await made(NOBODY, '3'))).toEqual([yes, yes, yes, yes, yes]);
  });

  it('goes after a day, and not before', async () => {
    const [old, young, waits] = [await made(guest('a'), '1'), await made(guest('a'), '2'), await order('3')];
    await db.pool.query("update export_jobs set ended_at = now() - interval '25 hours' where id = $1", [old]);
    await db.pool.query("update export_jobs set ended_at = now() - interval '23 hours' where id = $1", [young]);
    await sweepExports(db.database);
    expect((await db.pool.query<{ id: string }>('select id from export_jobs')).rows.map(({ id }) => id).sort()).toEqual([young, waits].sort());
  });
});
