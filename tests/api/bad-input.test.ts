import { eq } from 'drizzle-orm';
import type pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Database } from '@/db/connect';
import { users } from '@/db/schema';
import type { Study } from '@/engine';
import { Reader } from '../helpers/api';
import { ownStudy } from '../helpers/callers';
import { smallStudy } from '../helpers/documents';
import { create, refusalOf, save } from '../helpers/own-study';
import { applicationDatabase, newPerson } from '../helpers/people';
import { rowsOf } from '../helpers/rows';

let database: Database;
let pool: pg.Pool;
beforeAll(() => void ({ database, pool } = applicationDatabase()));
afterAll(() => pool.end());

const unkeepable = 'holds a character that cannot be kept: type it again.';
const noAddress = 'An e-mail address has an @ with something before and after it.';
const guessed = 'This password is among the first that anybody would guess: choose another.';

describe('registering', () => {
  const email = `${crypto.randomUUID()}@sesqui.example`;
  const good = { name: 'Heron', email, password: 'osier-lock-9-pond', role: 'student' };

  it.each<[string, object, Record<string, string>]>([
    ['an address without @', { email: 'heron.sesqui.example' }, { email: noAddress }],
    ['an address of two @', { email: 'heron@@sesqui.example' }, { email: noAddress }],
    ['an address with a line break', { email: 'heron@sesqui.example\nbcc: all' }, { email: noAddress }],
    ['an address of 300 characters', { email: `${'x'.repeat(285)}@sesqui.example` }, { email: 'An e-mail address has at most 254 characters.' }],
    ['an address with a zero character', { email: 'her\0on@sesqui.example' }, { email: noAddress }],
    ['an address with half a character', { email: 'her\ud800on@sesqui.example' }, { email: noAddress }],
    ['no address', { email: undefined }, { email: 'An e-mail address is text.' }],
    ['a password of 7 characters', { password: 'osier-9' }, { password: 'A password has at least 8 characters.' }],
    ['a password of 5,000 characters', { password: 'osier'.repeat(1_000) }, { password: 'A password has at most 128 characters.' }],
    ['a password that all know', { password: 'PassWord1' }, { password: guessed }],
    ['a password of one letter', { password: 'xxxxxxxxxxxx' }, { password: guessed }],
    ['its address as the password', { password: email.toUpperCase() }, { password: 'A password must not be the e-mail address itself: choose another.' }],
    ['a password with a zero character', { password: 'osier\0lock-9-pond' }, { password: 'This password holds a character that cannot be typed again: choose another.' }],
    ['a password with half a character', { password: 'osier\udc00lock-9-pond' }, { password: 'This password holds a character that cannot be typed again: choose another.' }],
    ['a number as the password', { password: 12_345_678 }, { password: 'A password is text.' }],
    ['no name', { name: ' \t ' }, { name: 'A name is missing.' }],
    ['a name of 101 characters', { name: 'x'.repeat(101) }, { name: 'A name has at most 100 characters.' }],
    ['a name of 400 characters', { name: 'x'.repeat(400) }, { name: 'A name has at most 100 characters.' }],
    ['a name of 401 characters', { name: 'x'.repeat(401) }, { name: 'A name has at most 100 characters.' }],
    ['a name with a zero character', { name: 'He\0ron' }, { name: `A name ${unkeepable}` }],
    ['a name with half a character', { name: 'He\ud83dron' }, { name: `A name ${unkeepable}` }],
    ['an invented role', { role: 'owner' }, { role: 'Choose composer, teacher or student.' }],
  ])('with %s is refused, naming the field', async (_, changes, fields) => {
    const answer = await new Reader().send('POST', '/api/register', { ...good, ...changes });
    expect(refusalOf(answer)).toEqual([422, 'invalid', fields]);
    expect(await database.select().from(users).where(eq(users.email, email))).toEqual([]);
  });

  it.each([['nothing', 'null'], ['a list', '[]'], ['a text', '"x"'], ['more than is asked', JSON.stringify({ ...good, id: 'x' })]])('with %s is refused', async (_, body) => {
    expect(refusalOf(await new Reader().send('POST', '/api/register', body)).slice(0, 2)).toEqual([422, 'invalid']);
  });

  it.each([['nothing at all', ''], ['half an object', '{"name":'], ['no JSON', 'name=Heron']])('with %s cannot be read', async (_, body) => {
    expect(refusalOf(await new Reader().send('POST', '/api/register', body))).toEqual([400, 'unreadable']);
  });
});

/** A composer with a study, and whether a request leaves all of it as it was. */
async function refusing(ask: (reader: Reader, study: string) => Promise<Awaited<ReturnType<Reader['send']>>>) {
  const person = await newPerson(database, 'composer');
  const { id } = await ownStudy(database, person.id);
  const before = await rowsOf(pool, person.id);
  const answer = refusalOf(await ask(person.reader, id));
  expect(await rowsOf(pool, person.id)).toEqual(before);
  return answer;
}

