import type pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Database } from '@/db/connect';
import type { OwnStudyListWire } from '@/lib/schemas/studies';
import { smallStudy } from '../helpers/documents';
import { create, currentOf, keptOf, refusalOf, save, studyOf, versionsOf } from '../helpers/own-study';
import { applicationDatabase, newPerson, type Person } from '../helpers/people';
import { rowsOf } from '../helpers/rows';

let database: Database;
let pool: pg.Pool;
beforeAll(() => void ({ database, pool } = applicationDatabase()));
afterAll(() => pool.end());

const [first, second, third] = [smallStudy('Reed'), smallStudy('Reed and rush'), smallStudy('Reed, rush and sedge')];
const newComposer = () => newPerson(database, 'composer');

/** A composer with one study of one version. */
async function begun() {
  const person = await newComposer();
  const saveId = crypto.randomUUID();
  const { id } = studyOf(await create(person.reader, first, saveId), 201);
  return { ...person, study: id, saveId };
}

/** Does it, and says whether any row of the account changed. */
async function changing<T>({ id }: Person, work: () => Promise<T>): Promise<[T, boolean]> {
  const before = await rowsOf(pool, id);
  const answer = await work();
  return [answer, JSON.stringify(await rowsOf(pool, id)) !== JSON.stringify(before)];
}

const listed = async ({ reader }: Person) => ((await reader.ask('/api/studies?list=own')).body as OwnStudyListWire).studies.map(({ title, version }) => [title, version]);

describe('a save', () => {
  it('keeps every version whole, and the last as the study', async () => {
    const { reader, study } = await begun();
    expect(studyOf(await save(reader, study, second, 1))).toMatchObject({ id: study, title: second.title, version: 2, document: second, isDemo: false });
    expect(studyOf(await save(reader, study, third, 2))).toMatchObject({ version: 3, document: third });
    expect(await keptOf(pool, study)).toEqual({ version: 3, document: third, versions: [[1, first], [2, second], [3, third]] });
    expect(await versionsOf(reader, study)).toEqual([[3, third.title], [2, second.title], [1, first.title]]);
  });

  it.each([1, 3, 2_000_000_000])('on top of version %i is refused where version 2 is the last, and hands over that one', async (baseVersion) => {
    const person = await begun();
    studyOf(await save(person.reader, person.study, second, 1));
    const [answer, isChanged] = await changing(person, () => save(person.reader, person.study, third, baseVersion));
    expect([refusalOf(answer), isChanged]).toEqual([[409, 'version_conflict'], false]);
    expect(currentOf(answer)).toMatchObject({ id: person.study, version: 2, title: second.title, document: second });
    expect((await keptOf(pool, person.study)).versions).toEqual([[1, first], [2, second]]);
    expect(studyOf(await save(person.reader, person.study, third, 2)).version).toBe(3);
  });

  it('of eight that start from one version at once goes through once, and the others are told', async () => {
    const { reader, study } = await begun();
    const documents = Array.from({ length: 8 }, (_, i) => smallStudy(`Reed ${i}`));
    const answers = await Promise.all(documents.map((document) => save(reader, study, document, 1)));
    const won = answers.findIndex(({ status }) => status === 200);
    expect(answers.map(({ status }) => status)).toEqual(documents.map((_, i) => (i === won ? 200 : 409)));
    for (const answer of answers.filter((_, i) => i !== won)) expect(currentOf(answer).document).toEqual(documents[won]);
    expect(await keptOf(pool, study)).toEqual({ version: 2, document: documents[won], versions: [[1, first], [2, documents[won]]] });
  });
});

