import { eq } from 'drizzle-orm';
import type pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Database } from '@/db/connect';
import { hashPassword, verifyPassword } from '@/db/password';
import { users } from '@/db/schema';
import { RATES } from '@/lib/server/limits';
import { Reader } from '../helpers/api';
import { refusalOf } from '../helpers/own-study';
import { applicationDatabase, newPerson } from '../helpers/people';
import { rowsOf } from '../helpers/rows';

const PASSWORD = 'osier-lock-9-pond';
const NEW = 'sedge-weir-4-eel';

let database: Database;
let pool: pg.Pool;
let passwordHash: string;
beforeAll(async () => {
  ({ database, pool } = applicationDatabase());
  passwordHash = await hashPassword(PASSWORD);
});
afterAll(() => pool.end());

const newAddress = () => `${crypto.randomUUID()}@sesqui.example`;
const byAddress = (email: string) => database.select().from(users).where(eq(users.email, email));
const register = (email: string, changes: object = {}) =>
  new Reader().send('POST', '/api/register', { name: 'Heron', email, password: PASSWORD, role: 'student', ...changes });

describe('registering', () => {
  it('makes one account, with the password sealed, whatever the case and the spaces of the address', async () => {
    const email = newAddress();
    const { status, body, headers } = await register(` ${email.toUpperCase()} `);
    expect([status, body, headers.getSetCookie()]).toEqual([201, { ok: true }, []]);
    const [made, ...others] = await byAddress(email);
    expect([made, others]).toMatchObject([{ name: 'Heron', role: 'student', sessionEpoch: 0, disabledAt: null }, []]);
    expect(JSON.stringify(made)).not.toContain(PASSWORD);
    expect(await verifyPassword(PASSWORD, made!.passwordHash)).toBe(true);
    const reader = new Reader();
    expect((await reader.signIn(email, PASSWORD)).status).toBe(200);
    expect((await reader.ask('/api/account')).body).toMatchObject({ account: { email, role: 'student' } });
  });

  it('answers a known address exactly as an unknown one, and leaves its account as it is', async () => {
    const person = await newPerson(database, 'composer', { passwordHash });
    const before = await rowsOf(pool, person.id);
    const unknown = await register(newAddress());
    for (const email of [person.email, person.email.toUpperCase(), ` ${person.email}`]) {
      const known = await register(email, { name: 'Somebody else', password: NEW, role: 'teacher' });
      expect([known.status, known.body]).toEqual([unknown.status, unknown.body]);
      expect([...known.headers.keys()]).toEqual([...unknown.headers.keys()]);
    }
    expect(await rowsOf(pool, person.id)).toEqual(before);
    expect((await byAddress(person.email)).length).toBe(1);
  });

  it('of one address twice at once makes one account', async () => {
    const email = newAddress();
    const answers = await Promise.all([register(email), register(email), register(email)]);
    expect(answers.map(({ status }) => status)).toEqual([201, 201, 201]);
    expect((await byAddress(email)).length).toBe(1);
  });

  it('of a closed account’s address does not open it', async () => {
    const person = await newPerson(database, 'composer', { passwordHash });
    await database.update(users).set({ disabledAt: new Date('2026-01-01') }).where(eq(users.id, person.id));
    const before = await rowsOf(pool, person.id);
    expect((await register(person.email)).status).toBe(201);
    expect(await rowsOf(pool, person.id)).toEqual(before);
    expect((await new Reader().signIn(person.email, PASSWORD)).status).toBe(401);
  });
});

describe('one’s own account', () => {
  it('tells what it is, and never the password’s hash', async () => {
    const { id, email, reader } = await newPerson(database, 'teacher', { passwordHash });
    const { body } = await reader.ask('/api/account');
    expect(body).toEqual({ account: { id, email, name: expect.any(String), role: 'teacher', valueNames: 'american', paperSize: 'a4', createdAt: expect.any(String) } });
  });

  it('takes a name, names of values and paper, one at a time or together', async () => {
    const { reader } = await newPerson(database, 'teacher');
    const change = async (body: object) => (await reader.send('PATCH', '/api/account', body)).body;
    expect(await change({ name: '  Ada Heron ' })).toMatchObject({ account: { name: 'Ada Heron', valueNames: 'american', paperSize: 'a4' } });
    expect(await change({ valueNames: 'british' })).toMatchObject({ account: { name: 'Ada Heron', valueNames: 'british', paperSize: 'a4' } });
    expect(await change({ name: 'Ada', paperSize: 'letter' })).toMatchObject({ account: { name: 'Ada', valueNames: 'british', paperSize: 'letter' } });
    expect((await reader.ask('/api/account')).body).toMatchObject({ account: { name: 'Ada', valueNames: 'british', paperSize: 'letter' } });
  });
});