describe('changing one’s account', () => {
  it.each<[string, object, Record<string, string>]>([
    ['no name', { name: '' }, { name: 'A name is missing.' }],
    ['a name of 400 characters', { name: 'x'.repeat(400) }, { name: 'A name has at most 100 characters.' }],
    ['a name with a zero character', { name: '\0' }, { name: `A name ${unkeepable}` }],
    ['names of values from elsewhere', { valueNames: 'german' }, { valueNames: 'Names of values are american or british.' }],
    ['a paper of another size', { paperSize: 'a3' }, { paperSize: 'Paper is a4 or letter.' }],
    ['nothing to change', {}, { '': 'Say what is to change.' }],
  ])('to %s is refused, naming the field', async (_, body, fields) => {
    expect(await refusing((reader) => reader.send('PATCH', '/api/account', body))).toEqual([422, 'invalid', fields]);
  });
});

describe('renaming', () => {
  it.each<[string, object, Record<string, string>]>([
    ['nothing', { title: '' }, { title: 'A title is missing.' }],
    ['spaces', { title: '   ' }, { title: 'A title is missing.' }],
    ['201 characters', { title: 'x'.repeat(201) }, { title: 'A title has at most 200 characters.' }],
    ['a zero character', { title: 'Ot\0ter' }, { title: `A title ${unkeepable}` }],
    ['half a character', { title: 'Ot\ud800ter' }, { title: `A title ${unkeepable}` }],
    ['a version as text', { baseVersion: '1' }, { baseVersion: 'A version is a whole number.' }],
    ['a version 0', { baseVersion: 0 }, { baseVersion: 'Versions count from 1.' }],
    ['half a version', { baseVersion: 1.5 }, { baseVersion: 'A version is a whole number.' }],
    ['a version beyond counting', { baseVersion: 2_000_000_001 }, { baseVersion: 'There is no such version.' }],
    ['a save without an id', { saveId: 'x' }, { saveId: 'This id cannot be read.' }],
  ])('with %s is refused, naming the field', async (_, changes, fields) => {
    const answer = await refusing((reader, study) => reader.send('PATCH', `/api/studies/${study}`, { title: 'Otter', baseVersion: 1, ...changes }));
    expect(answer).toEqual([422, 'invalid', fields]);
  });
});

describe('a document', () => {
  const study = smallStudy();
  const named = (name: string): Study => ({ ...study, instruments: study.instruments.map((one) => ({ ...one, name })) });

  it.each<[string, unknown, string, string | null]>([
    ['nothing', null, 'invalid_document', null],
    ['a text', 'Weir', 'invalid_document', null],
    ['a list', [study], 'invalid_document', null],
    ['one of format 2', { ...study, format: 2 }, 'invalid_document', 'format'],
    ['one of format 1 written out', { ...study, format: '1' }, 'invalid_document', 'format'],
    ['one without a title', { ...study, title: '' }, 'invalid_document', 'title'],
    ['one with a long title', { ...study, title: 'x'.repeat(201) }, 'too_large', 'title'],
    ['one with a zero character in its title', { ...study, title: 'We\0ir' }, 'invalid', 'title'],
    ['one with half a character in its title', { ...study, title: 'We\ud800ir' }, 'invalid', 'title'],
    ['one with a zero character deep inside', named('Po\0ts'), 'invalid', 'instruments.0.name'],
    ['one with half a character deep inside', named('Po\udfffts'), 'invalid', 'instruments.0.name'],
    ['one without sections', { ...study, sections: [] }, 'invalid_document', 'sections'],
  ])('that is %s is neither made nor saved', async (_, document, code, path) => {
    for (const ask of [(reader: Reader) => create(reader, document), (reader: Reader, id: string) => save(reader, id, document, 1)]) {
      const [status, said, fields] = await refusing(ask);
      expect([status, said, Object.keys(fields ?? {})]).toEqual([422, code, path === null ? [] : [path]]);
    }
  });

  it('of another format is told so', async () => {
    const [, , fields] = await refusing((reader, id) => save(reader, id, { ...study, format: 2 }, 1));
    expect(fields).toEqual({ format: 'Another version of Sesqui wrote this study (format 2), and this one cannot read it. What was saved before is kept as it was.' });
  });
});

describe('an address', () => {
  it.each([
    ['/api/studies?list=everybody', 'list'],
    ['/api/studies?list=own&sort=owner', 'sort'],
    ['/api/studies?list=own&deleted=yes', 'deleted'],
    [`/api/studies?list=own&q=${'x'.repeat(101)}`, 'q'],
    ['/api/studies?list=own&q=%00', 'q'],
    ['/api/studies/lock-gates/versions/0', 'version'],
    ['/api/studies/lock-gates/versions/1.5', 'version'],
    ['/api/studies/lock-gates/versions/x', 'version'],
    ['/api/studies/lock-gates/versions/9999999999', 'version'],
  ])('%s is refused, naming the part', async (path, field) => {
    const [status, code, fields] = await refusing((reader) => reader.ask(path));
    expect([status, code, Object.keys(fields ?? {})]).toEqual([422, 'invalid', [field]]);
  });
});
