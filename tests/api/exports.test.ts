import { unzipSync } from 'fflate';
import type pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { demoStudies } from '@/db/demo';
import type { Database } from '@/db/connect';
import { createStudy } from '@/db/queries/save-study';
import { buildStudy, parseStudy, statementsCsv, type Study, toMidi, toMusicXML } from '@/engine';
import { EXPORT_TOKEN, type ExportWire } from '@/lib/schemas/exports';
import { BODY_BYTES, RATES } from '@/lib/server/limits';
import { newAddress, Reader } from '../helpers/api';
import { smallStudy } from '../helpers/documents';
import { refusalOf, save } from '../helpers/own-study';
import { applicationDatabase, newPerson, type Person } from '../helpers/people';
import { readPdf } from '../helpers/read-pdf';
import { setting } from '../helpers/settings';

let database: Database;
let pool: pg.Pool;
beforeAll(() => void ({ database, pool } = applicationDatabase()));
afterAll(() => pool.end());

const base = () => setting('TEST_BASE_URL');
const lockGates = parseStudy(demoStudies.find(({ slug }) => slug === 'lock-gates')!.study);

/** A file as it travels: status, headers, bytes; asked again while the answer is that it is not made yet. */
async function fetchFile(path: string, { reader, headers = {}, method = 'GET' }: { reader?: Reader; headers?: Record<string, string>; method?: string } = {}) {
  const cookie = [...(reader?.cookies ?? [])].map(([name, value]) => `${name}=${value}`).join('; ');
  for (;;) {
    const response = await fetch(new URL(path, base()), { method, headers: { cookie, 'x-forwarded-for': newAddress(), ...headers } });
    const bytes = new Uint8Array(await response.arrayBuffer());
    if (response.status !== 202) return { status: response.status, headers: response.headers, bytes, text: new TextDecoder().decode(bytes) };
    expect(response.headers.get('location')).toMatch(/^\/api\/exports\/[0-9a-f-]{36}$/);
    expect(response.headers.get('retry-after')).toBe('2');
  }
}

type Owned = Person & { readonly study: string };
async function own(document: Study): Promise<Owned> {
  const person = await newPerson(database, 'composer');
  const made = await createStudy(database, { userId: person.id, document });
  if (made.kind !== 'saved') throw new Error(made.kind);
  return { ...person, study: made.study.id };
}
const named = (title: string): Study => ({ ...smallStudy(title), players: [{ id: 'one', name: 'Iva', instruments: ['pots'] }] });

const FILES = [
  ['score.json', 'application/json', 'Lock Gates.json'],
  ['score.musicxml', 'application/vnd.recordare.musicxml+xml', 'Lock Gates.musicxml'],
  ['score.mxl', 'application/vnd.recordare.musicxml', 'Lock Gates.mxl'],
  ['score.mid', 'audio/midi', 'Lock Gates.mid'],
  ['statements.csv', 'text/csv; charset=utf-8', 'Lock Gates.csv'],
  ['parts/p1.musicxml', 'application/vnd.recordare.musicxml+xml', 'Lock Gates - Player 1.musicxml'],
  ['parts/p1.mxl', 'application/vnd.recordare.musicxml', 'Lock Gates - Player 1.mxl'],
  ['score.pdf', 'application/pdf', 'Lock Gates.pdf'],
  ['parts/p2.pdf', 'application/pdf', 'Lock Gates - Player 2.pdf'],
  ['parts.zip', 'application/zip', 'Lock Gates - parts.zip'],
] as const;

