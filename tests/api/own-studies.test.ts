import type pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Database } from '@/db/connect';
import { LIMITS } from '@/engine';
import { isKeepable } from '@/lib/schemas/common';
import { PAGE_SIZE, type OwnStudyListWire, type VersionListWire } from '@/lib/schemas/studies';
import type { Reader } from '../helpers/api';
import { ownStudy } from '../helpers/callers';
import { smallStudy } from '../helpers/documents';
import { create, currentOf, keptOf, refusalOf, save, studyOf, versionsOf } from '../helpers/own-study';
import { applicationDatabase, newPerson } from '../helpers/people';
import { rowsOf } from '../helpers/rows';

let database: Database;
let pool: pg.Pool;
beforeAll(() => void ({ database, pool } = applicationDatabase()));
afterAll(() => pool.end());

async function begun(title = 'Towpath') {
  const person = await newPerson(database, 'composer');
  return { ...person, study: (await ownStudy(database, person.id, title)).id };
}

const listOf = async (reader: Reader, query = '') => (await reader.ask(`/api/studies?list=own${query}`)).body as OwnStudyListWire;
const titlesOf = async (reader: Reader, query = '') => (await listOf(reader, query)).studies.map(({ title }) => title);
const rename = (reader: Reader, id: string, title: string, baseVersion: number, saveId?: string) => reader.send('PATCH', `/api/studies/${id}`, { title, baseVersion, saveId });
const remove = (reader: Reader, id: string) => reader.send('DELETE', `/api/studies/${id}`);
const restore = (reader: Reader, id: string) => reader.send('POST', `/api/studies/${id}/restore`);
const copy = (reader: Reader, id: string, body: object = {}) => reader.send('POST', `/api/studies/${id}/copy`, body);

describe('the list of one’s own studies', () => {
  it('is sorted by change, title or length, and looked through by part of the title in either case', async () => {
    const { reader } = await newPerson(database, 'composer');
    const long = smallStudy('b Reed_100%');
    const texts = { 'b Reed_100%': '[1/4]x40', 'A reed': '1/4', 'C Rush': '[1/4]x20' };
    for (const [title, rhythm] of Object.entries(texts)) {
      studyOf(await create(reader, { ...long, title, sections: [{ ...long.sections[0], lines: [{ instrument: 'pots', rhythm }] }] }), 201);
    }
    expect(await titlesOf(reader)).toEqual(['C Rush', 'A reed', 'b Reed_100%']);
    expect(await titlesOf(reader, '&sort=title')).toEqual(['A reed', 'b Reed_100%', 'C Rush']);
    expect(await titlesOf(reader, '&sort=length')).toEqual(['A reed', 'C Rush', 'b Reed_100%']);
    expect(await titlesOf(reader, '&q=REED')).toEqual(['A reed', 'b Reed_100%']);
    expect(await titlesOf(reader, '&q=_')).toEqual(['b Reed_100%']);
    expect(await titlesOf(reader, `&q=${encodeURIComponent('0%')}`)).toEqual(['b Reed_100%']);
    expect(await titlesOf(reader, `&q=${encodeURIComponent('\\')}`)).toEqual([]);
  });

  it('goes on page by page, holds no documents, and a place in it opens nobody else’s', async () => {
    const [person, stranger] = [await newPerson(database, 'composer'), await begun('A stranger’s')];
    const titles = Array.from({ length: PAGE_SIZE + 1 }, (_, i) => `Reed ${String(i).padStart(2, '0')}`);
    for (const title of titles) await ownStudy(database, person.id, title);
    const first = await listOf(person.reader, '&sort=title');
    expect(Object.keys(first.studies[0]!)).not.toContain('document');
    const next = `&sort=title&cursor=${first.nextCursor}`;
    const second = await listOf(person.reader, next);
    expect([...first.studies, ...second.studies].map(({ title }) => title)).toEqual(titles);
    expect([first.studies.length, second.nextCursor]).toEqual([PAGE_SIZE, null]);
    expect((await listOf(stranger.reader, next)).studies).toEqual([]);
  });
});

