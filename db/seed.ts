import { count, eq } from 'drizzle-orm';
import { EngineError, parseStudy } from '../engine';
import type { Database } from './connect';
import { demoStudies, type DemoStudy } from './demo';
import { demoAccounts } from './demo/accounts';
import { studyFigures } from './figures';
import { hashPassword } from './password';
import { createStudy } from './queries/save-study';
import { upsertDemoStudy } from './queries/studies';
import { createUserIfMissing, getCredentials } from './queries/users';
import { studies } from './schema';

/** Brings the demo studies up to this release. Again changes nothing. */
export async function seedDemoStudies(database: Database, demos: readonly DemoStudy[] = demoStudies): Promise<void> {
  for (const { slug, summary, study } of demos) {
    await upsertDemoStudy(database, { slug, summary, document: parseStudy(study) });
  }
}

/** Works out the figures of studies that were saved before there were any; what cannot be built any more is left without. */
export async function fillFigures(database: Database): Promise<void> {
  const bare = await database.select({ id: studies.id }).from(studies).where(eq(studies.measures, ''));
  for (const { id } of bare) {
    const [row] = await database.select({ document: studies.document }).from(studies).where(eq(studies.id, id));
    try {
      if (row) await database.update(studies).set(studyFigures(row.document)).where(eq(studies.id, id));
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
    }
  }
}

/** The demo composer's own list, where it is empty: two of the demo studies, to be changed at will. */
async function seedOwnStudies(database: Database, userId: string): Promise<void> {
  const [own] = await database.select({ studies: count() }).from(studies).where(eq(studies.ownerId, userId));
  if (own && own.studies > 0) return;
  for (const { study } of demoStudies.slice(0, 2)) {
    await createStudy(database, { userId, document: parseStudy({ ...study, title: `${study.title}, my sketch` }) });
  }
}

/**
 * Adds the demo accounts that are missing, and an empty list's two studies for the composer; accounts that exist are left as
 * they are. Only for the cluster on this machine.
 */
export async function seedDemoAccounts(database: Database): Promise<void> {
  for (const { password, ...account } of demoAccounts) {
    if (!(await getCredentials(database, account.email))) await createUserIfMissing(database, { ...account, passwordHash: await hashPassword(password) });
    const made = account.role === 'composer' ? await getCredentials(database, account.email) : undefined;
    if (made) await seedOwnStudies(database, made.id);
  }
}
