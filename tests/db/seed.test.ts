import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { demoStudies } from '@/db/demo';
import { demoAccounts } from '@/db/demo/accounts';
import { verifyPassword } from '@/db/password';
import { getStudy } from '@/db/queries/studies';
import { getCredentials } from '@/db/queries/users';
import { seedDemoAccounts, seedDemoStudies } from '@/db/seed';
import { parseStudy } from '@/engine';
import { createEmptyDatabase, createTestDatabase, type TestDatabase } from '../helpers/database';

let db: TestDatabase;
beforeAll(async () => void (db = await createTestDatabase()));
afterAll(() => db.drop());

const contents = async ({ pool }: TestDatabase) => ({
  studies: (await pool.query('select * from studies order by slug')).rows,
  versions: (await pool.query('select * from study_versions order by study_id, version')).rows,
  users: (await pool.query('select * from users order by email')).rows,
});

describe('the demo', () => {
  it('is seeded, and a second time changes nothing', async () => {
    await seedDemoStudies(db.database);
    await seedDemoAccounts(db.database);
    const first = await contents(db);
    const demos = first.studies.filter((row) => row.is_demo);
    expect(demos.map((row) => row.slug)).toEqual(demoStudies.map((demo) => demo.slug).sort());
    expect(first.versions).toHaveLength(demoStudies.length + 2);
    expect(first.users).toHaveLength(demoAccounts.length);
    await seedDemoStudies(db.database);
    await seedDemoAccounts(db.database);
    expect(await contents(db)).toEqual(first);
  });

  it.each(demoStudies)('$slug comes back as it was written', async ({ slug, study }) => {
    expect((await getStudy(db.database, { id: slug, userId: null }))!.document).toEqual(parseStudy(study));
  });

  it('has an account for each role, whose password opens it', async () => {
    expect(demoAccounts.map((account) => account.role).sort()).toEqual(['administrator', 'composer', 'student', 'teacher']);
    for (const { email, password } of demoAccounts) {
      expect(email).toMatch(/@sesqui\.example$/);
      expect(password.length).toBeGreaterThanOrEqual(12);
      expect(await verifyPassword(password, (await getCredentials(db.database, email))!.passwordHash)).toBe(true);
    }
  });
});

describe('a database elsewhere', () => {
  it('gets the demo studies by npm run db:seed, and no demo accounts', async () => {
    const elsewhere = await createEmptyDatabase();
    try {
      const env = { ...process.env, DATABASE_URL: elsewhere.url };
      const { stdout } = await promisify(execFile)(process.execPath, ['scripts/db.mjs', 'seed'], { env });
      expect(stdout).toContain('The demo is in the database.');
      const { studies, users } = await contents(elsewhere);
      expect(studies).toHaveLength(demoStudies.length);
      expect(users).toEqual([]);
    } finally {
      await elsewhere.drop();
    }
  });
});
