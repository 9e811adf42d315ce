import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { listOwnStudies, ownStudiesQuery, type OwnStudiesParams, type StudySort } from '@/db/queries/own-studies';
import { users } from '@/db/schema';
import { createTestDatabase, type TestDatabase } from '../helpers/database';
import { smallStudy } from '../helpers/documents';

const MANY = 10_000;
const GONE = 500;
/** So many others, who have a tenth as many each: were the owner's studies most of the table, reading all of it would be right. */
const OTHERS = 40;
const SORTS: readonly StudySort[] = ['changed', 'title', 'length'];

/**
 * So many studies of somebody, in no order of any column, every tenth title of its own kind. Titles, moments and lengths come
 * several times over, so that the id decides between them.
 */
const INSERT = `
  insert into studies (owner_id, title, document, seconds, updated_at, deleted_at)
  select $1::uuid, case when i % 10 = 0 then 'Heron ' else 'Willow ' end || md5((i / 3)::text), $3::jsonb, (i * 7919 % 3001) / 2.0,
    timestamptz '2026-01-01' + (i * 6007 % 4001) * interval '1 minute', case when $4 then now() - i * interval '1 minute' end
  from generate_series(1, $2::int) as i`;

let db: TestDatabase;
let owner: string;
beforeAll(async () => {
  db = await createTestDatabase();
  const people = Array.from({ length: OTHERS + 1 }, (_, i) => ({ email: `${i}@sesqui.example` }));
  const document = JSON.stringify(smallStudy());
  for (const [i, { id }] of (await db.database.insert(users).values(people).returning({ id: users.id })).entries()) {
    if (i === 0) owner = id;
    const share = i === 0 ? 1 : 0.1;
    await db.pool.query(INSERT, [id, MANY * share, document, false]);
    await db.pool.query(INSERT, [id, GONE * share, document, true]);
  }
  await db.pool.query('analyze');
});
afterAll(() => db.drop());

const params = (changes: Partial<OwnStudiesParams>): OwnStudiesParams => ({ userId: owner, q: '', sort: 'changed', isDeleted: false, pageSize: 30, ...changes });

type Plan = { 'Node Type': string; 'Index Name'?: string; Plans?: Plan[] };
const nodesOf = (plan: Plan): Plan[] => [plan, ...(plan.Plans ?? []).flatMap(nodesOf)];

/** The nodes of the plan that the database makes of the statement itself. */
async function planOf(wanted: OwnStudiesParams): Promise<Plan[]> {
  const { sql, params: values } = ownStudiesQuery(db.database, wanted)!.toSQL();
  const { rows } = await db.pool.query<{ 'QUERY PLAN': [{ Plan: Plan }] }>(`explain (format json) ${sql}`, values);
  return nodesOf(rows[0]!['QUERY PLAN'][0].Plan);
}

const short = (nodes: Plan[]) => nodes.map((node) => node['Node Type'] + (node['Index Name'] ? ` ${node['Index Name']}` : '')).join(' < ');
const indexesOf = (nodes: Plan[]) => nodes.flatMap((node) => node['Index Name'] ?? []);

/** Where the second page begins. */
async function secondPage(wanted: OwnStudiesParams): Promise<string> {
  return (await listOwnStudies(db.database, wanted))!.nextCursor!;
}

describe.each(SORTS)(`a page of ${MANY} studies by %s`, (sort) => {
  it.each([['the first', false], ['the next', true]] as const)('%s is a stretch of the index of that order', async (name, isNext) => {
    const wanted = params({ sort });
    const nodes = await planOf({ ...wanted, ...(isNext && { cursor: await secondPage(wanted) }) });
    console.info(`by ${sort}, ${name}: ${short(nodes)}`);
    expect(nodes.map((node) => node['Node Type'])).toEqual(['Limit', 'Index Scan']);
    expect(indexesOf(nodes)).toEqual([`studies_own_${sort}`]);
  });

  // What was thrown away in thirty days is little, and may be sorted.
  it.each([['the first', false], ['the next', true]] as const)('%s of what was thrown away is read by an index', async (name, isNext) => {
    const wanted = params({ sort, isDeleted: true });
    const nodes = await planOf({ ...wanted, ...(isNext && { cursor: await secondPage(wanted) }) });
    console.info(`by ${sort}, ${name} thrown away: ${short(nodes)}`);
    expect(nodes.map((node) => node['Node Type'])).not.toContain('Seq Scan');
    for (const index of indexesOf(nodes)) expect(index).toMatch(/^studies_deleted/);
    expect(indexesOf(nodes).length).toBeGreaterThan(0);
  });

  it.each([
    ['every tenth title', 'heron', false],
    ['every tenth title, the next page', 'heron', true],
    ['a few titles', '1f0e3', false],
    ['one title', 'c4ca4238a0b923820dcc509a6f75849b', false],
    ['no title', 'no such title', false],
    ['two letters', 'he', false],
    ['signs that mean something in SQL', '%_\\', false],
  ] as const)('looked through for %s reads no whole table', async (name, q, isNext) => {
    const wanted = params({ sort, q });
    const nodes = await planOf({ ...wanted, ...(isNext && { cursor: await secondPage(wanted) }) });
    console.info(`by ${sort}, ${name}: ${short(nodes)}`);
    expect(nodes.map((node) => node['Node Type'])).not.toContain('Seq Scan');
    for (const index of indexesOf(nodes)) expect(index).toMatch(/^studies_(own_(changed|title|length)|title_trigrams)$/);
    expect(indexesOf(nodes).length).toBeGreaterThan(0);
  });
});

