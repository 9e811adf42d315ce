import { describe, expect, it } from 'vitest';
import { EngineError, formatFraction, formatRhythm, fromMidi, holdToNext, parseRhythm } from '@/engine';
import { metreEvent, midi, midiTrack, tempoEvent } from '../../helpers/music-files';

const read = async (bytes: Uint8Array) => (await fromMidi(bytes)).map(({ name, rhythm }) => [name, formatRhythm(rhythm)]);
const one = async (bytes: Uint8Array) => (await fromMidi(bytes))[0]!;
const Q = 480;

describe('lengths, in ticks, exact', () => {
  it.each<[string, readonly (readonly [number, number, number?])[], string, number?]>([
    ['notes side by side', [[0, Q], [Q, Q / 2], [1.5 * Q, 2.5 * Q]], '1/4 1/8 5/8'],
    ['gaps are rests, before the first too', [[Q, Q / 2], [2 * Q, Q]], '(1/4) 1/8 (1/8) 1/4'],
    ['triplets and quintuplets', [[0, 160], [160, 160], [320, 160], [480, 96], [576, 384]], '1/12 1/12 1/12 1/20 1/5'],
    ['a tick is a tick', [[0, 479], [480, 481]], '479/1920 (1/1920) 481/1920'],
    ['struck together, the longest', [[0, Q, 36], [0, 2 * Q, 38], [2 * Q, Q, 36]], '1/2@1 1/4@1'],
    ['overlapping, the later cuts the earlier', [[0, 2 * Q, 36], [Q, Q, 38]], '1/4@1 1/4@2'],
    ['no length, to the next', [[0, 0], [Q, Q]], '1/4 1/4'],
    ['silence to the end of the track', [[0, Q]], '1/4 (3/4)', 4 * Q],
    ['a tick more at the end is no rest', [[0, Q], [Q, Q]], '1/4 1/4', 2 * Q + 1],
  ])('%s', async (_, hits, expected, end = 0) => {
    expect(formatRhythm((await one(midi([midiTrack(hits, { end })]))).rhythm)).toBe(expected);
  });
});

describe('tracks, channels, sounds', () => {
  it('one candidate a track and channel, named by its track; tracks without notes are none', async () => {
    const conductor = midiTrack([], { name: 'Conductor', first: [tempoEvent(500_000)] });
    const bytes = midi([conductor, midiTrack([[0, Q, 60, 0], [0, Q, 40, 9]], { name: 'Kit' }), midiTrack([[0, Q]], { name: '' }), midiTrack([[0, Q]], { name: 'Kit' })]);
    expect((await read(bytes)).map(([name]) => name)).toEqual(['Kit, channel 1', 'Kit, channel 10', 'Track 3', 'Kit']);
  });
  it('format 0 by its channels', async () => {
    expect(await read(midi([midiTrack([[0, Q, 60, 0], [Q, Q, 36, 9]], { name: 'All' })], { format: 0 }))).toEqual([['All, channel 1', '1/4 (1/4)'], ['All, channel 10', '(1/4) 1/4']]);
  });
  it('keys of the percussion channel are sounds, from the lowest; of other channels pitches, left out', async () => {
    const hits = [[0, Q, 42], [Q, Q, 36], [2 * Q, Q, 38], [3 * Q, Q, 42]] as const;
    const drums = await one(midi([midiTrack(hits)]));
    expect(formatRhythm(drums.rhythm)).toBe('1/4@3 1/4@1 1/4@2 1/4@3');
    expect(drums.warnings).toContain('Its 3 keys became sounds, numbered from the lowest.');
    const bells = await one(midi([midiTrack(hits.map(([at, length, key]) => [at, length, key, 3] as const))]));
    expect([formatRhythm(bells.rhythm), bells.warnings[0]]).toEqual(['1/4 1/4 1/4 1/4', 'Pitches were left out.']);
  });
  it('the lower of a pair is what General MIDI calls the lower: its key may be the higher', async () => {
    expect(formatRhythm((await one(midi([midiTrack([[0, Q, 60], [Q, Q, 61], [2 * Q, Q, 76], [3 * Q, Q, 77]])]))).rhythm)).toBe('1/4@2 1/4@1 1/4@4 1/4@3');
  });
  it('more than 12 keys are left out, and told', async () => {
    const { rhythm, warnings } = await one(midi([midiTrack(Array.from({ length: 13 }, (_, n) => [n * Q, Q, 36 + n] as const))]));
    expect(rhythm.some(({ sound }) => sound !== undefined)).toBe(false);
    expect(warnings).toContain('The sounds were left out: the channel has 13, and 12 are the limit.');
  });
});

