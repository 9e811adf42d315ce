import { deflateRawSync, crc32 } from 'node:zlib';
import { zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { EngineError, type EngineErrorCode, LIMITS, readMusic } from '@/engine';
import { attributes, bytesOf, container, midi, musicXML, mxl, note, rawZip } from '../../helpers/music-files';

const MB = 1024 * 1024;
const score = musicXML([attributes(1) + note(4)]);
const deflated = (data: Uint8Array) => ({ name: 'score.xml', data: new Uint8Array(deflateRawSync(data)), method: 8, unpacked: data.length, crc: crc32(data) });
/** The same every time, and no music. */
const noise = (length: number) => {
  const bytes = new Uint8Array(length);
  for (let n = 0, x = 1; n < length; n += 1) {
    x = (Math.imul(x, 1_103_515_245) + 12_345) & 0x7fffffff;
    bytes[n] = x >> 16;
  }
  return bytes;
};
/** A zip of zips of zips, as the well-known bomb of 42 kB is made. */
function nested(depth: number): Uint8Array {
  let inner: Uint8Array = new Uint8Array(MB);
  for (let level = 0; level < depth; level += 1) inner = zipSync(Object.fromEntries(Array.from({ length: 16 }, (_, n) => [`lib ${n}.zip`, inner])));
  return inner;
}
const dtd = (subset: string, body = '') => score.replace('<score', `<!DOCTYPE score-partwise [${subset}]><score`).replace('Claves', body || 'Claves');
const laughs = dtd(Array.from({ length: 10 }, (_, n) => `<!ENTITY l${n} "${n === 0 ? 'ha' : `&l${n - 1};`.repeat(10)}">`).join(''), '&l9;');
const zeros = new Uint8Array(200 * MB);

const FILES: readonly (readonly [what: string, code: EngineErrorCode, message: string, file: () => Uint8Array])[] = [
  ['a bomb of zips in zips', 'unreadable_music', 'has no META-INF/container.xml', () => nested(3)],
  ['a bomb of zips in zips that calls one its score', 'unreadable_music', 'is no text', () => zipSync({ 'META-INF/container.xml': container('bomb.zip').data, 'bomb.zip': nested(2) })],
  ['one entry of nearly 4 GB, as it says', 'hostile_file', 'would unpack to 4000 MB', () => rawZip([container(), { ...deflated(new Uint8Array(MB)), unpacked: 4_000 * MB }])],
  ['one entry of 10 GB, marked as such', 'hostile_file', 'of a kind for more than 4 GB (zip64)', () => rawZip([container(), { ...deflated(new Uint8Array(MB)), unpacked: 0xffffffff }])],
  ['one entry of 200 MB of zeros that says it has 1000 bytes', 'hostile_file', 'is larger than the file says (1000 bytes)', () => rawZip([container(), { ...deflated(zeros), unpacked: 1_000 }])],
  ['one entry of 60 MB of zeros', 'hostile_file', 'times as large when it is unpacked', () => rawZip([container(), deflated(zeros.subarray(0, 60 * MB))])],
  ['a table of contents that is a bomb', 'too_large', '64 kB are the limit', () => rawZip([{ ...deflated(zeros.subarray(0, 10 * MB)), name: 'META-INF/container.xml' }, { name: 'score.xml', data: bytesOf(score) }])],
  ['many entries', 'hostile_file', '1000 are the limit', () => rawZip(Array.from({ length: 1_001 }, (_, n) => ({ name: `${n}`, data: new Uint8Array() })))],
  ['an entry twice', 'hostile_file', 'holds “score.xml” twice', () => rawZip([container(), { name: 'score.xml', data: bytesOf(score) }, { name: 'score.xml', data: bytesOf(score) }])],
  ['an entry that leads out', 'hostile_file', '“../../etc/passwd”, which points out of the file', () => mxl(score, { '../../etc/passwd': bytesOf('x') })],
  ['an entry from the root', 'hostile_file', '“/etc/passwd”, which points out of the file', () => mxl(score, { '/etc/passwd': bytesOf('x') })],
  ['an entry of another drive', 'hostile_file', 'which points out of the file', () => mxl(score, { 'C:\\x': bytesOf('x') })],
  ['a score outside', 'unreadable_music', 'names “../score.xml” as its score, and holds no such file', () => mxl(score, {}, new TextDecoder().decode(container('../score.xml').data))],
  ['a score at another address', 'unreadable_music', 'names “http://127.0.0.1/score.xml” as its score', () => mxl(score, {}, new TextDecoder().decode(container('http://127.0.0.1/score.xml').data))],
  ['a password', 'unreadable_music', 'locked by a password', () => rawZip([container(), { name: 'score.xml', data: bytesOf(score), flags: 1 }])],
  ['another way of compressing', 'unreadable_music', 'compressed in a way that is not read (method 14)', () => rawZip([container(), { name: 'score.xml', data: bytesOf(score), method: 14 }])],
  ['a wrong check sum', 'unreadable_music', 'does not unpack to what was packed', () => rawZip([container(), { name: 'score.xml', data: bytesOf(score), crc: 1 }])],
  ['a compressed file cut off', 'unreadable_music', 'its list of contents, at the end, is missing', () => mxl(score).slice(0, -30)],
  ['a compressed file damaged inside', 'unreadable_music', 'damaged', () => { const bytes = mxl(score.repeat(3)); bytes.fill(0xff, 300, 340); return bytes; }],
  ['a billion laughs', 'hostile_file', 'defines entities of its own', () => bytesOf(laughs)],
  ['an outside entity', 'hostile_file', 'defines entities of its own', () => bytesOf(dtd('<!ENTITY x SYSTEM "file:///etc/passwd">', '&x;'))],
  ['an outside entity of parameters', 'hostile_file', 'defines entities of its own', () => bytesOf(dtd('<!ENTITY % x SYSTEM "http://127.0.0.1:9/x"> %x;'))],
  ['an entity in a compressed file', 'hostile_file', 'defines entities of its own', () => mxl(laughs)],
  ['an entity of nobody', 'hostile_file', 'an entity is named that is not defined here', () => bytesOf(score.replace('Claves', '&claves;'))],
  ['50 MB of noise', 'too_large', 'This file has 50 MB: 32 MB are the limit.', () => noise(50 * MB)],
  ['30 MB of noise', 'unreadable_music', 'is no', () => noise(30 * MB)],
  ['30 MB of zeros', 'unreadable_music', 'This is no MusicXML', () => zeros.slice(0, 30 * MB)],
  ['noise called compressed', 'unreadable_music', 'This compressed file is damaged', () => { const bytes = noise(20 * MB); bytes.set(bytesOf('PK\u0003\u0004')); return bytes; }],
  ['noise called MIDI', 'unreadable_music', 'This MIDI file', () => { const bytes = noise(20 * MB); bytes.set(bytesOf('MThd')); return bytes; }],
  ['elements 100,000 deep', 'hostile_file', 'more than 64 deep', () => bytesOf(`<score-partwise>${'<a>'.repeat(100_000)}`)],
  ['100,000 attributes', 'hostile_file', 'more than 64 attributes', () => bytesOf(`<score-partwise ${Array.from({ length: 100_000 }, (_, n) => `a${n}="1"`).join(' ')}/>`)],
  ['a text without end', 'hostile_file', 'longer than 1000000 characters', () => bytesOf(score.replace('Claves', 'x'.repeat(20 * MB)))],
  ['a name without end', 'hostile_file', 'longer than 1000000 characters', () => bytesOf(`<${'x'.repeat(20 * MB)}`)],
  ['a comment without end', 'hostile_file', 'longer than 1000000 characters', () => bytesOf(`<!--${' x'.repeat(10 * MB)}`)],
  ['a document type without end', 'hostile_file', 'longer than 1000000 characters', () => bytesOf(`<!DOCTYPE a [${'<!ELEMENT a ANY>'.repeat(MB)}`)],
  ['a note of a million notes', 'hostile_file', '“note” holds more than 20000 elements', () => bytesOf(musicXML([`<note>${'<dot/>'.repeat(MB)}</note>`]))],
  ['256 voices and one', 'too_large', 'more than 256 voices', () => bytesOf(musicXML([attributes(1) + Array.from({ length: 257 }, (_, n) => note(4, `<voice>${n}</voice>`)).join('')]))],
  ['a file cut off', 'unreadable_music', 'is cut off: it ends in line 1, in measure 1 of Claves', () => bytesOf(score.slice(0, score.indexOf('<duration>')))],
  ['MIDI that lasts for ages', 'too_large', 'more than 60000 measures', () => midi([[...Array.from({ length: 9 }, () => ({ deltaTime: 0x0fffffff, type: 'noteOn', channel: 9, noteNumber: 40, velocity: 9 }) as const), { deltaTime: 0, type: 'endOfTrack', meta: true }]], { ticksPerBeat: 1 })],
];

describe('hostile files', () => {
  it.each(FILES)('%s', async (_, code, message, file) => {
    const bytes = file();
    const refusal = await readMusic(bytes).then(() => null, (error: unknown) => error);
    expect(refusal).toBeInstanceOf(EngineError);
    expect([(refusal as EngineError).code, (refusal as EngineError).message]).toEqual([code, expect.stringContaining(message)]);
    expect((refusal as EngineError).message).toMatch(/^[\p{Lu}“].*\.$/su);
  });

  it('take turns with other work while they are read, and end when the time is over', async () => {
    let pauses = 0;
    const long = bytesOf(musicXML(Array.from({ length: 20_000 }, (_, n) => (n === 0 ? attributes(1) : '') + note(4))));
    await readMusic(long, { pause: () => void (pauses += 1) });
    expect(pauses).toBeGreaterThan(long.length / 64 / 1024);
    let asked = 0;
    const given = readMusic(long, { isExpired: () => (asked += 1) > 10 });
    await expect(given).rejects.toMatchObject({ code: 'out_of_time', message: expect.stringContaining('takes too long') });
    expect(asked).toBe(11);
  });

  it('chords without end are one attack', async () => {
    const chord = '<note><chord/><unpitched/><duration>4</duration></note>'.repeat(150_000);
    const [candidate] = await readMusic(bytesOf(musicXML([`${attributes(1)}${note(4)}${chord}<backup><duration>4</duration></backup>${note(4)}${chord}`])));
    expect(candidate!.rhythm).toHaveLength(1);
  });

  it('a file of nothing but oddities is told in a few sentences', async () => {
    const measures = Array.from({ length: 3_000 }, (_, n) => (n === 0 ? attributes(1_000) : '') + note(n + 1));
    const [candidate] = await readMusic(bytesOf(musicXML(measures)));
    expect(candidate!.warnings.length).toBeLessThan(40);
    expect(candidate!.warnings).toContain('Much else is odd in this file: 2976 more remarks are not shown.');
  });

  it('a compressed score may be held to a smaller limit', async () => {
    await expect(readMusic(mxl(score), { unpackedBytes: 200 })).rejects.toMatchObject({ code: 'too_large' });
    expect(await readMusic(mxl(score), { unpackedBytes: 2_000 })).toHaveLength(1);
  });

  it('what they unpack is never held as a whole', async () => {
    // 60 MB of honest music in steps: no more than a fraction of it is alive at once.
    const measure = (n: number) => `<measure number="${n}">${note(4, `<!--${String(n).repeat(12)}${noise(60).join('')}-->`)}</measure>`;
    const big = bytesOf(`<score-partwise><part-list/><part id="P1">${Array.from({ length: 50_000 }, (_, n) => (n === 0 ? `<measure>${attributes(1)}${note(4)}</measure>` : measure(n))).join('')}</part></score-partwise>`);
    expect(big.length).toBeLessThan(LIMITS.unpackedBytes);
    const file = zipSync({ 'META-INF/container.xml': container().data, 'score.xml': big }, { level: 1 });
    let most = 0;
    const before = process.memoryUsage().arrayBuffers;
    await readMusic(file, { pause: () => void (most = Math.max(most, process.memoryUsage().arrayBuffers - before)) });
    expect(most).toBeLessThan(big.length / 2);
  });
});