describe('a file of a demo study', () => {
  it.each(FILES)('%s has its type, its name, and may be kept by anybody who asks again whether it is fresh', async (file, type, name) => {
    const { status, headers, bytes } = await fetchFile(`/api/studies/lock-gates/${file}`);
    expect([status, headers.get('content-type')]).toEqual([200, type]);
    expect(headers.get('content-disposition')).toBe(`attachment; filename="${name}"; filename*=UTF-8''${encodeURIComponent(name)}`);
    expect(headers.get('cache-control')).toBe('public, max-age=0, must-revalidate');
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('content-security-policy')).toContain("default-src 'none'");
    expect(headers.get('etag')).toMatch(/^"[0-9a-f]{32}"$/);
    expect(bytes.byteLength).toBeGreaterThan(100);
  });

  it.each(FILES)('%s is not sent again to whoever has it', async (file) => {
    const path = `/api/studies/lock-gates/${file}`;
    const tag = (await fetchFile(path)).headers.get('etag')!;
    for (const asked of [tag, `W/${tag}`, `"other", ${tag}`, '*']) {
      const again = await fetchFile(path, { headers: { 'if-none-match': asked } });
      expect([asked, again.status, again.bytes.byteLength, again.headers.get('etag')]).toEqual([asked, 304, 0, tag]);
    }
    expect((await fetchFile(path, { headers: { 'if-none-match': '"other"' } })).status).toBe(200);
    expect((await fetchFile(`/api/studies/${(await demoId())}/${file}`)).headers.get('etag')).toBe(tag);
  });

  it.each(FILES)('%s shows its head alone where that is asked for', async (file, type) => {
    const { status, headers, bytes } = await fetchFile(`/api/studies/lock-gates/${file}`, { method: 'HEAD' });
    expect([status, headers.get('content-type'), bytes.byteLength]).toEqual([200, type, 0]);
    expect(headers.get('etag')).toMatch(/^"/);
  });
});

const demoId = async () => (await pool.query<{ id: string }>("select id from studies where slug = 'lock-gates'")).rows[0]!.id;

