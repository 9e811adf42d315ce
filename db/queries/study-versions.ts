import { and, desc, eq, isNull, lt, or } from 'drizzle-orm';
import type { Database } from '../connect';
import { readCursor, writeCursor } from '../cursor';
import { studies, studyVersions } from '../schema';
import { named } from './studies';

type Reader = { readonly id: string; readonly userId: string };

const readable = ({ id, userId }: Reader) => and(named(id), isNull(studies.deletedAt), or(studies.isDemo, eq(studies.ownerId, userId)));
const { version, createdAt, title, document } = studyVersions;

/**
 * A page of the kept versions of a study that the reader may see, the newest first.
 * @returns null where there is no such study for this reader, undefined where the cursor cannot be read
 */
export async function listVersions(database: Database, { cursor, pageSize, ...reader }: Reader & { cursor?: string | undefined; pageSize: number }) {
  const place = cursor === undefined ? undefined : readCursor(cursor, ['number']);
  if (cursor !== undefined && (place === undefined || !Number.isInteger(place[0]) || Math.abs(Number(place[0])) > 2_000_000_000)) return undefined;
  const rows = await database
    .select({ version, createdAt, title })
    .from(studyVersions)
    .innerJoin(studies, eq(studies.id, studyVersions.studyId))
    .where(and(readable(reader), place && lt(version, Number(place[0]))))
    .orderBy(desc(version))
    .limit(pageSize + 1);
  if (rows.length === 0 && place === undefined) return null;
  const versions = rows.slice(0, pageSize);
  const last = rows.length > pageSize ? versions.at(-1) : undefined;
  return { versions, nextCursor: last ? writeCursor([last.version]) : null };
}

/** One kept version, whole, of a study that the reader may see; undefined where there is none. */
export async function getVersion(database: Database, { version: wanted, ...reader }: Reader & { version: number }) {
  const [row] = await database
    .select({ version, createdAt, title, document })
    .from(studyVersions)
    .innerJoin(studies, eq(studies.id, studyVersions.studyId))
    .where(and(readable(reader), eq(version, wanted)));
  return row;
}