describe('a list of studies', () => {
  /** Every page of a list, and how many queries it took. */
  async function read(wanted: OwnStudiesParams) {
    const pages: { id: string; title: string; updatedAt: Date; seconds: number; lowerTitle: string }[][] = [];
    const counter = countingQueries();
    for (let cursor: string | undefined; pages.length === 0 || cursor !== undefined; ) {
      const page = await listOwnStudies(db.database, { ...wanted, ...(cursor !== undefined && { cursor }) });
      pages.push(page!.studies);
      cursor = page!.nextCursor ?? undefined;
    }
    return { pages, queries: counter.end() };
  }

  /** Counts what the pool is asked, until its end. */
  function countingQueries() {
    const asked = vi.spyOn(db.pool, 'query');
    const connected = vi.spyOn(db.pool, 'connect');
    return {
      end: () => {
        // A pool's own `query` takes a connection too, so both count the same; a transaction takes one without the other.
        const counts = [asked.mock.calls.length, connected.mock.calls.length];
        asked.mockRestore();
        connected.mockRestore();
        return Math.max(...counts);
      },
    };
  }

  const KEYS = {
    changed: (one: { updatedAt: Date }) => -one.updatedAt.getTime(),
    length: (one: { seconds: number }) => one.seconds,
    title: (one: { lowerTitle: string }) => one.lowerTitle,
  };

  it.each(SORTS)('by %s holds every study once, in order, with one query a page', async (sort) => {
    const { pages, queries } = await read(params({ sort, pageSize: 100 }));
    const all = pages.flat();
    expect([pages.length, queries]).toEqual([MANY / 100, MANY / 100]);
    expect([all.length, new Set(all.map(({ id }) => id)).size]).toEqual([MANY, MANY]);
    const keys = all.map((one) => [KEYS[sort](one), one.id] as const);
    const turn = sort === 'changed' ? -1 : 1;
    for (const [i, [key, id]] of keys.slice(1).entries()) {
      const [before, idBefore] = keys[i]!;
      expect(before < key || (before === key && (turn === 1 ? idBefore < id : idBefore > id))).toBe(true);
    }
  });

  it.each([1, 30, 1_000, MANY])('asks one query for a page of %i', async (pageSize) => {
    const counter = countingQueries();
    const page = await listOwnStudies(db.database, params({ pageSize }));
    expect([counter.end(), page!.studies.length]).toEqual([1, pageSize]);
  });

  it('looked through holds every study that fits once, whether pages end or not', async () => {
    for (const sort of SORTS) {
      const { pages, queries } = await read(params({ sort, q: 'HERON', pageSize: 30 }));
      const all = pages.flat();
      expect([all.length, new Set(all.map(({ id }) => id)).size, queries]).toEqual([MANY / 10, MANY / 10, pages.length]);
      expect(all.every(({ title }) => title.startsWith('Heron '))).toBe(true);
    }
  });

  it('of what was thrown away holds that only', async () => {
    const { pages } = await read(params({ isDeleted: true, sort: 'title' }));
    expect(pages.flat().length).toBe(GONE);
  });

  it('does not move on past what is changed while it is read: nothing comes twice', async () => {
    const wanted = params({ sort: 'title', pageSize: 30 });
    const first = (await listOwnStudies(db.database, wanted))!;
    await db.pool.query("update studies set title = '0 first' where id = $1", [first.studies[29]!.id]);
    const second = (await listOwnStudies(db.database, { ...wanted, cursor: first.nextCursor! }))!;
    const ids = [...first.studies, ...second.studies].map(({ id }) => id);
    expect(new Set(ids).size).toBe(60);
  });
});
