import { parseStudy } from '../engine';
import type { Database } from './connect';
import { demoStudies, type DemoStudy } from './demo';
import { demoAccounts } from './demo/accounts';
import { hashPassword } from './password';
import { createUserIfMissing, getCredentials } from './queries/users';
import { upsertDemoStudy } from './queries/studies';

/** Brings the demo studies up to this release. Again changes nothing. */
export async function seedDemoStudies(database: Database, demos: readonly DemoStudy[] = demoStudies): Promise<void> {
  for (const { slug, summary, study } of demos) {
    await upsertDemoStudy(database, { slug, summary, document: parseStudy(study) });
  }
}

/** Adds the demo accounts that are missing; those that exist are left as they are. Only for the cluster on this machine. */
export async function seedDemoAccounts(database: Database): Promise<void> {
  for (const { password, ...account } of demoAccounts) {
    if (await getCredentials(database, account.email)) continue;
    await createUserIfMissing(database, { ...account, passwordHash: await hashPassword(password) });
  }
}