describe('what is odd is told', () => {
  const noteOn = { deltaTime: 0, type: 'noteOn', channel: 9, noteNumber: 40, velocity: 80 } as const;
  it('a note without an end', async () => {
    const { rhythm, warnings } = await one(midi([[noteOn, { ...noteOn, deltaTime: Q, noteNumber: 40 }, { deltaTime: Q, type: 'endOfTrack', meta: true }]]));
    expect(formatRhythm(rhythm)).toBe('1/4 1/4');
    expect(warnings).toContain('A note is not ended: it was held to the next attack, or to the end.');
  });
  it('short notes, which can be held to the next', async () => {
    const { rhythm, warnings } = await one(midi([midiTrack([0, 1, 2, 3].map((n) => [n * Q + Q, 60] as const), { end: 5 * Q })]));
    expect(formatRhythm(rhythm)).toBe('(1/4) 1/32 (7/32) 1/32 (7/32) 1/32 (7/32) 1/32 (7/32)');
    expect(warnings.join(' ')).toContain('each can be held to the next attack instead');
    expect(formatRhythm(holdToNext(rhythm))).toBe('(1/4) 1/4 1/4 1/4 1/4');
  });
  it('holding keeps marks, and rests before the first attack', () => expect(formatRhythm(holdToNext(parseRhythm('(1/4) (1/8) 1/8>@2 (1/8) (1/8) 1/4^ 1/2')))).toBe('(1/4) (1/8) 3/8>@2 1/4^ 1/2'));
  it('no metre, no tempo', async () => {
    const { metre, tempo, warnings } = await one(midi([midiTrack([[0, Q]])]));
    expect([metre, tempo]).toEqual(['4/4', { beat: '1/4', perMinute: '120' }]);
    expect(warnings).toEqual(['The file does not say a metre: 4/4 was assumed.', 'The file does not say a tempo: 120 quarter notes a minute are meant.']);
  });
  it('nothing, where nothing is', async () => {
    expect((await one(midi([midiTrack([[0, Q]], { first: [metreEvent(4, 4), tempoEvent(500_000)] })]))).warnings).toEqual([]);
  });
});

describe('metre, tempo and measures', () => {
  it.each([[714_286, '84'], [500_000, '120'], [909_091, '66'], [476_190, '126'], [594_059, '101'], [1_333_333, '45'], [638_298, '94'], [709_220, '423/5']])('%s microseconds are %s', async (microseconds, perMinute) => {
    expect((await one(midi([midiTrack([[0, Q]], { first: [tempoEvent(microseconds)] })]))).tempo).toEqual({ beat: '1/4', perMinute });
  });
  it('every whole tempo from 20 to 400 comes back from its whole microseconds', async () => {
    for (let perMinute = 20; perMinute <= 400; perMinute += 1) {
      expect((await one(midi([midiTrack([[0, Q]], { first: [tempoEvent(Math.round(60_000_000 / perMinute))] })]))).tempo.perMinute).toBe(String(perMinute));
    }
  });
  it('measures of a metre that changes, cut short where it does', async () => {
    const map = midiTrack([], { first: [metreEvent(3, 4), metreEvent(7, 8, 4 * Q)] });
    const { metre, measures, warnings } = await one(midi([map, midiTrack([[0, 8 * Q]])]));
    expect(metre).toBe('3/4');
    expect(measures.map(({ number, start, length, metre: of }) => [number, formatFraction(start), formatFraction(length), of].join(' '))).toEqual(['1 0 3/4 3/4', '2 3/4 1/4 3/4', '3 1 7/8 7/8', '4 15/8 7/8 7/8']);
    expect(warnings).toContain('The metre changes on the way: 3/4, 7/8.');
  });
});

describe('files that are refused, with the place', () => {
  const good = midi([midiTrack([[0, Q], [Q, Q]])]);
  const changed = (at: number, ...bytes: number[]) => {
    const copy = good.slice();
    copy.set(bytes, at);
    return copy;
  };
  it.each<[string, Uint8Array, string]>([
    ['nothing', new Uint8Array(), 'This file is empty.'],
    ['another kind', new TextEncoder().encode('<score-partwise/>'), 'it does not begin with “MThd”'],
    ['format 2', midi([midiTrack([[0, Q]])], { format: 2 }), 'format 2, whose tracks are pieces apart'],
    ['format 7', changed(9, 7), 'of format 7, which there is not'],
    ['frames of film', changed(12, 0xe7, 40), 'counts frames of film, not beats'],
    ['no ticks', changed(12, 0, 0), 'divides a quarter note into 0 ticks'],
    ['half a head', good.slice(0, 10), 'its head ends at byte 10'],
    ['a head and no track', good.slice(0, 14), 'holds no track'],
    ['a track cut off', good.slice(0, -6), `the file ends at ${good.length - 6}`],
    ['noise for a track', changed(14, 1, 2, 3, 4), 'at byte 14 a track should begin'],
    ['an event that stops', changed(22, 0, 0xff, 3, 0x7f), 'an event at byte 26 should go on for 127 bytes'],
    ['a number without an end', changed(22, 0xff, 0xff, 0xff, 0xff), 'the number at byte 22 has no end'],
    ['values of no event', changed(22, 0, 0x40), 'holds at byte 23 values of no event'],
    ['what no file may hold', changed(22, 0, 0xf8), 'holds at byte 23 what no file may hold'],
    ['no note', midi([midiTrack([])]), 'holds no note'],
  ])('%s', async (_, bytes, message) => {
    await expect(fromMidi(bytes)).rejects.toThrow(EngineError);
    await expect(fromMidi(bytes)).rejects.toThrow(message);
  });
});
