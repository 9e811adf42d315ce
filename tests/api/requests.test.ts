import type pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Database } from '@/db/connect';
import { writeCursor } from '@/db/cursor';
import { OPEN_ROUTES } from '@/lib/schemas/open';
import { ACCESS } from '@/lib/server/access';
import { BODY_BYTES, RATES } from '@/lib/server/limits';
import { Reader, type Method } from '../helpers/api';
import { madePrint, ownStudy } from '../helpers/callers';
import { smallStudy } from '../helpers/documents';
import { create, refusalOf, studyOf } from '../helpers/own-study';
import { applicationDatabase, newPerson, type Person } from '../helpers/people';
import { setting } from '../helpers/settings';
import { rowsOf } from '../helpers/rows';

let database: Database;
let pool: pg.Pool;
beforeAll(() => void ({ database, pool } = applicationDatabase()));
afterAll(() => pool.end());

async function begun(): Promise<Person & { study: string; print: string }> {
  const person = await newPerson(database, 'administrator');
  return { ...person, study: (await ownStudy(database, person.id)).id, print: await madePrint(database, { ownerId: person.id }) };
}

/** A request that changes what it can, as it should be, for each route that changes anything. */
const CHANGES: readonly (readonly [Method, (of: { study: string; other: string; print: string }) => string, () => unknown])[] = [
  ['POST', () => '/api/register', () => ({ name: 'Heron', email: `${crypto.randomUUID()}@sesqui.example`, password: 'osier-lock-9-pond', role: 'student' })],
  ['PATCH', () => '/api/account', () => ({ name: 'Heron' })],
  ['POST', () => '/api/account/password', () => ({ current: 'osier-lock-9-pond', next: 'osier-lock-9-pool' })],
  ['POST', () => '/api/account/sign-out-everywhere', () => ({})],
  ['PATCH', ({ other }) => `/api/people/${other}`, () => ({ role: 'teacher' })],
  ['POST', () => '/api/studies', () => ({ document: smallStudy(), saveId: crypto.randomUUID() })],
  ['PUT', ({ study }) => `/api/studies/${study}`, () => ({ document: smallStudy(), baseVersion: 1, saveId: crypto.randomUUID() })],
  ['PATCH', ({ study }) => `/api/studies/${study}`, () => ({ title: 'Otter', baseVersion: 1 })],
  ['POST', ({ study }) => `/api/studies/${study}/copy`, () => ({})],
  ['DELETE', ({ study }) => `/api/studies/${study}`, () => ({})],
  ['POST', ({ study }) => `/api/studies/${study}/restore`, () => ({})],
  ['POST', () => '/api/exports', () => ({ what: 'score', document: smallStudy() })],
  ['DELETE', ({ print }) => `/api/exports/${print}`, () => ({})],
  // these change nothing, and are kept to the same rule
  ['POST', () => '/api/transform', () => OPEN_ROUTES.transform.example],
  ['POST', () => '/api/check', () => OPEN_ROUTES.check.example],
  ['POST', () => '/api/find', () => OPEN_ROUTES.find.example],
  ['POST', () => '/api/proportions/canon', () => OPEN_ROUTES.canon.example],
  ['POST', () => '/api/read-music', () => '<score-partwise/>'],
];

const form = 'application/x-www-form-urlencoded';
const FORGED: readonly (readonly [string, Record<string, string>, number, string])[] = [
  ['Sec-Fetch-Site: cross-site', { 'sec-fetch-site': 'cross-site' }, 403, 'forbidden'],
  ['Sec-Fetch-Site: same-site', { 'sec-fetch-site': 'same-site' }, 403, 'forbidden'],
  ['another Origin', { origin: 'https://elsewhere.example' }, 403, 'forbidden'],
  ['an Origin that hides itself', { origin: 'null' }, 403, 'forbidden'],
  ['an Origin of another port', { origin: 'http://127.0.0.1:1', 'sec-fetch-site': 'same-origin' }, 403, 'forbidden'],
  ['the kind of a form', { 'content-type': form }, 415, 'wrong_type'],
  ['the kind of a form with files', { 'content-type': 'multipart/form-data; boundary=x' }, 415, 'wrong_type'],
  ['plain text', { 'content-type': 'text/plain' }, 415, 'wrong_type'],
  ['no kind', { 'content-type': '' }, 415, 'wrong_type'],
];

