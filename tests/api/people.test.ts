import { eq } from 'drizzle-orm';
import type pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Database } from '@/db/connect';
import { hashPassword } from '@/db/password';
import { users } from '@/db/schema';
import type { PeopleWire } from '@/lib/schemas/people';
import { PAGE_SIZE } from '@/lib/schemas/studies';
import { Reader } from '../helpers/api';
import { ownStudy } from '../helpers/callers';
import { refusalOf } from '../helpers/own-study';
import { applicationDatabase, newPerson, type Person } from '../helpers/people';
import { rowsOf } from '../helpers/rows';

let database: Database;
let pool: pg.Pool;
let administrator: Person;
beforeAll(async () => {
  ({ database, pool } = applicationDatabase());
  administrator = await newPerson(database, 'administrator');
});
afterAll(() => pool.end());

const list = async (query: string) => (await administrator.reader.ask(`/api/people?${query}`)).body as PeopleWire;
const change = (id: string, body: object) => administrator.reader.send('PATCH', `/api/people/${id}`, body);

describe('the list of people', () => {
  it('holds names, addresses, roles and dates, and nothing of anybody’s work', async () => {
    const person = await newPerson(database, 'composer', { passwordHash: 'a sealed password' });
    const study = await ownStudy(database, person.id, 'Willow and eel');
    const { people } = await list(`q=${person.email}`);
    expect(people).toEqual([{ id: person.id, name: expect.any(String), email: person.email, role: 'composer', createdAt: expect.any(String), disabledAt: null }]);
    const { body } = await change(person.id, { role: 'teacher' });
    expect(Object.keys((body as { person: object }).person)).toEqual(Object.keys(people[0]!));
    for (const text of [JSON.stringify(people), JSON.stringify(body)]) {
      for (const word of [study.id, study.title, 'a sealed password', 'document']) expect(text).not.toContain(word);
    }
  });

  it('is looked through by name and address in either case, taking every character as it is', async () => {
    const word = crypto.randomUUID();
    const [a, b] = [await newPerson(database, 'student'), await newPerson(database, 'student')];
    await database.update(users).set({ name: `100%_${word.toUpperCase()}` }).where(eq(users.id, a.id));
    await database.update(users).set({ name: `1000_${word}` }).where(eq(users.id, b.id));
    const found = async (q: string) => (await list(`q=${encodeURIComponent(q)}`)).people.map(({ id }) => id).sort();
    expect(await found(word)).toEqual([a.id, b.id].sort());
    expect(await found(`100%_${word}`)).toEqual([a.id]);
    expect(await found(`100__${word}`)).toEqual([]);
    expect(await found(`%${word}`)).toEqual([]);
    expect(await found(b.email.toUpperCase())).toEqual([b.id]);
    expect(await found(String.raw`\ `.trim() + word)).toEqual([]);
  });

  it('goes on page by page, with everybody once in order of address', async () => {
    const word = crypto.randomUUID();
    const made = Array.from({ length: PAGE_SIZE * 2 + 1 }, (_, i) => ({ name: word, email: `${word}-${String(i).padStart(3, '0')}@sesqui.example` }));
    await database.insert(users).values(made);
    const pages: string[][] = [];
    for (let cursor: string | null = ''; cursor !== null; ) {
      const page: PeopleWire = await list(`q=${word}${cursor && `&cursor=${cursor}`}`);
      pages.push(page.people.map(({ email }) => email));
      cursor = page.nextCursor;
    }
    expect(pages.map(({ length }) => length)).toEqual([PAGE_SIZE, PAGE_SIZE, 1]);
    expect(pages.flat()).toEqual(made.map(({ email }) => email));
  });
});

describe('changing a person', () => {
  it('gives another role, which counts at the next request', async () => {
    const person = await newPerson(database, 'student');
    expect((await person.reader.ask('/api/people')).status).toBe(403);
    expect((await change(person.id, { role: 'administrator' })).body).toMatchObject({ person: { id: person.id, role: 'administrator', disabledAt: null } });
    expect((await person.reader.ask('/api/people')).status).toBe(200);
  });

  it('closes an account, so that nobody can sign in, and keeps its work; opens it again', async () => {
    const person = await newPerson(database, 'student', { passwordHash: await hashPassword('osier-lock-9-pond') });
    const study = await ownStudy(database, person.id);
    const signIn = async () => (await new Reader().signIn(person.email, 'osier-lock-9-pond')).status;
    expect(await signIn()).toBe(200);
    expect((await change(person.id, { disabled: true })).body).toMatchObject({ person: { disabledAt: expect.any(String) } });
    expect(await signIn()).toBe(401);
    expect(await rowsOf(pool, person.id)).toMatchObject({ person: { disabled_at: expect.any(String) } });
    expect((await change(person.id, { disabled: false })).body).toMatchObject({ person: { disabledAt: null } });
    expect(await signIn()).toBe(200);
    const reader = new Reader();
    await reader.signIn(person.email, 'osier-lock-9-pond');
    expect((await reader.ask(`/api/studies/${study.id}`)).status).toBe(200);
  });

  it.each([
    ['an invented role', { role: 'owner' }, 422, 'invalid'],
    ['nothing', {}, 422, 'invalid'],
    ['more than there is', { role: 'student', email: 'other@sesqui.example' }, 422, 'invalid'],
    ['a name', { name: 'Otter' }, 422, 'invalid'],
    ['a word for yes', { disabled: 'true' }, 422, 'invalid'],
  ])('with %s is refused', async (_, body, status, code) => {
    const person = await newPerson(database, 'composer');
    const before = await rowsOf(pool, person.id);
    expect(refusalOf(await change(person.id, body)).slice(0, 2)).toEqual([status, code]);
    expect(await rowsOf(pool, person.id)).toEqual(before);
  });

  it('finds nobody where there is nobody', async () => {
    expect(refusalOf(await change('00000000-0000-4000-8000-000000000000', { role: 'student' }))).toEqual([404, 'not_found']);
    expect(refusalOf(await change('self', { role: 'student' })).slice(0, 2)).toEqual([422, 'invalid']);
  });
});
