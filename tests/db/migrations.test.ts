import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { migrateDatabase } from '@/db/migrate';
import { createEmptyDatabase, MIGRATIONS, type TestDatabase } from '../helpers/database';

let db: TestDatabase;
beforeAll(async () => void (db = await createEmptyDatabase()));
afterAll(() => db.drop());

const tables = async () => {
  const { rows } = await db.pool.query<{ table_name: string }>(
    "select table_name from information_schema.tables where table_schema = 'public' order by table_name",
  );
  return rows.map((row) => row.table_name);
};
const applied = async () => (await db.pool.query('select hash from drizzle.__drizzle_migrations')).rows;

describe('migrations', () => {
  it('make every table, and change nothing when run again', async () => {
    expect(await tables()).toEqual([]);
    await migrateDatabase(db.database, MIGRATIONS);
    expect(await tables()).toEqual(['accounts', 'export_jobs', 'sessions', 'studies', 'study_versions', 'users', 'verification_tokens']);
    const first = await applied();
    await migrateDatabase(db.database, MIGRATIONS);
    expect(await applied()).toEqual(first);
  });

  it('refuse what the tables must never hold', async () => {
    const document = '{"format":1}';
    const insert = (columns: string, values: string) => db.pool.query(`insert into ${columns} values (${values})`);
    await expect(insert('users (email)', "'Upper@sesqui.example'")).rejects.toThrow(/users_email_lower_case/);
    await expect(insert('studies (title, document)', `'nobody''s', '${document}'`)).rejects.toThrow(/studies_demo_or_owned/);
    await expect(insert('studies (title, document, is_demo)', `'no slug', '${document}', true`)).rejects.toThrow(/studies_demo_or_owned/);
    await expect(insert('studies (title, document, is_demo, slug, version)', `'x', '${document}', true, 'x', 0`)).rejects.toThrow(/studies_version_from_1/);
  });
});
