import { and, eq, isNull, sql } from 'drizzle-orm';
import type { Database } from '../connect';
import { users, type paperSize, type userRole, type valueNames } from '../schema';

export type UserRole = (typeof userRole.enumValues)[number];
type ValueNames = (typeof valueNames.enumValues)[number];
type PaperSize = (typeof paperSize.enumValues)[number];

/** The form in which an address is kept and looked up. */
export const normaliseEmail = (email: string): string => email.trim().toLowerCase();

const BASIC = { id: users.id, name: users.name, email: users.email, role: users.role, sessionEpoch: users.sessionEpoch };
const ACCOUNT = {
  id: users.id,
  name: sql<string>`coalesce(${users.name}, '')`,
  email: users.email,
  role: users.role,
  valueNames: users.valueNames,
  paperSize: users.paperSize,
  createdAt: users.createdAt,
};
const isOpen = (id: string) => and(eq(users.id, id), isNull(users.disabledAt));

/** What signing in needs: one open account by its address, hash included; undefined where there is none. */
export async function getCredentials(database: Database, email: string) {
  const [row] = await database
    .select({ ...BASIC, passwordHash: users.passwordHash })
    .from(users)
    .where(and(eq(users.email, normaliseEmail(email)), isNull(users.disabledAt)));
  return row;
}

/** One open account by its id; undefined where there is none, or where it has been closed. */
export async function getUser(database: Database, id: string) {
  const [row] = await database.select(BASIC).from(users).where(isOpen(id));
  return row;
}

/** What the page of one's own account shows. */
export async function getAccount(database: Database, id: string) {
  const [row] = await database.select(ACCOUNT).from(users).where(isOpen(id));
  return row;
}

/** The password's hash of an open account; undefined where there is no such account. */
export async function getPasswordHash(database: Database, id: string) {
  const [row] = await database.select({ passwordHash: users.passwordHash }).from(users).where(isOpen(id));
  return row?.passwordHash;
}

export async function updateAccount(database: Database, id: string, changes: { name?: string | undefined; valueNames?: ValueNames | undefined; paperSize?: PaperSize | undefined }) {
  const [row] = await database.update(users).set(changes).where(isOpen(id)).returning(ACCOUNT);
  return row;
}

/** Ends every session of an account. @returns the number that sessions must carry from now on */
export async function endSessions(database: Database, id: string, passwordHash?: string): Promise<number | undefined> {
  const [row] = await database
    .update(users)
    .set({ sessionEpoch: sql`${users.sessionEpoch} + 1`, ...(passwordHash !== undefined && { passwordHash }) })
    .where(isOpen(id))
    .returning({ sessionEpoch: users.sessionEpoch });
  return row?.sessionEpoch;
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
