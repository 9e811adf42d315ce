import { and, asc, eq, gt, isNull, or, sql } from 'drizzle-orm';
import type { Database } from '../connect';
import { readCursor, writeCursor } from '../cursor';
import { users } from '../schema';
import type { UserRole } from './users';

/** What an administrator sees of a person: nothing of anybody's work. */
const PERSON = {
  id: users.id,
  name: sql<string>`coalesce(${users.name}, '')`,
  email: users.email,
  role: users.role,
  createdAt: users.createdAt,
  disabledAt: users.disabledAt,
};

const literally = (text: string): string => text.replaceAll(/[\\%_]/g, String.raw`\$&`);

/** A page of people in order of address; undefined where the cursor cannot be read. */
export async function listPeople(database: Database, { q, cursor, pageSize }: { q: string; cursor?: string | undefined; pageSize: number }) {
  const place = cursor === undefined ? undefined : readCursor(cursor, ['string']);
  if (cursor !== undefined && place === undefined) return undefined;
  const wanted = sql`lower(${`%${literally(q)}%`})`;
  const rows = await database
    .select(PERSON)
    .from(users)
    .where(
      and(
        q === '' ? undefined : or(sql`lower(${users.name}) like ${wanted}`, sql`${users.email} like ${wanted}`),
        place && gt(users.email, String(place[0])),
      ),
    )
    .orderBy(asc(users.email))
    .limit(pageSize + 1);
  const people = rows.slice(0, pageSize);
  const last = rows.length > pageSize ? people.at(-1) : undefined;
  return { people, nextCursor: last ? writeCursor([last.email]) : null };
}

export type UpdatePersonResult =
  | { readonly kind: 'done'; readonly person: { id: string; name: string; email: string; role: UserRole; createdAt: Date; disabledAt: Date | null } }
  | { readonly kind: 'missing' }
  /** it would leave nobody who can grant roles */
  | { readonly kind: 'last-administrator' }
  /** whoever asks is no administrator any more */
  | { readonly kind: 'not-allowed' };

/**
 * Changes a person's role, or closes or opens their account; closing ends their sessions for good. Administrators' rows are
 * locked meanwhile, so that two who demote each other do not leave none.
 * @param change.by - the administrator who asks
 */
export async function updatePerson(
  database: Database,
  { id, by, role, disabled }: { id: string; by: string; role?: UserRole | undefined; disabled?: boolean | undefined },
): Promise<UpdatePersonResult> {
  return database.transaction(async (tx) => {
    const administrators = await tx
      .select({ id: users.id })
      .from(users)
      .where(and(eq(users.role, 'administrator'), isNull(users.disabledAt)))
      .orderBy(asc(users.id))
      .for('update');
    if (!administrators.some((one) => one.id === by)) return { kind: 'not-allowed' };
    const isDemoted = (role !== undefined && role !== 'administrator') || disabled === true;
    if (isDemoted && administrators.every((one) => one.id === id)) return { kind: 'last-administrator' };
    const [person] = await tx
      .update(users)
      .set({
        ...(role !== undefined && { role }),
        ...(disabled === true && { disabledAt: sql`coalesce(${users.disabledAt}, now())`, sessionEpoch: sql`${users.sessionEpoch} + 1` }),
        ...(disabled === false && { disabledAt: null }),
      })
      .where(eq(users.id, id))
      .returning(PERSON);
    return person ? { kind: 'done', person } : { kind: 'missing' };
  });
}