describe('renaming', () => {
  it('is a new version with the title in row, document and list, and nothing else changed', async () => {
    const { reader, study } = await begun();
    const saveId = crypto.randomUUID();
    for (let again = 0; again < 2; again += 1) {
      expect(studyOf(await rename(reader, study, '  Otter ', 1, saveId))).toMatchObject({ version: 2, title: 'Otter', document: smallStudy('Otter') });
    }
    expect(await keptOf(pool, study)).toEqual({ version: 2, document: smallStudy('Otter'), versions: [[1, smallStudy('Towpath')], [2, smallStudy('Otter')]] });
    expect([await titlesOf(reader), await versionsOf(reader, study)]).toEqual([['Otter'], [[2, 'Otter'], [1, 'Towpath']]]);
  });

  it('on top of an old version is refused', async () => {
    const { id, reader, study } = await begun();
    studyOf(await save(reader, study, smallStudy('Reed'), 1));
    const before = await rowsOf(pool, id);
    const answer = await rename(reader, study, 'Otter', 1);
    expect([refusalOf(answer), currentOf(answer)]).toMatchObject([[409, 'version_conflict'], { version: 2, title: 'Reed' }]);
    expect(await rowsOf(pool, id)).toEqual(before);
  });
});

describe('copying', () => {
  it('makes a study of its own, of one version, and leaves the other as it is', async () => {
    const { reader, study } = await begun();
    studyOf(await save(reader, study, smallStudy('Reed'), 1));
    const before = await keptOf(pool, study);
    const made = studyOf(await copy(reader, study), 201);
    expect(made).toMatchObject({ title: 'Reed (copy)', version: 1, isDemo: false, slug: null, document: smallStudy('Reed (copy)') });
    expect((await keptOf(pool, made.id)).versions).toEqual([[1, smallStudy('Reed (copy)')]]);
    studyOf(await save(reader, made.id, smallStudy('Otter'), 1));
    expect(await keptOf(pool, study)).toEqual(before);
  });

  it('takes a demo, a title, and the same copy twice as one', async () => {
    const { reader } = await newPerson(database, 'student');
    const body = { title: 'My gates', saveId: crypto.randomUUID() };
    const [once, twice] = [studyOf(await copy(reader, 'lock-gates', body), 201), studyOf(await copy(reader, 'lock-gates', body), 201)];
    expect([once.id, once.title, once.isDemo]).toEqual([twice.id, 'My gates', false]);
    expect(await titlesOf(reader)).toEqual(['My gates']);
  });

  it.each([['letters', 'x'.repeat(LIMITS.name)], ['signs of two halves', '𝄞'.repeat(LIMITS.name / 2)], ['a sign cut in two', `x${'𝄞'.repeat((LIMITS.name - 2) / 2)}`]])('keeps a title of %s within its limit', async (_, title) => {
    const { reader, study } = await begun(title);
    const made = studyOf(await copy(reader, study), 201);
    expect(made.title.endsWith(' (copy)') && title.startsWith(made.title.slice(0, -' (copy)'.length))).toBe(true);
    expect([made.title.length <= LIMITS.name, isKeepable(made.title)]).toEqual([true, true]);
  });

  it('is refused without a title where one is given', async () => {
    const { id, reader, study } = await begun();
    const before = await rowsOf(pool, id);
    expect(refusalOf(await copy(reader, study, { title: ' ' }))).toEqual([422, 'invalid', { title: 'A title is missing.' }]);
    expect(await rowsOf(pool, id)).toEqual(before);
  });
});