describe('a save that is sent again', () => {
  it('is answered as it was, and kept once; also after a later one', async () => {
    const person = await begun();
    const { reader, study } = person;
    const saveId = crypto.randomUUID();
    const answer = await save(reader, study, second, 1, saveId);
    const [again, isChanged] = await changing(person, () => save(reader, study, second, 1, saveId));
    expect([again.status, again.body, isChanged]).toEqual([200, answer.body, false]);
    studyOf(await save(reader, study, third, 2));
    const [later, isChangedLater] = await changing(person, () => save(reader, study, second, 1, saveId));
    expect([later.status, later.body, isChangedLater]).toEqual([200, answer.body, false]);
    expect((await versionsOf(reader, study)).length).toBe(3);
  });

  it('eight times at once is kept once', async () => {
    const { reader, study } = await begun();
    const saveId = crypto.randomUUID();
    const answers = await Promise.all(Array.from({ length: 8 }, () => save(reader, study, second, 1, saveId)));
    for (const answer of answers) expect(studyOf(answer)).toMatchObject({ version: 2, document: second });
    expect((await keptOf(pool, study)).versions).toEqual([[1, first], [2, second]]);
  });

  it('with its keys in another order is the same', async () => {
    const { reader, study } = await begun();
    const saveId = crypto.randomUUID();
    studyOf(await save(reader, study, second, 1, saveId));
    const turned = Object.fromEntries(Object.entries(second).reverse());
    expect(studyOf(await save(reader, study, turned, 1, saveId)).version).toBe(2);
  });

  it('with another document, or for another study, is refused', async () => {
    const person = await begun();
    const other = studyOf(await create(person.reader, first), 201).id;
    const saveId = crypto.randomUUID();
    studyOf(await save(person.reader, person.study, second, 1, saveId));
    for (const [id, document, baseVersion] of [[person.study, third, 1], [person.study, third, 2], [other, second, 1]] as const) {
      const [answer, isChanged] = await changing(person, () => save(person.reader, id, document, baseVersion, saveId));
      expect([refusalOf(answer), isChanged]).toEqual([[409, 'save_id_used'], false]);
    }
    const [made, isChanged] = await changing(person, () => create(person.reader, second, saveId));
    expect([refusalOf(made), isChanged]).toEqual([[409, 'save_id_used'], false]);
  });

  it('after the study was thrown away brings nothing back', async () => {
    const person = await begun();
    const saveId = crypto.randomUUID();
    studyOf(await save(person.reader, person.study, second, 1, saveId));
    expect((await person.reader.send('DELETE', `/api/studies/${person.study}`)).status).toBe(200);
    for (const again of [() => save(person.reader, person.study, second, 1, saveId), () => create(person.reader, first, person.saveId)]) {
      const [answer, isChanged] = await changing(person, again);
      expect([refusalOf(answer), isChanged]).toEqual([[404, 'not_found'], false]);
    }
  });
});

describe('a new study that is sent again', () => {
  it('is made once, however often and however much at once', async () => {
    const person = await newComposer();
    const saveId = crypto.randomUUID();
    const answers = await Promise.all(Array.from({ length: 8 }, () => create(person.reader, first, saveId)));
    const ids = new Set(answers.map((answer) => studyOf(answer, 201).id));
    expect([ids.size, await listed(person)]).toEqual([1, [[first.title, 1]]]);
  });

  it('is told as it was made, though it has been saved since; another document is refused', async () => {
    const person = await begun();
    studyOf(await save(person.reader, person.study, second, 1));
    const [again, isChanged] = await changing(person, () => create(person.reader, first, person.saveId));
    expect([studyOf(again, 201), isChanged]).toMatchObject([{ id: person.study, version: 1, document: first }, false]);
    const [other, isChangedToo] = await changing(person, () => create(person.reader, third, person.saveId));
    expect([refusalOf(other), isChangedToo]).toEqual([[409, 'save_id_used'], false]);
  });
});

describe('a save with what is another’s', () => {
  it('does not see the other’s save of the same id', async () => {
    const [owner, stranger] = [await begun(), await newComposer()];
    const before = await rowsOf(pool, owner.id);
    expect(refusalOf(await save(stranger.reader, owner.study, first, 1, owner.saveId))).toEqual([404, 'not_found']);
    const made = studyOf(await create(stranger.reader, first, owner.saveId), 201);
    expect(made.id).not.toBe(owner.study);
    const saveId = crypto.randomUUID();
    studyOf(await save(stranger.reader, made.id, second, 1, saveId));
    expect(await rowsOf(pool, owner.id)).toEqual(before);
    expect(studyOf(await save(owner.reader, owner.study, third, 1, saveId))).toMatchObject({ id: owner.study, version: 2, document: third });
    expect((await keptOf(pool, made.id)).versions).toEqual([[1, first], [2, second]]);
  });

  it.each(['ownerId', 'userId', 'owner_id', 'isDemo', 'slug', 'version', 'savedBy'])('is refused with a %s in its body', async (key) => {
    const [owner, stranger] = [await begun(), await begun()];
    const body = { document: second, saveId: crypto.randomUUID(), [key]: owner.id };
    for (const [method, path, sent] of [['POST', '/api/studies', body], ['PUT', `/api/studies/${stranger.study}`, { ...body, baseVersion: 1 }]] as const) {
      const [answer, isChanged] = await changing(stranger, () => stranger.reader.send(method, path, sent));
      expect([answer.status, isChanged]).toEqual([422, false]);
    }
    expect((await keptOf(pool, owner.study)).versions).toEqual([[1, first]]);
  });
});
