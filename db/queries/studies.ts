import { and, asc, eq, isNull, or, sql } from 'drizzle-orm';
import type { Study } from '../../engine';
import type { Database } from '../connect';
import { studies, studyVersions } from '../schema';

const UUID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;

/** The demo studies, in order of title, without their documents. */
export async function listDemoStudies(database: Database) {
  return database
    .select({
      id: studies.id,
      slug: studies.slug,
      title: studies.title,
      summary: studies.summary,
      version: studies.version,
      updatedAt: studies.updatedAt,
    })
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
  const named = UUID.test(id) ? eq(studies.id, id) : eq(studies.slug, id);
  const allowed = userId === null ? studies.isDemo : or(studies.isDemo, eq(studies.ownerId, userId));
  const [row] = await database
    .select({
      id: studies.id,
      slug: studies.slug,
      title: studies.title,
      version: studies.version,
      document: studies.document,
      updatedAt: studies.updatedAt,
      isDemo: studies.isDemo,
    })
    .from(studies)
    .where(and(named, isNull(studies.deletedAt), allowed));
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
  const values = { title: document.title, summary, document, format: document.format };
  return database.transaction(async (tx) => {
    const [added] = await tx
      .insert(studies)
      .values({ ...values, slug, isDemo: true })
      .onConflictDoNothing({ target: studies.slug })
      .returning({ id: studies.id, version: studies.version });
    if (added) {
      await tx.insert(studyVersions).values({ studyId: added.id, version: added.version, document });
      return 'added';
    }
    const changed = sql`${studies.document} <> ${JSON.stringify(document)}::jsonb`;
    const [updated] = await tx
      .update(studies)
      .set({ ...values, version: sql`${studies.version} + 1`, updatedAt: sql`now()` })
      .where(and(eq(studies.slug, slug), studies.isDemo, changed))
      .returning({ id: studies.id, version: studies.version });
    if (updated) {
      await tx.insert(studyVersions).values({ studyId: updated.id, version: updated.version, document });
      return 'updated';
    }
    await tx.update(studies).set({ summary }).where(and(eq(studies.slug, slug), studies.isDemo));
    return 'unchanged';
  });
}