describe('throwing away and bringing back', () => {
  it('takes a study out of every list but one, and brings it back with every version', async () => {
    const { reader, study } = await begun();
    studyOf(await save(reader, study, smallStudy('Reed'), 1));
    const before = await keptOf(pool, study);
    expect((await remove(reader, study)).body).toMatchObject({ study: { id: study, title: 'Reed', deletedAt: expect.any(String) } });
    expect([await titlesOf(reader), await titlesOf(reader, '&deleted=true')]).toEqual([[], ['Reed']]);
    const gone = [await reader.ask(`/api/studies/${study}`), await save(reader, study, smallStudy(), 2), await rename(reader, study, 'Otter', 2), await remove(reader, study)];
    expect(gone.map(refusalOf)).toEqual(Array.from(gone, () => [404, 'not_found']));
    expect((await restore(reader, study)).body).toMatchObject({ study: { id: study, title: 'Reed', version: 2, deletedAt: null } });
    expect([await titlesOf(reader), await titlesOf(reader, '&deleted=true')]).toEqual([['Reed'], []]);
    expect([await keptOf(pool, study), refusalOf(await restore(reader, study))]).toEqual([before, [404, 'not_found']]);
    expect(studyOf(await save(reader, study, smallStudy('Otter'), 2)).version).toBe(3);
  });

  const threwAway = async (ago: string) => {
    const person = await begun();
    await remove(person.reader, person.study);
    await pool.query('update studies set deleted_at = now() - $2::interval where id = $1', [person.study, ago]);
    return person;
  };

  it('can be undone up to thirty days later', async () => {
    const { reader, study } = await threwAway('29 days 23 hours 59 minutes');
    expect(await titlesOf(reader, '&deleted=true')).toEqual(['Towpath']);
    expect([(await restore(reader, study)).status, await titlesOf(reader)]).toEqual([200, ['Towpath']]);
  });

  it('cannot be undone after thirty days', async () => {
    const { id, reader, study } = await threwAway('30 days 1 second');
    const before = await rowsOf(pool, id);
    expect(await titlesOf(reader, '&deleted=true')).toEqual([]);
    expect([refusalOf(await restore(reader, study)), await rowsOf(pool, id)]).toEqual([[404, 'not_found'], before]);
  });
});

describe('kept versions', () => {
  it('are listed page by page, the newest first, without documents, and each opens whole', async () => {
    const { reader, study } = await begun('Reed 1');
    for (let version = 2; version <= PAGE_SIZE + 1; version += 1) studyOf(await save(reader, study, smallStudy(`Reed ${version}`), version - 1));
    const page = async (cursor: string) => (await reader.ask(`/api/studies/${study}/versions${cursor}`)).body as VersionListWire;
    const first = await page('');
    const second = await page(`?cursor=${first.nextCursor}`);
    expect([first.versions.length, second.versions.map(({ version }) => version), second.nextCursor]).toEqual([PAGE_SIZE, [1], null]);
    const all = [...first.versions, ...second.versions];
    expect(all.map(({ version, title }) => [version, title])).toEqual(all.map((_, i) => [PAGE_SIZE + 1 - i, `Reed ${PAGE_SIZE + 1 - i}`]));
    for (const one of all) expect(Object.keys(one)).toEqual(['version', 'createdAt', 'title']);
    for (const version of [1, 17, PAGE_SIZE + 1]) {
      const { body } = await reader.ask(`/api/studies/${study}/versions/${version}`);
      expect(body).toEqual({ version: { version, createdAt: expect.any(String), title: `Reed ${version}`, document: smallStudy(`Reed ${version}`) } });
    }
    expect(refusalOf(await reader.ask(`/api/studies/${study}/versions/${PAGE_SIZE + 2}`))).toEqual([404, 'not_found']);
  });

  it('are told of a demo by its readable name too', async () => {
    const { reader } = await newPerson(database, 'student');
    expect(await versionsOf(reader, 'lock-gates')).toEqual([[1, 'Lock Gates']]);
    expect((await reader.ask('/api/studies/lock-gates/versions/1')).body).toMatchObject({ version: { version: 1, document: { title: 'Lock Gates' } } });
  });
});
