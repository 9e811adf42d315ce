import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { updatePerson } from '@/db/queries/people';
import type { UserRole } from '@/db/queries/users';
import { users } from '@/db/schema';
import { createTestDatabase, type TestDatabase } from '../helpers/database';

let db: TestDatabase;
beforeAll(async () => void (db = await createTestDatabase()));
afterAll(() => db.drop());
beforeEach(async () => void (await db.database.delete(users)));

async function add(role: UserRole): Promise<string> {
  const [row] = await db.database.insert(users).values({ email: `${crypto.randomUUID()}@sesqui.example`, role }).returning({ id: users.id });
  return row!.id;
}
const administrators = async () => (await db.database.select({ id: users.id }).from(users).where(eq(users.role, 'administrator'))).map(({ id }) => id);

describe('updatePerson', () => {
  it('leaves one administrator where two take the role from each other at once', async () => {
    for (let round = 0; round < 10; round += 1) {
      await db.database.delete(users);
      const [a, b] = [await add('administrator'), await add('administrator')];
      const results = await Promise.all([
        updatePerson(db.database, { id: b, by: a, role: 'student' }),
        updatePerson(db.database, { id: a, by: b, role: 'student' }),
      ]);
      const kinds = results.map(({ kind }) => kind);
      expect([...kinds].sort()).toEqual(['done', 'not-allowed']);
      expect(await administrators()).toEqual([kinds[0] === 'done' ? a : b]);
    }
  });

  it.each([{ role: 'composer' }, { disabled: true }, { role: 'composer', disabled: false }] as const)('refuses %j for the last administrator', async (change) => {
    const last = await add('administrator');
    await add('composer');
    expect(await updatePerson(db.database, { id: last, by: last, ...change })).toEqual({ kind: 'last-administrator' });
    expect(await administrators()).toEqual([last]);
  });

  it('does not count an administrator whose account is closed, who cannot ask either', async () => {
    const [open, closed] = [await add('administrator'), await add('administrator')];
    expect(await updatePerson(db.database, { id: closed, by: open, disabled: true })).toMatchObject({ kind: 'done' });
    expect(await updatePerson(db.database, { id: open, by: open, role: 'student' })).toEqual({ kind: 'last-administrator' });
    expect(await updatePerson(db.database, { id: open, by: closed, role: 'student' })).toEqual({ kind: 'not-allowed' });
  });

  it('is for administrators', async () => {
    const [administrator, composer] = [await add('administrator'), await add('composer')];
    expect(await updatePerson(db.database, { id: composer, by: composer, role: 'administrator' })).toEqual({ kind: 'not-allowed' });
    expect(await updatePerson(db.database, { id: crypto.randomUUID(), by: administrator, role: 'teacher' })).toEqual({ kind: 'missing' });
    expect(await administrators()).toEqual([administrator]);
  });

  it('ends the sessions of an account that it closes, and keeps when it was first closed', async () => {
    const [administrator, composer] = [await add('administrator'), await add('composer')];
    const change = (disabled: boolean) => updatePerson(db.database, { id: composer, by: administrator, disabled });
    const first = await change(true);
    expect(await change(true)).toEqual(first);
    await change(false);
    const [row] = await db.database.select().from(users).where(eq(users.id, composer));
    expect(row).toMatchObject({ disabledAt: null, sessionEpoch: 2 });
  });
});
