import { DrizzleAdapter } from '@auth/drizzle-adapter';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createUserIfMissing, getCredentials, getUser } from '@/db/queries/users';
import { accounts, sessions, users, verificationTokens } from '@/db/schema';
import { createTestDatabase, type TestDatabase } from '../helpers/database';

let db: TestDatabase;
beforeAll(async () => void (db = await createTestDatabase()));
afterAll(() => db.drop());

const wren = { name: 'Wren', email: ' Wren@Sesqui.example', role: 'student' as const, passwordHash: 'x' };

describe('users', () => {
  it('are found whatever the case of the address, and added once', async () => {
    expect(await createUserIfMissing(db.database, wren)).toBe(true);
    expect(await createUserIfMissing(db.database, { ...wren, name: 'Another' })).toBe(false);
    const found = await getCredentials(db.database, 'WREN@sesqui.EXAMPLE ');
    expect(found).toMatchObject({ name: 'Wren', email: 'wren@sesqui.example', role: 'student', passwordHash: 'x' });
    expect(await getUser(db.database, found!.id)).toEqual({ id: found!.id, name: 'Wren', email: 'wren@sesqui.example', role: 'student', sessionEpoch: 0 });
  });

  it('are not found once their account is closed', async () => {
    await createUserIfMissing(db.database, { ...wren, email: 'closed@sesqui.example' });
    const { id } = (await getCredentials(db.database, 'closed@sesqui.example'))!;
    await db.database.update(users).set({ disabledAt: new Date('2026-01-01') }).where(eq(users.id, id));
    expect(await getCredentials(db.database, 'closed@sesqui.example')).toBeUndefined();
    expect(await getUser(db.database, id)).toBeUndefined();
  });

  it('fit the sign-in library’s adapter', async () => {
    const adapter = DrizzleAdapter(db.database, {
      usersTable: users,
      accountsTable: accounts,
      sessionsTable: sessions,
      verificationTokensTable: verificationTokens,
    });
    const expires = new Date('2026-12-01T12:00:00Z');
    const made = await adapter.createUser!({ id: crypto.randomUUID(), email: 'mail@sesqui.example', emailVerified: null });
    expect(await adapter.getUserByEmail!('mail@sesqui.example')).toMatchObject({ id: made.id, role: 'composer' });
    await adapter.createVerificationToken!({ identifier: 'mail@sesqui.example', token: 't', expires });
    expect(await adapter.useVerificationToken!({ identifier: 'mail@sesqui.example', token: 't' })).toMatchObject({ expires });
    expect(await adapter.useVerificationToken!({ identifier: 'mail@sesqui.example', token: 't' })).toBeNull();
  });
});