/** Somebody who is signed in at three places, one of them by a copy of the first one’s cookie. */
async function atThreePlaces() {
  const person = await newPerson(database, 'composer', { passwordHash });
  const [here, there, copied] = [new Reader(), new Reader(), new Reader()];
  for (const reader of [here, there]) expect((await reader.signIn(person.email, PASSWORD)).status).toBe(200);
  for (const [name, value] of here.cookies) copied.cookies.set(name, value);
  return { ...person, here, there, copied };
}

const isIn = async (reader: Reader) => (await reader.ask('/api/account')).status === 200;

describe('another password', () => {
  const change = (reader: Reader, current: string, next: string) => reader.send('POST', '/api/account/password', { current, next });

  it('ends every other session, the old cookie of this one too, and this one goes on', async () => {
    const { email, here, there, copied } = await atThreePlaces();
    const stranger = await newPerson(database, 'composer');
    expect([await isIn(here), await isIn(there), await isIn(copied)]).toEqual([true, true, true]);
    expect((await change(here, PASSWORD, NEW)).body).toEqual({ ok: true });
    expect([await isIn(here), await isIn(there), await isIn(copied), await isIn(stranger.reader)]).toEqual([true, false, false, true]);
    expect((await here.ask('/api/auth/session')).body).toMatchObject({ user: { email } });
    expect((await new Reader().signIn(email, PASSWORD)).status).toBe(401);
    expect((await new Reader().signIn(email, NEW)).status).toBe(200);
  });

  it.each([
    ['a wrong present one', 'not the password', NEW, { current: 'This is not the present password.' }],
    ['no present one', '', NEW, { current: 'Type the present password.' }],
    ['one of 7 characters', PASSWORD, 'osier-9', { next: 'A password has at least 8 characters.' }],
    ['one of 5,000 characters', PASSWORD, 'x-'.repeat(2_500), { next: 'A password has at most 128 characters.' }],
    ['one that all know', PASSWORD, 'password', { next: 'This password is among the first that anybody would guess: choose another.' }],
  ])('is refused with %s, and no session ends', async (_, current, next, fields) => {
    const { id, reader } = await newPerson(database, 'composer', { passwordHash });
    const before = await rowsOf(pool, id);
    expect(refusalOf(await change(reader, current, next))).toEqual([422, 'invalid', fields]);
    expect([await rowsOf(pool, id), await isIn(reader)]).toEqual([before, true]);
  });

  it('is refused where it is the address', async () => {
    const { email, reader } = await newPerson(database, 'composer', { passwordHash });
    expect(refusalOf(await change(reader, PASSWORD, email.toUpperCase())).slice(0, 2)).toEqual([422, 'invalid']);
    expect(refusalOf(await change(reader, PASSWORD, email.split('@')[0]!)).slice(0, 2)).toEqual([422, 'invalid']);
  });

  it('is refused after ten tries at the present one, even with the right one', async () => {
    const { id, reader } = await newPerson(database, 'composer', { passwordHash });
    for (let i = 0; i < RATES.password.most; i += 1) expect((await change(reader, `guess ${i}`, NEW)).status).toBe(422);
    const before = await rowsOf(pool, id);
    expect(refusalOf(await change(reader, PASSWORD, NEW))).toEqual([429, 'too_many']);
    expect(await rowsOf(pool, id)).toEqual(before);
  });
});

describe('signing out everywhere', () => {
  it('ends every session of the account, this one too, and nobody else’s', async () => {
    const { email, here, there, copied } = await atThreePlaces();
    const stranger = await newPerson(database, 'composer');
    const { status, headers } = await here.send('POST', '/api/account/sign-out-everywhere');
    expect([status, headers.getSetCookie().some((line) => /session-token=;.*Max-Age=0/.test(line))]).toEqual([200, true]);
    expect([await isIn(here), await isIn(there), await isIn(copied), await isIn(stranger.reader)]).toEqual([false, false, false, true]);
    expect((await there.signIn(email, PASSWORD)).status).toBe(200);
    expect([await isIn(there), await isIn(copied)]).toEqual([true, false]);
  });
});
