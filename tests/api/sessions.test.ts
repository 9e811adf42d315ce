import { eq } from 'drizzle-orm';
import type { JWT } from 'next-auth/jwt';
import type pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Database } from '@/db/connect';
import type { UserRole } from '@/db/queries/users';
import { users } from '@/db/schema';
import { Reader, type Method } from '../helpers/api';
import { applicationDatabase, newPerson, sessionToken, type Person } from '../helpers/people';
import { rowsOf } from '../helpers/rows';

let database: Database;
let pool: pg.Pool;
beforeAll(() => void ({ database, pool } = applicationDatabase()));
afterAll(() => pool.end());

const unauthorized = { error: { code: 'unauthorized', message: 'Sign in first.' } };
const COOKIE = 'next-auth.session-token';

/** A reader whose session is the given text. */
function readerWith(token: string): Reader {
  const reader = new Reader();
  reader.cookies.set(COOKIE, token);
  return reader;
}

const tokenOf = ({ id, email, role }: Person, changes: Partial<JWT> = {}): JWT => ({ sub: id, id, email, name: 'Invented', role, epoch: 0, ...changes });
const roleOf = async (id: string) => (await database.select({ role: users.role }).from(users).where(eq(users.id, id)))[0]?.role;

describe('one’s own role', () => {
  const LOWER: readonly UserRole[] = ['student', 'teacher', 'composer'];

  it.each(LOWER)('is not raised by a %s, whatever is asked', async (role) => {
    const person = await newPerson(database, role);
    const before = await rowsOf(pool, person.id);
    const { csrfToken } = (await person.reader.ask('/api/auth/csrf')).body as { csrfToken: string };
    const tries: readonly (readonly [Method, string, unknown, number])[] = [
      ['PATCH', '/api/account', { role: 'administrator' }, 422],
      ['PATCH', '/api/account', { name: 'Heron', role: 'administrator' }, 422],
      ['PATCH', '/api/account', { name: 'Heron', sessionEpoch: 0 }, 422],
      ['PATCH', '/api/account', '{"name":"Heron","__proto__":{"role":"administrator"}}', 422],
      ['PATCH', `/api/people/${person.id}`, { role: 'administrator' }, 403],
      ['PATCH', '/api/people/self', { role: 'administrator' }, 403],
      ['POST', '/api/account/password', { current: 'x', next: 'osier-lock-9-pond', role: 'administrator' }, 422],
      ['POST', '/api/auth/session', { csrfToken, data: { role: 'administrator', user: { role: 'administrator' } } }, 200],
    ];
    for (const [method, path, body, status] of tries) {
      expect([path, (await person.reader.send(method, path, body)).status]).toEqual([path, status]);
    }
    expect((await person.reader.ask('/api/people')).status).toBe(403);
    expect((await person.reader.ask('/api/auth/session')).body).toMatchObject({ user: { id: person.id, role } });
    expect(await rowsOf(pool, person.id)).toEqual(before);
  });

  it('is not chosen as administrator at registration', async () => {
    const email = `${crypto.randomUUID()}@sesqui.example`;
    const { status, body } = await new Reader().send('POST', '/api/register', { name: 'Heron', email, password: 'osier-lock-9-pond', role: 'administrator' });
    expect([status, body]).toMatchObject([422, { error: { fields: { role: 'Choose composer, teacher or student.' } } }]);
    expect(await database.select().from(users).where(eq(users.email, email))).toEqual([]);
  });

  it('is the account’s, whatever the session says', async () => {
    const student = await newPerson(database, 'student');
    const forged = readerWith(await sessionToken(tokenOf(student, { role: 'administrator' })));
    expect((await forged.ask('/api/people')).status).toBe(403);
    expect((await forged.ask('/people')).status).toBe(404);
    expect((await forged.send('PATCH', `/api/people/${student.id}`, { role: 'administrator' })).status).toBe(403);
    expect((await forged.ask('/api/account')).body).toMatchObject({ account: { id: student.id, role: 'student' } });
    expect(await roleOf(student.id)).toBe('student');
  });

  it('is not changed by an administrator of themselves, and their account is not closed by them', async () => {
    const self = await newPerson(database, 'administrator');
    for (const id of [self.id, self.id.toUpperCase()]) {
      expect((await self.reader.send('PATCH', `/api/people/${id}`, { role: 'composer' })).status).toBe(403);
      expect((await self.reader.send('PATCH', `/api/people/${id}`, { disabled: true })).status).toBe(403);
    }
    expect((await self.reader.ask('/api/people')).status).toBe(200);
  });

  it('counts at once when it is taken away', async () => {
    const [first, second] = [await newPerson(database, 'administrator'), await newPerson(database, 'administrator')];
    expect((await first.reader.send('PATCH', `/api/people/${second.id}`, { role: 'student' })).status).toBe(200);
    expect((await second.reader.ask('/api/people')).status).toBe(403);
  });
});