describe('a request that another site could make a browser send', () => {
  it('is tried on every route that changes anything', () => {
    const pattern = (path: string) => path.replace(/(?<=studies\/)[^/]+|(?<=people\/)[^/]+|(?<=exports\/)[^/]+/, '[id]').replace(/(?<=proportions\/)[^/]+/, '[calculator]');
    const tried = CHANGES.map(([method, path]) => `${method} ${pattern(path({ study: 'x', other: 'x', print: 'x' }))}`);
    expect(tried.sort()).toEqual(Object.keys(ACCESS).filter((route) => !route.startsWith('GET')).sort());
  });

  it.each(FORGED)('%s is refused everywhere, and changes nothing', async (_, headers, status, code) => {
    const [person, other] = [await begun(), await begun()];
    const before = [await rowsOf(pool, person.id), await rowsOf(pool, other.id)];
    for (const [method, path, body] of CHANGES) {
      const answer = await person.reader.send(method, path({ study: person.study, other: other.id, print: person.print }), body(), headers);
      expect([path({ study: '', other: '', print: '' }), ...refusalOf(answer)]).toEqual([path({ study: '', other: '', print: '' }), status, code]);
    }
    expect([await rowsOf(pool, person.id), await rowsOf(pool, other.id)]).toEqual(before);
  });

  it('is let through with the address of the application itself', async () => {
    const { reader } = await begun();
    const headers = { origin: setting('TEST_BASE_URL'), 'sec-fetch-site': 'same-origin' };
    expect((await reader.send('PATCH', '/api/account', { name: 'Heron' }, headers)).status).toBe(200);
  });
});

describe('a body that is too large', () => {
  /** A new study in JSON of exactly so many bytes: spaces do not count as part of it. */
  const padded = (bytes: number) => {
    const text = JSON.stringify({ document: smallStudy('Otter'), saveId: crypto.randomUUID() });
    return text + ' '.repeat(bytes - text.length);
  };
  const stream = (text: string): RequestInit =>
    ({ method: 'POST', headers: { 'content-type': 'application/json' }, body: new Blob([text]).stream(), duplex: 'half' }) as RequestInit;
  const most = BODY_BYTES.document;

  it.each([['20 MB', 20_000_000], ['a byte more than 2 MB', most + 1]])('of %s is refused with its length told and without, and changes nothing', async (_, bytes) => {
    const { id, reader } = await begun();
    const before = await rowsOf(pool, id);
    expect(refusalOf(await reader.send('POST', '/api/studies', padded(bytes)))).toEqual([413, 'too_large']);
    expect(refusalOf(await reader.ask('/api/studies', stream(padded(bytes))))).toEqual([413, 'too_large']);
    expect(await rowsOf(pool, id)).toEqual(before);
  });

  it('is not one of exactly 2 MB', async () => {
    const { reader } = await begun();
    expect(studyOf(await reader.send('POST', '/api/studies', padded(most)), 201).version).toBe(1);
    expect(studyOf(await reader.ask('/api/studies', stream(padded(most))), 201).version).toBe(1);
  });

  it('is one of 20 MB in one text of a document', async () => {
    const { id, reader } = await begun();
    const before = await rowsOf(pool, id);
    expect(refusalOf(await create(reader, { ...smallStudy(), title: 'x'.repeat(20_000_000) }))).toEqual([413, 'too_large']);
    expect(await rowsOf(pool, id)).toEqual(before);
  });

  it('is one of more than 16 kB where no study is sent', async () => {
    const { id, reader, study } = await begun();
    const before = await rowsOf(pool, id);
    const long = 'x'.repeat(BODY_BYTES.small);
    for (const [method, path, body] of [['PATCH', '/api/account', { name: long }], ['PATCH', `/api/studies/${study}`, { title: long, baseVersion: 1 }]] as const) {
      expect([path, ...refusalOf(await reader.send(method, path, body))]).toEqual([path, 413, 'too_large']);
    }
    expect(await rowsOf(pool, id)).toEqual(before);
  });
});

