import { encode, type JWT } from 'next-auth/jwt';
import pg from 'pg';
import { connect, type Database } from '@/db/connect';
import type { UserRole } from '@/db/queries/users';
import { users } from '@/db/schema';
import { Reader } from './api';
import { setting } from './settings';

/** The database that the running application uses, for a look at its rows. */
export function applicationDatabase(): { database: Database; pool: pg.Pool } {
  return connect(setting('TEST_APPLICATION_DATABASE_URL'), 4);
}

/**
 * The cookie of a session, sealed as the application seals it, so that a test need not wait for a password.
 * @param maxAge - seconds that it still has; less than none for one that has run out
 */
export async function sessionToken(token: JWT, secret = setting('TEST_SECRET'), maxAge = 3_600): Promise<string> {
  return encode({ token, secret, maxAge });
}

export type Person = { readonly id: string; readonly email: string; readonly role: UserRole; readonly reader: Reader };

let made = 0;

/** A new account in the application's database, signed in; nobody knows its password unless a hash is given. */
export async function newPerson(database: Database, role: UserRole, { passwordHash, base, secret }: { passwordHash?: string; base?: string; secret?: string } = {}): Promise<Person> {
  made += 1;
  const email = `${role}-${made}-${crypto.randomUUID()}@sesqui.example`;
  const [row] = await database
    .insert(users)
    .values({ name: `Invented ${role} ${made}`, email, role, passwordHash: passwordHash ?? null })
    .returning({ id: users.id });
  const reader = new Reader(undefined, base);
  const id = row!.id;
  reader.cookies.set('next-auth.session-token', await sessionToken({ sub: id, id, email, name: 'Invented', role, epoch: 0 }, secret));
  return { id, email, role, reader };
}