describe('a session', () => {
  const base64 = (value: object) => Buffer.from(JSON.stringify(value)).toString('base64url');
  const seconds = (from: number) => Math.floor(Date.now() / 1000) + from;

  const worthless: readonly (readonly [string, (person: Person) => string | Promise<string>])[] = [
    ['of an old number', (person) => sessionToken(tokenOf(person, { epoch: -1 }))],
    ['of a number to come', (person) => sessionToken(tokenOf(person, { epoch: 1 }))],
    ['without a number', ({ id, email, role }) => sessionToken({ sub: id, id, email, role } as JWT)],
    ['sealed with another secret', (person) => sessionToken(tokenOf(person), 'another secret of more than thirty-two characters')],
    ['that has run out', (person) => sessionToken(tokenOf(person), undefined, -120)],
    ['that nobody has signed', (person) => `${base64({ alg: 'none', typ: 'JWT' })}.${base64({ ...tokenOf(person), exp: seconds(3_600) })}.`],
    ['that nobody has sealed', (person) => `${base64({ alg: 'none', enc: 'none' })}..${base64({})}.${base64({ ...tokenOf(person), exp: seconds(3_600) })}.`],
    ['with a letter changed', async (person) => (await sessionToken(tokenOf(person))).replace(/.{9}$/, (end) => (end.startsWith('A') ? 'B' : 'A') + end.slice(1))],
    ['of an account that is not there', (person) => sessionToken(tokenOf(person, { id: '00000000-0000-4000-8000-000000000000' }))],
    ['whose id is no id', (person) => sessionToken(tokenOf(person, { id: "' or true --" }))],
    ['that is empty', () => ''],
    ['of 4,000 letters', () => 'x'.repeat(4_000)],
  ];

  it.each(worthless)('%s is nobody’s', async (_, make) => {
    const person = await newPerson(database, 'administrator');
    expect((await person.reader.ask('/api/account')).status).toBe(200);
    const reader = readerWith(await make(person));
    for (const path of ['/api/account', '/api/people', '/api/studies?list=own']) {
      const { status, body } = await reader.ask(path);
      expect([path, status, body]).toEqual([path, 401, unauthorized]);
    }
    expect((await reader.ask('/api/auth/session')).body).toEqual({});
    expect((await reader.ask('/people')).status).toBe(307);
  });

  it('of a closed account ends at once, and does not come back when the account is opened again', async () => {
    const [administrator, person] = [await newPerson(database, 'administrator'), await newPerson(database, 'composer')];
    const change = (disabled: boolean) => administrator.reader.send('PATCH', `/api/people/${person.id}`, { disabled });
    expect((await person.reader.ask('/api/account')).status).toBe(200);
    expect((await change(true)).status).toBe(200);
    expect(await person.reader.ask('/api/account')).toMatchObject({ status: 401, body: unauthorized });
    expect((await person.reader.send('PATCH', '/api/account', { name: 'Heron' })).status).toBe(401);
    expect((await change(false)).status).toBe(200);
    expect((await readerWith(await sessionToken(tokenOf(person))).ask('/api/account')).status).toBe(401);
    expect((await readerWith(await sessionToken(tokenOf(person, { epoch: 1 }))).ask('/api/account')).status).toBe(200);
  });
});
