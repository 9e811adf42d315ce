import { and, eq, isNull } from 'drizzle-orm';
import type { Database } from '../connect';
import { users, type userRole } from '../schema';

export type UserRole = (typeof userRole.enumValues)[number];

/** The form in which an address is kept and looked up. */
export const normaliseEmail = (email: string): string => email.trim().toLowerCase();

/** What signing in needs: one open account by its address, hash included; undefined where there is none. */
export async function getCredentials(database: Database, email: string) {
  const [row] = await database
    .select({ id: users.id, name: users.name, email: users.email, role: users.role, passwordHash: users.passwordHash })
    .from(users)
    .where(and(eq(users.email, normaliseEmail(email)), isNull(users.disabledAt)));
  return row;
}

/** One open account by its id; undefined where there is none, or where it has been closed. */
export async function getUser(database: Database, id: string) {
  const [row] = await database
    .select({ id: users.id, name: users.name, email: users.email, role: users.role })
    .from(users)
    .where(and(eq(users.id, id), isNull(users.disabledAt)));
  return row;
}

/** Adds an account unless its address is taken; whether it was added. */
export async function createUserIfMissing(
  database: Database,
  user: { name: string; email: string; role: UserRole; passwordHash: string },
): Promise<boolean> {
  const added = await database
    .insert(users)
    .values({ ...user, email: normaliseEmail(user.email) })
    .onConflictDoNothing({ target: users.email })
    .returning({ id: users.id });
  return added.length > 0;
}
