import fs from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { BODY_BYTES, RATES } from '@/lib/server/limits';
import { ask, newAddress } from '../helpers/api';
import { attributes, bytesOf, container, midi, midiTrack, musicXML, mxl, note, rawZip } from '../helpers/music-files';
import { endChild, freePort, startWebServer } from '../helpers/scripts';
import { setting } from '../helpers/settings';

const XML = 'application/vnd.recordare.musicxml+xml';
const send = (bytes: Uint8Array | string, kind = XML, { base, address = newAddress() }: { base?: string; address?: string } = {}) =>
  ask('/api/read-music', { method: 'POST', headers: { 'content-type': kind, 'x-forwarded-for': address }, body: bytes as BodyInit }, base);
const score = musicXML([attributes(12) + note(8) + note(8) + note(8) + note(24)], { name: 'Log drum' });
const lines = (body: unknown) => (body as { candidates: { name: string; rhythm: string }[] }).candidates.map(({ name, rhythm }) => [name, rhythm]);

describe('a file of music, sent as it is', () => {
  it.each<[string, Uint8Array | string, string, string[][]]>([
    ['MusicXML', score, XML, [['Log drum', '1/6 1/6 1/6 1/2']]],
    ['MusicXML as any XML', score, 'application/xml; charset=utf-8', [['Log drum', '1/6 1/6 1/6 1/2']]],
    ['compressed', mxl(score), 'application/vnd.recordare.musicxml', [['Log drum', '1/6 1/6 1/6 1/2']]],
    ['MIDI as bytes of any kind', midi([midiTrack([[0, 480], [480, 160]])]), 'application/octet-stream', [['Drums', '1/4 1/12']]],
  ])('%s', async (_, bytes, kind, expected) => {
    const { status, body } = await send(bytes, kind);
    expect([status, lines(body)]).toEqual([200, expected]);
  });

  it('with its metre, its tempo and what was left out', async () => {
    const { body } = await send(score);
    expect(body).toEqual({ candidates: [{ name: 'Log drum', metre: '4/4', tempo: { beat: '1/4', perMinute: '120' }, rhythm: '1/6 1/6 1/6 1/2', warnings: ['The file does not say a tempo: 120 quarter notes a minute were assumed.'] }] });
  });

  it.each<[string, Uint8Array | string, string, number, string, string]>([
    ['nothing', '', XML, 422, 'unreadable_music', 'This file is empty.'],
    ['an entity', '<!DOCTYPE a [<!ENTITY x "x">]><a>&x;</a>', XML, 422, 'hostile_file', 'defines entities of its own'],
    ['a way out', mxl(score, { '../x': bytesOf('x') }), XML, 422, 'hostile_file', 'points out of the file'],
    ['half a file', score.slice(0, 300), XML, 422, 'unreadable_music', 'is cut off'],
    ['50 MB of noise', new Uint8Array(50 * 1024 * 1024).fill(7), XML, 413, 'too_large', '8 MB is the limit'],
    ['a byte too many', new Uint8Array(BODY_BYTES.music + 1), XML, 413, 'too_large', '8 MB is the limit'],
    ['JSON', '{}', 'application/json', 415, 'wrong_type', 'The file must be sent as one of'],
    ['a form', 'a=b', 'application/x-www-form-urlencoded', 415, 'wrong_type', 'The file must be sent as one of'],
  ])('%s is refused in a sentence', async (_, bytes, kind, status, code, message) => {
    const answer = await send(bytes, kind);
    expect([answer.status, answer.body]).toEqual([status, { error: { code, message: expect.stringContaining(message) } }]);
  });

  it('too often from one address is refused, and not from another', async () => {
    const address = newAddress();
    for (let n = 0; n < RATES.music.most; n += 1) expect((await send('x', XML, { address })).status).toBe(422);
    expect([(await send(score, XML, { address })).status, (await send(score)).status]).toEqual([429, 200]);
  });
});

describe('while hostile files are being refused', () => {
  let server: Awaited<ReturnType<typeof startWebServer>>;
  beforeAll(async () => {
    server = await startWebServer({ port: await freePort(), databaseUrl: setting('TEST_APPLICATION_DATABASE_URL'), secret: setting('TEST_SECRET') });
  });
  afterAll(() => endChild(server.child));

  const MB = 1024 * 1024;
  const zeros = (unpacked: number) => rawZip([container(), { name: 'score.xml', data: new Uint8Array(6 * MB), unpacked }]);
  const FILES = [
    () => bytesOf(musicXML(Array.from({ length: 60_001 }, () => note(4)))),
    () => bytesOf(`<score-partwise>${'<a/>'.repeat(MB)}<part/>`),
    () => zeros(1_000),
    () => new Uint8Array(7 * MB).fill(7),
    () => bytesOf(`<!DOCTYPE a [<!ENTITY x "${'x'.repeat(900_000)}">]><a/>`),
  ] as const;
  const rss = () => Number(/^VmHWM:\s+(\d+) kB/m.exec(fs.readFileSync(`/proc/${server.child.pid}/status`, 'utf8'))![1]) / 1024;

  it('the server answers others, and its memory stays', async () => {
    expect((await ask('/api/health', {}, server.url)).status).toBe(200);
    const order: string[] = [];
    const told = (name: string) => (answer: { status: number }) => {
      order.push(name);
      return answer.status;
    };
    const round = () => FILES.map((file, n) => send(file(), XML, { base: server.url }).then(told(`file ${n}`)));
    await Promise.all(round());
    order.length = 0;
    const before = fs.existsSync('/proc') ? rss() : 0;
    const files = round();
    const health = Array.from({ length: 5 }, () => ask('/api/health', {}, server.url).then(told('health')));
    expect(await Promise.all(health)).toEqual([200, 200, 200, 200, 200]);
    expect(await Promise.all(files)).toEqual([422, 422, 422, 422, 422]);
    // The longest of them takes thousands of steps: the others were not kept waiting for it.
    expect(order.lastIndexOf('health')).toBeLessThan(order.indexOf('file 0'));
    for (let n = 0; n < 4; n += 1) await Promise.all(round());
    // What a round may hold at once is its bodies, some of them twice: far less than one bomb unpacked.
    if (before > 0) expect(rss() - before).toBeLessThan(200);
  });
});
