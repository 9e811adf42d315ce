import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { getStudy, listDemoStudies, upsertDemoStudy } from '@/db/queries/studies';
import { studies, studyVersions, users } from '@/db/schema';
import { createTestDatabase, type TestDatabase } from '../helpers/database';
import { smallStudy } from '../helpers/documents';

let db: TestDatabase;
let owner: string;
let stranger: string;
let own: string;

beforeAll(async () => {
  db = await createTestDatabase();
  const [a, b] = await db.database
    .insert(users)
    .values([{ email: 'a@sesqui.example' }, { email: 'b@sesqui.example' }])
    .returning({ id: users.id });
  [owner, stranger] = [a!.id, b!.id];
  const document = smallStudy('Towpath');
  const [study] = await db.database.insert(studies).values({ ownerId: owner, title: document.title, document }).returning({ id: studies.id });
  own = study!.id;
  await upsertDemoStudy(db.database, { slug: 'weir', summary: 'One.', document: smallStudy('Weir') });
  await upsertDemoStudy(db.database, { slug: 'basin', summary: 'Two.', document: smallStudy('Basin') });
});
afterAll(() => db.drop());

describe('listDemoStudies', () => {
  it('lists demo studies only, by title', async () => {
    const list = await listDemoStudies(db.database);
    expect(list.map(({ slug, title, summary, version }) => ({ slug, title, summary, version }))).toEqual([
      { slug: 'basin', title: 'Basin', summary: 'Two.', version: 1 },
      { slug: 'weir', title: 'Weir', summary: 'One.', version: 1 },
    ]);
  });
});

describe('getStudy', () => {
  it('finds a demo for anybody, by slug and by id, its document whole', async () => {
    const bySlug = await getStudy(db.database, { id: 'weir', userId: null });
    expect(bySlug).toMatchObject({ title: 'Weir', version: 1, isDemo: true, document: smallStudy('Weir') });
    expect(await getStudy(db.database, { id: bySlug!.id, userId: stranger })).toEqual(bySlug);
  });

  it('finds a study of one’s own for its owner only', async () => {
    expect(await getStudy(db.database, { id: own, userId: owner })).toMatchObject({ title: 'Towpath', isDemo: false });
    expect(await getStudy(db.database, { id: own, userId: stranger })).toBeUndefined();
    expect(await getStudy(db.database, { id: own, userId: null })).toBeUndefined();
  });

  it.each(['nothing', '00000000-0000-4000-8000-000000000000', '', "weir' or true --"])('finds nothing for “%s”', async (id) => {
    expect(await getStudy(db.database, { id, userId: owner })).toBeUndefined();
  });

  it('does not find what has been thrown away', async () => {
    const document = smallStudy('Gone');
    const [gone] = await db.database
      .insert(studies)
      .values({ ownerId: owner, title: 'Gone', document, deletedAt: new Date('2026-01-01') })
      .returning({ id: studies.id });
    expect(await getStudy(db.database, { id: gone!.id, userId: owner })).toBeUndefined();
  });
});

describe('upsertDemoStudy', () => {
  const versionsOf = async (slug: string) => {
    const study = await getStudy(db.database, { id: slug, userId: null });
    const rows = await db.database.select().from(studyVersions);
    return rows.filter((row) => row.studyId === study!.id).sort((a, b) => a.version - b.version);
  };

  it('adds once, leaves alone what has not changed, and keeps every version of what has', async () => {
    const save = (title: string, summary: string) =>
      upsertDemoStudy(db.database, { slug: 'lockside', summary, document: smallStudy(title) });
    expect(await save('Lockside', 'First.')).toBe('added');
    const before = await getStudy(db.database, { id: 'lockside', userId: null });
    expect(await save('Lockside', 'First.')).toBe('unchanged');
    expect(await getStudy(db.database, { id: 'lockside', userId: null })).toEqual(before);
    expect(await save('Lockside at night', 'Second.')).toBe('updated');
    const after = await getStudy(db.database, { id: 'lockside', userId: null });
    expect(after).toMatchObject({ id: before!.id, title: 'Lockside at night', version: 2 });
    expect(after!.updatedAt.getTime()).toBeGreaterThan(before!.updatedAt.getTime());
    expect((await versionsOf('lockside')).map((row) => [row.version, row.document.title])).toEqual([
      [1, 'Lockside'],
      [2, 'Lockside at night'],
    ]);
  });

  it('takes a new summary without a new version', async () => {
    const save = (summary: string) => upsertDemoStudy(db.database, { slug: 'weir', summary, document: smallStudy('Weir') });
    expect(await save('Another sentence.')).toBe('unchanged');
    const listed = (await listDemoStudies(db.database)).find((study) => study.slug === 'weir');
    expect(listed).toMatchObject({ summary: 'Another sentence.', version: 1 });
  });
});
