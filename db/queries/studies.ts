import { and, asc, eq, getTableColumns, isNull, or, sql } from 'drizzle-orm';
import type { Study } from '../../engine';
import type { Database } from '../connect';
import { UUID } from '../cursor';
import { studyFigures } from '../figures';
import { studies, studyVersions } from '../schema';

const { id, slug, title, summary, version, createdAt, updatedAt, deletedAt, measures, seconds, strip, document, isDemo } = getTableColumns(studies);
/** What lists show: never the document. */
export const LISTED = { id, slug, title, summary, version, createdAt, updatedAt, deletedAt, measures, seconds, strip };
/** A whole study. */
export const WHOLE = { id, slug, title, version, document, updatedAt, isDemo };

/** A row that an id or a slug names. */
export const named = (name: string) => (UUID.test(name) ? eq(studies.id, name) : eq(studies.slug, name));

/**
 * The columns that a document fills.
 * @throws EngineError where the document cannot be built
 */
export const columnsOf = (study: Study) => ({ title: study.title, document: study, format: study.format, ...studyFigures(study) });

/** The demo studies, in order of title, without their documents. */
export async function listDemoStudies(database: Database) {
  return database
    .select(LISTED)
    .from(studies)
    .where(and(studies.isDemo, isNull(studies.deletedAt)))
    .orderBy(asc(studies.title));
}

/**
 * One study that the reader may see: a demo, or one of the reader's own. Undefined where there is none, without telling
 * whether somebody else's exists.
 * @param by.id - the study's id or its slug
 * @param by.userId - the signed-in reader, null for anybody
 */
export async function getStudy(database: Database, { id, userId }: { id: string; userId: string | null }) {
  const allowed = userId === null ? studies.isDemo : or(studies.isDemo, eq(studies.ownerId, userId));
  const [row] = await database
    .select(WHOLE)
    .from(studies)
    .where(and(named(id), isNull(studies.deletedAt), allowed));
  return row;
}

/**
 * Brings one demo study up to this release: adds it, or, where its document has changed, saves it as the next version.
 * @returns what was done
 */
export async function upsertDemoStudy(
  database: Database,
  { slug, summary, document }: { slug: string; summary: string; document: Study },
): Promise<'added' | 'updated' | 'unchanged'> {
  const { measures, seconds, strip, ...own } = columnsOf(document);
  const figures = { measures, seconds, strip };
  const { title } = own;
  return database.transaction(async (tx) => {
    const [added] = await tx
      .insert(studies)
      .values({ ...own, ...figures, summary, slug, isDemo: true })
      .onConflictDoNothing({ target: studies.slug })
      .returning({ id: studies.id, version: studies.version });
    if (added) {
      await tx.insert(studyVersions).values({ studyId: added.id, version: added.version, title, document });
      return 'added';
    }
    const changed = sql`${studies.document} <> ${JSON.stringify(document)}::jsonb`;
    const [updated] = await tx
      .update(studies)
      .set({ ...own, ...figures, summary, version: sql`${studies.version} + 1`, updatedAt: sql`now()` })
      .where(and(eq(studies.slug, slug), studies.isDemo, changed))
      .returning({ id: studies.id, version: studies.version });
    if (updated) {
      await tx.insert(studyVersions).values({ studyId: updated.id, version: updated.version, title, document });
      return 'updated';
    }
    await tx.update(studies).set({ ...figures, summary }).where(and(eq(studies.slug, slug), studies.isDemo));
    return 'unchanged';
  });
}
