import { and, asc, desc, eq, gt, isNotNull, isNull, lt, type SQL, sql } from 'drizzle-orm';
import type { Database } from '../connect';
import { readCursor, writeCursor } from '../cursor';
import { studies } from '../schema';
import { LISTED, named } from './studies';

export type StudySort = 'changed' | 'title' | 'length';

/** How long a study that was thrown away can be restored. */
export const KEPT = sql.raw("interval '30 days'");
const isRestorable = gt(studies.deletedAt, sql`now() - ${KEPT}`);

const lowerTitle = sql<string>`lower(${studies.title})`;

/** Each order as its sort key, the kind of that key in a cursor, and whether the greatest comes first. */
const ORDERS = {
  changed: { key: sql<Date>`${studies.updatedAt}`, kind: 'moment', isDescending: true },
  title: { key: lowerTitle, kind: 'string', isDescending: false },
  length: { key: sql<number>`${studies.seconds}`, kind: 'number', isDescending: false },
} as const;

const literally = (text: string): string => text.replaceAll(/[\\%_]/g, String.raw`\$&`);

function after(sort: StudySort, [key, id]: readonly (string | number)[]): SQL {
  const order = ORDERS[sort];
  const place = order.kind === 'moment' ? sql`${key}::timestamptz` : order.kind === 'number' ? sql`${key}::double precision` : sql`${key}::text`;
  return order.isDescending
    ? sql`(${order.key}, ${studies.id}) < (${place}, ${id}::uuid)`
    : sql`(${order.key}, ${studies.id}) > (${place}, ${id}::uuid)`;
}

export type OwnStudiesParams = {
  readonly userId: string;
  /** part of the title, in either case; empty for all */
  readonly q: string;
  readonly sort: StudySort;
  readonly isDeleted: boolean;
  readonly cursor?: string | undefined;
  readonly pageSize: number;
};

/** The query of a page, without asking it: one query a page, whatever its length. Undefined where the cursor cannot be read. */
export function ownStudiesQuery(database: Database, { userId, q, sort, isDeleted, cursor, pageSize }: OwnStudiesParams) {
  const { key, kind, isDescending } = ORDERS[sort];
  const place = cursor === undefined ? undefined : readCursor(cursor, [kind, 'uuid']);
  if (cursor !== undefined && place === undefined) return undefined;
  return database
    .select({ ...LISTED, lowerTitle })
    .from(studies)
    .where(
      and(
        eq(studies.ownerId, userId),
        isDeleted ? and(isNotNull(studies.deletedAt), isRestorable) : isNull(studies.deletedAt),
        q === '' ? undefined : sql`${lowerTitle} like lower(${`%${literally(q)}%`})`,
        place && after(sort, place),
      ),
    )
    .orderBy(isDescending ? desc(key) : asc(key), isDescending ? desc(studies.id) : asc(studies.id))
    .limit(pageSize + 1);
}

/** A page of somebody's own studies, and where the next begins; undefined where the cursor cannot be read. */
export async function listOwnStudies(database: Database, params: OwnStudiesParams) {
  const query = ownStudiesQuery(database, params);
  if (!query) return undefined;
  const rows = await query;
  const page = rows.slice(0, params.pageSize);
  const last = rows.length > params.pageSize ? page.at(-1) : undefined;
  const keyOf = { changed: last?.updatedAt.toISOString(), title: last?.lowerTitle, length: last?.seconds }[params.sort];
  return { studies: page, nextCursor: last && keyOf !== undefined ? writeCursor([keyOf, last.id]) : null };
}

const owned = (id: string, userId: string) => and(named(id), eq(studies.ownerId, userId));

/** Throws one of somebody's own studies away, so that it can be restored for a while. Undefined where there is none. */
export async function deleteStudy(database: Database, { id, userId }: { id: string; userId: string }) {
  const [row] = await database
    .update(studies)
    .set({ deletedAt: sql`now()` })
    .where(and(owned(id, userId), isNull(studies.deletedAt)))
    .returning(LISTED);
  return row;
}

/** Brings back what was thrown away, while it is kept. Undefined where there is nothing to bring back. */
export async function restoreStudy(database: Database, { id, userId }: { id: string; userId: string }) {
  const [row] = await database
    .update(studies)
    .set({ deletedAt: null })
    .where(and(owned(id, userId), isNotNull(studies.deletedAt), isRestorable))
    .returning(LISTED);
  return row;
}

/** Removes for good what was thrown away too long ago to be restored. @returns how many studies */
export async function purgeStudies(database: Database): Promise<number> {
  const gone = await database.delete(studies).where(lt(studies.deletedAt, sql`now() - ${KEPT}`)).returning({ id: studies.id });
  return gone.length;
}