describe('a place in a list that the server has not written', () => {
  const uuid = '00000000-0000-4000-8000-000000000000';
  const time = '2026-01-01T00:00:00.000Z';
  const nonsense: readonly (readonly [string, string])[] = [
    ['a letter', 'x'],
    ['a zero byte', '%00'],
    ['a path upwards', '..%2f'],
    ['a piece of SQL', "'%20or%20true--"],
    ['an object', 'e30'],
    ['null', 'bnVsbA'],
    ['an empty list', 'W10'],
    ['2,001 letters', 'x'.repeat(2_001)],
    ['a text that is no id', writeCursor([time, 'x'])],
    ['a value too many', writeCursor([1e308, uuid, uuid])],
    ['a month 13', writeCursor(['2026-13-01T00:00:00.000Z', uuid])],
    ['the 31st of February', writeCursor(['2026-02-31T00:00:00.000Z', uuid])],
    ['the year 0', writeCursor(['0000-01-01T00:00:00.000Z', uuid])],
    ['a moment and SQL', writeCursor([`${time}'; drop table studies; --`, uuid])],
    ['a zero character', writeCursor(['a\0b', uuid])],
  ];
  const lists = (study: string) => ['/api/studies?list=own&', '/api/studies?list=own&sort=length&', '/api/people?', `/api/studies/${study}/versions?`];

  it.each(nonsense)('%s is refused', async (_, cursor) => {
    const { reader, study } = await begun();
    for (const list of lists(study)) {
      const answer = await reader.ask(`${list}cursor=${cursor}`);
      expect([list, ...refusalOf(answer).slice(0, 2)]).toEqual([list, 422, 'invalid']);
    }
  });

  it.each([1.5, 1e300, '1'])('%s is no place among versions', async (version) => {
    const { reader, study } = await begun();
    const cursor = writeCursor([version]);
    expect(refusalOf(await reader.ask(`/api/studies/${study}/versions?cursor=${cursor}`)).slice(0, 2)).toEqual([422, 'invalid']);
  });
});

describe('too many requests', () => {
  const wait = 'This was tried too often. Wait a minute and try again; nothing is lost.';
  it.each([
    ['PUT', 'saves', RATES.save.most, (study: string) => `/api/studies/${study}`],
    ['POST', 'new studies', RATES.create.most, () => '/api/studies'],
    ['PATCH', 'other changes', RATES.change.most, (study: string) => `/api/studies/${study}`],
  ] as const)('%s: %s stop for one account, and not for another', async (method, _, most, path) => {
    const [person, other] = [await begun(), await begun()];
    for (let i = 0; i < most; i += 1) expect((await person.reader.send(method, path(person.study), {})).status).toBe(422);
    const before = await rowsOf(pool, person.id);
    const valid = method === 'PATCH' ? { title: 'Otter', baseVersion: 1 } : { document: smallStudy('Otter'), saveId: crypto.randomUUID(), ...(method === 'PUT' && { baseVersion: 1 }) };
    const refused = await person.reader.send(method, path(person.study), valid);
    expect([refused.status, refused.body]).toEqual([429, { error: { code: 'too_many', message: wait } }]);
    expect(await rowsOf(pool, person.id)).toEqual(before);
    expect((await other.reader.send(method, path(other.study), valid)).status).toBe(method === 'POST' ? 201 : 200);
  });

  it('changes of different kinds count together', async () => {
    const { reader, study } = await begun();
    for (let i = 0; i < RATES.change.most / 2; i += 1) {
      expect((await reader.send('PATCH', '/api/account', {})).status).toBe(422);
      expect((await reader.send('PATCH', `/api/studies/${study}`, {})).status).toBe(422);
    }
    expect((await reader.send('DELETE', `/api/studies/${study}`, {})).status).toBe(429);
    expect((await reader.ask(`/api/studies/${study}`)).status).toBe(200);
  });

  it('registering stops for one address after ten, and not for another', async () => {
    const reader = new Reader();
    for (let i = 0; i < RATES.register.most; i += 1) expect((await reader.send('POST', '/api/register', {})).status).toBe(422);
    expect(refusalOf(await reader.send('POST', '/api/register', {}))).toEqual([429, 'too_many']);
    expect((await new Reader().send('POST', '/api/register', {})).status).toBe(422);
  });
});