describe('what is in the files', () => {
  it('JSON: the document, whole', async () => {
    expect(JSON.parse((await fetchFile('/api/studies/lock-gates/score.json')).text)).toEqual(lockGates);
  });

  it('MusicXML, plain and compressed, MIDI and CSV: what the engine writes', async () => {
    const fetched = async (file: string) => Buffer.from((await fetchFile(`/api/studies/lock-gates/${file}`)).bytes);
    const plain = await fetched('score.musicxml');
    expect(plain.equals(Buffer.from(toMusicXML(lockGates)))).toBe(true);
    expect(Buffer.from(unzipSync(await fetched('score.mxl'))['score.musicxml']!).equals(plain)).toBe(true);
    expect((await fetched('parts/p4.musicxml')).equals(Buffer.from(toMusicXML(lockGates, { part: 'p4' })))).toBe(true);
    expect((await fetched('score.mid')).equals(Buffer.from(toMidi(lockGates)))).toBe(true);
    expect((await fetched('statements.csv')).equals(Buffer.from(statementsCsv(lockGates, buildStudy(lockGates))))).toBe(true);
  });

  it('CSV: nothing that a spreadsheet would run', async () => {
    const bad = ['=1+1', '+1', '-1', '@SUM(1)', '\tx'];
    const sections = bad.map((name, n) => ({ id: `s${n}`, name: `${name}!`, role: 'other', kind: 'free', lines: [{ instrument: 'pots', rhythm: '1/4' }] }));
    const { reader, study } = await own(parseStudy({ ...named('Formulas'), instruments: [{ id: 'pots', name: '=HYPERLINK("http://elsewhere.example")', family: 'found' }], sections }));
    const { text } = await fetchFile(`/api/studies/${study}/statements.csv`, { reader });
    const rows = text.split('\r\n').filter((row) => row !== '');
    expect(rows.length).toBe(1 + bad.length);
    for (const row of rows) expect(row.replace('\uFEFF', '')).not.toMatch(/(?:^|,)"?[=+\-@\t\r]/);
    expect(text).toContain(`"'=HYPERLINK(""http://elsewhere.example"")"`);
  });

  it('of many values: made apart, and the same', async () => {
    const lines = ['1/8', '1/4', '1/16'].map((value, n) => ({ instrument: `i${n}`, rhythm: `[${value} ${value}]x2500` }));
    const instruments = lines.map(({ instrument: id }) => ({ id, name: id, family: 'found' }));
    const long = parseStudy({ ...smallStudy('Many'), instruments, sections: [{ id: 'a', name: 'A', role: 'other', kind: 'free', lines }] });
    const { id, reader, study } = await own(long);
    expect((await fetchFile(`/api/studies/${study}/score.musicxml`, { reader })).text).toBe(toMusicXML(long));
    expect(Buffer.from((await fetchFile(`/api/studies/${study}/score.mid`, { reader })).bytes).equals(Buffer.from(toMidi(long)))).toBe(true);
    const { rows } = await pool.query('select state, result_name as name from export_jobs where owner_id = $1 order by created_at', [id]);
    expect(rows).toEqual([{ state: 'done', name: 'Many.musicxml' }, { state: 'done', name: 'Many.mid' }]);
  });

  it('PDF: the score in the size that was asked for, its title as text, the same bytes each time', async () => {
    const a4 = await fetchFile('/api/studies/lock-gates/score.pdf');
    const read = await readPdf(a4.bytes);
    expect(read.texts.join(' ')).toContain('Lock Gates');
    for (const { name } of lockGates.instruments) expect(read.texts.join(' ')).toContain(name);
    const numbers = new Set(read.texts.join(' ').split(' '));
    for (const measure of [1, 24, 28, 51, 55]) expect(numbers).toContain(String(measure));
    expect(new Set(read.sizes.map((box) => box.slice(2).map(Math.round).join()))).toEqual(new Set(['595,842']));
    expect(read.texts.at(-1)).toMatch(/Version \d+, \d+ \w+ \d{4}/);
    expect(read.info).toMatchObject({ Title: 'Lock Gates', Producer: 'Sesqui' });
    const letter = await readPdf((await fetchFile('/api/studies/lock-gates/score.pdf?paper=letter&orientation=landscape&staff=5')).bytes);
    expect(letter.sizes[0]?.slice(2)).toEqual([792, 612]);
    expect(Buffer.compare((await fetchFile('/api/studies/lock-gates/score.pdf')).bytes, a4.bytes)).toBe(0);
  });

  it('zip: the part of each player, as when it is asked for alone', async () => {
    const files = unzipSync((await fetchFile('/api/studies/lock-gates/parts.zip')).bytes);
    expect(Object.keys(files).sort()).toEqual(lockGates.players.map(({ name }) => `Lock Gates - ${name}.pdf`));
    const alone = await fetchFile('/api/studies/lock-gates/parts/p3.pdf');
    expect(Buffer.compare(files['Lock Gates - Player 3.pdf']!, alone.bytes)).toBe(0);
    expect((await readPdf(alone.bytes)).texts.join(' ')).toContain('Player 3');
  });
});

describe('a file of one’s own study', () => {
  it('is its owner’s alone, and is asked for anew when the study is saved', async () => {
    const { reader, study } = await own(named('Weir'));
    const path = `/api/studies/${study}/score.json`;
    const first = await fetchFile(path, { reader });
    expect([first.status, first.headers.get('cache-control')]).toEqual([200, 'private, no-cache']);
    expect((await fetchFile(path)).status).toBe(404);
    await save(reader, study, named('Weir and pool'), 1);
    const second = await fetchFile(path, { reader, headers: { 'if-none-match': first.headers.get('etag')! } });
    expect([second.status, (JSON.parse(second.text) as Study).title]).toEqual([200, 'Weir and pool']);
  });

  it.each([
    ['Плотина', "attachment; filename=\"_______.pdf\"; filename*=UTF-8''%D0%9F%D0%BB%D0%BE%D1%82%D0%B8%D0%BD%D0%B0.pdf"],
    ['Écluse d’été', "attachment; filename=\"Ecluse d_ete.pdf\"; filename*=UTF-8''%C3%89cluse%20d%E2%80%99%C3%A9t%C3%A9.pdf"],
    ['a"; x="b\\c', "attachment; filename=\"a ; x= b c.pdf\"; filename*=UTF-8''a%20%3B%20x%3D%20b%20c.pdf"],
    ['100% (half)', "attachment; filename=\"100_ (half).pdf\"; filename*=UTF-8''100%25%20%28half%29.pdf"],
  ])('is called by its title, %s', async (title, header) => {
    const { reader, study } = await own(named(title));
    const { status, headers } = await fetchFile(`/api/studies/${study}/score.pdf`, { reader, method: 'HEAD' });
    expect([status, headers.get('content-disposition')]).toEqual([200, header]);
  });

  it('that cannot be written says why', async () => {
    const unwritable = { ...named('Odd'), sections: [{ id: 'a', name: 'A', role: 'other', kind: 'free', lines: [{ instrument: 'pots', rhythm: '1/1031 1030/1031' }] }] };
    const { reader, study } = await own(parseStudy(unwritable));
    for (const file of ['score.pdf', 'score.musicxml', 'score.mxl']) {
      const { status, text } = await fetchFile(`/api/studies/${study}/${file}`, { reader });
      expect([file, status, (JSON.parse(text) as { error: { message: string } }).error.message]).toEqual([file, 422, expect.stringMatching(/^Flower pots: .*cannot be written/)]);
    }
  });

  it('has no parts where it has no players', async () => {
    const { reader, study } = await own(smallStudy('Alone'));
    const { status, text } = await fetchFile(`/api/studies/${study}/parts.zip`, { reader });
    expect([status, (JSON.parse(text) as { error: { message: string } }).error.message]).toEqual([422, expect.stringMatching(/no players/)]);
  });
});

describe('what is not accepted', () => {
  it.each([
    ['paper=a3', 422], ['paper=', 422], ['orientation=upside-down', 422], ['staff=3.5', 422], ['staff=8.5', 422], ['staff=5.3', 422], ['staff=NaN', 422],
    ['staff=1e1', 422], ['staff=-5', 422], ['staff=5&width=1', 422], ['__proto__=x', 200], [`staff=${'9'.repeat(500)}`, 422],
  ])('GET …/score.pdf?%s', async (query, status) => {
    expect((await fetchFile(`/api/studies/lock-gates/score.pdf?${query}`)).status).toBe(status);
  });

  it.each(['parts/nobody.pdf', 'parts/constructor.pdf', 'parts/%00.pdf', 'parts/..%2fscore.pdf'])('%s: there is no such player', async (file) => {
    expect((await fetchFile(`/api/studies/lock-gates/${file}`)).status).toBe(404);
  });

  it.each(['parts/p1.exe', 'parts/p1', `parts/${'p'.repeat(400)}.pdf`])('%s is no part', async (file) => {
    expect((await fetchFile(`/api/studies/lock-gates/${file}`)).status).toBe(422);
  });

  const document = smallStudy('Weir');
  it.each([
    ['nothing', {}, 422],
    ['no study', { what: 'score' }, 422],
    ['two studies', { what: 'score', study: 'lock-gates', document }, 422],
    ['a version of what is not saved', { what: 'score', document, version: 1 }, 422],
    ['another version than is saved', { what: 'score', study: 'lock-gates', version: 999 }, 409],
    ['a part of nobody', { what: 'part', document }, 422],
    ['a part of somebody who is not there', { what: 'part', player: 'nobody', document }, 404],
    ['a score for one player', { what: 'score', player: 'p1', study: 'lock-gates' }, 422],
    ['another kind', { what: 'posters', document }, 422],
    ['a staff of text', { what: 'score', document, staff: '5' }, 422],
    ['a staff of no size', { what: 'score', document, staff: 0 }, 422],
    ['a field that is not known', { what: 'score', document, url: 'http://elsewhere.example' }, 422],
    ['a document that is none', { what: 'score', document: { title: 'x' } }, 422],
    ['a study that is not there', { what: 'score', study: 'no-such-study' }, 404],
  ])('POST /api/exports with %s', async (_, body, status) => {
    expect(refusalOf(await new Reader().send('POST', '/api/exports', body))[0]).toBe(status);
  });

  it('a document that is too large', async () => {
    const text = JSON.stringify({ what: 'score', document }).padEnd(BODY_BYTES.document + 1);
    expect(refusalOf(await new Reader().send('POST', '/api/exports', text))).toEqual([413, 'too_large']);
  });

  it('prints asked for too often from one address', async () => {
    const reader = new Reader();
    for (let n = 0; n < RATES.print.most; n += 1) expect((await reader.send('POST', '/api/exports', {})).status).toBe(422);
    expect(refusalOf(await reader.send('POST', '/api/exports', { what: 'score', document }))).toEqual([429, 'too_many']);
  });
});

async function untilOver(reader: Reader, id: string, headers: Record<string, string> = {}): Promise<ExportWire['export']> {
  for (;;) {
    const { body } = await reader.ask(`/api/exports/${id}`, { headers });
    const item = (body as ExportWire).export;
    if (item.state !== 'queued' && item.state !== 'running') return item;
    await new Promise((go) => setTimeout(go, 100));
  }
}

describe('a guest’s print', () => {
  const order = async (reader: Reader, document: unknown, headers: Record<string, string> = {}) => {
    const { status, body } = await reader.send('POST', '/api/exports', { what: 'score', document }, headers);
    expect(status).toBe(202);
    return body as ExportWire;
  };

  it('is made from the document that was sent, and is fetched with the token alone', async () => {
    const reader = new Reader();
    const { export: item, token = '' } = await order(reader, smallStudy('Guest weir'));
    expect(token).toMatch(/^[\w-]{43}$/);
    const shown = { [EXPORT_TOKEN]: token };
    expect(await untilOver(reader, item.id, shown)).toMatchObject({ state: 'done', done: 2, total: 2, error: null, file: { name: 'Guest weir.pdf', type: 'application/pdf' } });
    const file = await fetchFile(`/api/exports/${item.id}/file`, { headers: shown });
    expect([file.status, file.headers.get('cache-control')]).toEqual([200, 'private, no-cache']);
    const { texts } = await readPdf(file.bytes);
    expect(texts.join(' ')).toContain('Guest weir');
    expect(texts.at(-1)).toContain('Not saved');
    const { reader: stranger } = await newPerson(database, 'administrator');
    const others: readonly Record<string, string>[] = [{}, { [EXPORT_TOKEN]: 'x'.repeat(43) }, { [EXPORT_TOKEN]: token.toUpperCase() }, { [EXPORT_TOKEN]: '' }];
    for (const other of others) {
      for (const by of [undefined, stranger]) {
        expect((await fetchFile(`/api/exports/${item.id}/file`, { headers: other, ...(by && { reader: by }) })).status).toBe(404);
        expect((await fetchFile(`/api/exports/${item.id}`, { headers: other, ...(by && { reader: by }) })).status).toBe(404);
      }
    }
    const { rows } = await pool.query<{ row: string }>('select export_jobs::text as row from export_jobs where id = $1', [item.id]);
    expect(rows[0]?.row).not.toContain(token);
  });

  it('that takes long keeps no request waiting: what is asked for behind it is answered with where to wait', async () => {
    const reader = new Reader();
    const lines = Array.from({ length: 8 }, (_, n) => ({ instrument: `i${n}`, rhythm: '[1/8 1/8 1/16 1/16 1/8 1/4 (1/4)]x1500' }));
    const long = { ...smallStudy('Very long'), instruments: lines.map(({ instrument: id }) => ({ id, name: id, family: 'found' })), sections: [{ id: 'a', name: 'A', role: 'other', kind: 'free', lines }] };
    const { export: before, token = '' } = await order(reader, long);
    const { id, reader: owner, study } = await own(named('Behind'));
    const waits = await owner.ask(`/api/studies/${study}/score.pdf`);
    expect([waits.status, waits.headers.get('retry-after'), waits.headers.get('cache-control')]).toEqual([202, '2', 'no-store']);
    const item = (waits.body as ExportWire).export;
    expect([waits.headers.get('location'), item.state]).toEqual([`/api/exports/${item.id}`, 'queued']);
    await reader.send('DELETE', `/api/exports/${before.id}`, {}, { [EXPORT_TOKEN]: token });
    expect(await untilOver(owner, item.id)).toMatchObject({ state: 'done', file: { name: 'Behind.pdf' } });
    expect((await owner.ask(`/api/studies/${study}/score.pdf`)).status).toBe(200);
    expect((await pool.query('select id from export_jobs where owner_id = $1', [id])).rows).toEqual([{ id: item.id }]);
  });

  it('is the same print where the same is asked for with the token, and another guest’s is not', async () => {
    const reader = new Reader();
    const first = await order(reader, smallStudy('Twice'));
    const again = await order(reader, smallStudy('Twice'), { [EXPORT_TOKEN]: first.token ?? '' });
    expect([again.export.id, again.token]).toEqual([first.export.id, undefined]);
    expect((await order(new Reader(), smallStudy('Twice'))).export.id).not.toBe(first.export.id);
  });

  it('that is cancelled is not made', async () => {
    const reader = new Reader();
    const instruments = Array.from({ length: 8 }, (_, n) => ({ id: `i${n}`, name: `Pot ${n + 1}`, family: 'found' }));
    const lines = instruments.map(({ id }) => ({ instrument: id, rhythm: '[1/8 1/8 1/16 1/16 1/8 1/4 (1/4)]x200' }));
    const long = { ...smallStudy('Long'), instruments, sections: [{ id: 'a', name: 'A', role: 'other', kind: 'free', lines }] };
    const { export: item, token = '' } = await order(reader, long);
    const shown = { [EXPORT_TOKEN]: token };
    const gone = await reader.send('DELETE', `/api/exports/${item.id}`, {}, shown);
    expect([gone.status, (gone.body as ExportWire).export.state]).toEqual([200, 'cancelled']);
    // What waits behind it is made: the process that drew it is free again.
    const next = await order(reader, smallStudy('Next'), shown);
    expect((await untilOver(reader, next.export.id, shown)).state).toBe('done');
    expect((await untilOver(reader, item.id, shown)).state).toBe('cancelled');
    expect((await fetchFile(`/api/exports/${item.id}/file`, { headers: shown })).status).toBe(404);
  });
});
