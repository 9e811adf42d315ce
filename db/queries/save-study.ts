import { and, eq, isNull, sql } from 'drizzle-orm';
import type { Study } from '../../engine';
import type { Database } from '../connect';
import { UUID } from '../cursor';
import { studies, studyVersions } from '../schema';
import { columnsOf, getStudy, WHOLE } from './studies';

type Executor = Pick<Database, 'select' | 'insert' | 'update'>;
export type WholeStudy = NonNullable<Awaited<ReturnType<typeof getStudy>>>;

export type SaveResult =
  | { readonly kind: 'saved'; readonly study: WholeStudy }
  /** another version was saved first: `current` is the study as it is */
  | { readonly kind: 'conflict'; readonly current: WholeStudy }
  /** the id of this save has been used for something else */
  | { readonly kind: 'save-id-used' }
  | { readonly kind: 'demo' }
  | { readonly kind: 'missing' };

/** Whether a failed query says that a row of the same key is there already. */
function isDuplicate(error: unknown): boolean {
  for (let at: unknown = error, depth = 0; at instanceof Error && depth < 5; at = at.cause, depth += 1) {
    if ('code' in at && at.code === '23505') return true;
  }
  return false;
}

/**
 * What an earlier save under the same id came to: the study as it was then saved; undefined where there was none.
 * @param studyId - the study that it must be of; undefined for any that the save has made
 */
async function findSaved(database: Executor, by: { userId: string; saveId: string | undefined; studyId?: string; document: Study }): Promise<SaveResult | undefined> {
  if (by.saveId === undefined) return undefined;
  const [found] = await database
    .select({
      study: { ...WHOLE, title: studyVersions.title, version: studyVersions.version, document: studyVersions.document, updatedAt: studyVersions.createdAt },
      isSame: sql<boolean>`${studyVersions.document} = ${JSON.stringify(by.document)}::jsonb`,
      deletedAt: studies.deletedAt,
    })
    .from(studyVersions)
    .innerJoin(studies, eq(studies.id, studyVersions.studyId))
    .where(and(eq(studyVersions.savedBy, by.userId), eq(studyVersions.saveId, by.saveId), eq(studies.ownerId, by.userId)));
  if (!found) return undefined;
  const isOfStudy = by.studyId === undefined ? found.study.version === 1 : found.study.id === by.studyId.toLowerCase();
  if (!isOfStudy || !found.isSame) return { kind: 'save-id-used' };
  if (found.deletedAt !== null) return { kind: 'missing' };
  return { kind: 'saved', study: found.study };
}

/**
 * Saves a document as the next version of one of somebody's own studies: the row and the kept version in one transaction,
 * and only on top of the version that it started from. The same save sent again is answered as it was, and not saved twice.
 * @param save.saveId - the sender's own id of this save
 * @throws EngineError where the document cannot be built
 */
export async function saveStudy(
  database: Database,
  { id, userId, document, baseVersion, saveId }: { id: string; userId: string; document: Study; baseVersion: number; saveId?: string | undefined },
): Promise<SaveResult> {
  const columns = columnsOf(document);
  const again = () => findSaved(database, { userId, saveId, studyId: id, document });
  const before = await again();
  if (before) return before;
  let saved: WholeStudy | undefined;
  try {
    saved = UUID.test(id) ? await saveNext(database, { id, userId, baseVersion, saveId, columns }) : undefined;
  } catch (error) {
    if (!isDuplicate(error)) throw error;
  }
  if (saved) return { kind: 'saved', study: saved };
  const meanwhile = await again();
  if (meanwhile) return meanwhile;
  const current = await getStudy(database, { id, userId });
  if (!current) return { kind: 'missing' };
  return current.isDemo ? { kind: 'demo' } : { kind: 'conflict', current };
}

async function saveNext(
  database: Database,
  { id, userId, baseVersion, saveId, columns }: { id: string; userId: string; baseVersion: number; saveId: string | undefined; columns: ReturnType<typeof columnsOf> },
): Promise<WholeStudy | undefined> {
  return database.transaction(async (tx) => {
    const [row] = await tx
      .update(studies)
      .set({ ...columns, version: baseVersion + 1, updatedAt: sql`now()` })
      .where(and(eq(studies.id, id), eq(studies.ownerId, userId), isNull(studies.deletedAt), eq(studies.version, baseVersion)))
      .returning(WHOLE);
    if (!row) return undefined;
    const { title, document } = columns;
    await tx.insert(studyVersions).values({ studyId: row.id, version: row.version, title, document, savedBy: userId, saveId: saveId ?? null, createdAt: row.updatedAt });
    return row;
  });
}

/**
 * Makes a new study of somebody's own. The same save sent again gives the study that it made, and makes no second one.
 * @throws EngineError where the document cannot be built
 */
export async function createStudy(
  database: Database,
  { userId, document, saveId }: { userId: string; document: Study; saveId?: string | undefined },
): Promise<SaveResult> {
  const columns = columnsOf(document);
  const again = () => findSaved(database, { userId, saveId, document });
  const before = await again();
  if (before) return before;
  try {
    const study = await database.transaction(async (tx) => {
      const [row] = await tx.insert(studies).values({ ...columns, ownerId: userId }).returning(WHOLE);
      const made = row!;
      await tx.insert(studyVersions).values({ studyId: made.id, version: 1, title: columns.title, document, savedBy: userId, saveId: saveId ?? null, createdAt: made.updatedAt });
      return made;
    });
    return { kind: 'saved', study };
  } catch (error) {
    const meanwhile = isDuplicate(error) ? await again() : undefined;
    if (meanwhile) return meanwhile;
    throw error;
  }
}
