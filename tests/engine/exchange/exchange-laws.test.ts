import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError, Fraction, type Rhythm, type Value, attacks, formatRhythm, fromMidi, fromMusicXML, parseMetre, readMusic, spellLine, totalLength } from '@/engine';
import { attributes, bytesOf, metreEvent, midi, midiTrack, musicXML, mxl, note, rest, tempoEvent } from '../../helpers/music-files';
import { spelledMusicXML } from '../../helpers/spelled-musicxml';
import { METRES, mixedRhythm } from '../notation/arbitrary-line';
import { arbitraryRhythm } from '../rhythm/arbitrary-rhythm';

/** Rests side by side taken together, and the last measure filled, as paper has it. */
function asRead(rhythm: Rhythm, total = totalLength(rhythm)): string {
  const values: Value[] = [];
  for (const value of [...rhythm, ...(total.compare(totalLength(rhythm)) > 0 ? [{ length: total.sub(totalLength(rhythm)), rest: true }] : [])]) {
    const last = values.at(-1);
    if (value.rest && last?.rest) values[values.length - 1] = { rest: true, length: last.length.add(value.length) };
    else values.push(value.rest ? value : { length: value.length, rest: false });
  }
  return formatRhythm(values);
}
const strikes = (rhythm: Rhythm) => rhythm.some(({ rest: isRest }) => !isRest);

describe('what is written comes back', () => {
  it('MusicXML of our spelling, tuplets and ties included', async () => {
    await fc.assert(
      fc.asyncProperty(mixedRhythm.filter(strikes), fc.constantFrom(...METRES), async (rhythm, metre) => {
        let measures;
        try {
          measures = spellLine(rhythm, metre);
        } catch (error) {
          if (error instanceof EngineError && error.code === 'unspellable') return;
          throw error;
        }
        const total = parseMetre(metre).length.mul(measures.length);
        for (const file of [spelledMusicXML(measures), mxl(spelledMusicXML(measures))]) {
          const [read] = await fromMusicXML(file);
          expect(formatRhythm(read!.rhythm)).toBe(asRead(rhythm, total));
          expect([read!.metre, read!.measures.length]).toEqual([parseMetre(metre).text, measures.length]);
        }
      }),
      { numRuns: 150 },
    );
  });

  it('MIDI by a writer that is not ours, wherever ticks are exact', async () => {
    await fc.assert(
      fc.asyncProperty(arbitraryRhythm.filter(strikes), async (rhythm) => {
        // 10080 ticks a quarter hold every length of `arbitraryRhythm`, and 16ths of them.
        const whole = 4 * 10_080;
        const at = attacks(rhythm);
        const hits = rhythm.filter(({ rest: isRest }) => !isRest).map(({ length }, index) => [Number(at[index]!.mul(whole).n), Number(length.mul(whole).n)] as const);
        const bytes = midi([midiTrack(hits, { end: Number(totalLength(rhythm).mul(whole).n) })], { ticksPerBeat: 10_080 });
        expect(formatRhythm((await fromMidi(bytes))[0]!.rhythm)).toBe(asRead(rhythm));
      }),
    );
  });
});

/** Good files of each kind, to be spoilt. */
const tie = (type: string) => `<tie type="${type}"/>`;
const xml = musicXML(
  [attributes(12) + '<direction><direction-type><metronome><beat-unit>quarter</beat-unit><per-minute>84</per-minute></metronome></direction-type></direction>' + note(12) + note(8) + note(8) + note(8) + rest(6) + note(6, tie('start')), note(48, tie('stop')) + '<backup><duration>24</duration></backup>' + note(24, '<voice>2</voice>'), attributes(5, '3+2/8') + note(10)],
  { head: '<?xml version="1.0" encoding="UTF-8"?><!DOCTYPE score-partwise PUBLIC "-//Recordare//DTD MusicXML 4.0 Partwise//EN" "http://www.musicxml.org/dtds/partwise.dtd">' },
);
const GOOD: readonly (readonly [string, Uint8Array])[] = [
  ['MusicXML', bytesOf(xml)],
  ['compressed MusicXML', mxl(xml)],
  ['MIDI', midi([midiTrack([], { first: [tempoEvent(714_286), metreEvent(7, 8)] }), midiTrack([[0, 480], [480, 160, 62], [640, 320, 64, 3]], { end: 3_360 })])],
];

/** Some bytes put in place of others, put in, or taken away; the end cut off. */
const spoiling = fc.record({
  changes: fc.array(fc.record({ at: fc.nat(), byte: fc.oneof(fc.nat(255), fc.constantFrom(0x3c, 0x3e, 0x22, 0x26, 0x2f, 0x39, 0x2d, 0x00, 0xff, 0x80)), how: fc.constantFrom('put', 'insert', 'remove') }), { maxLength: 8 }),
  cut: fc.option(fc.nat(), { nil: undefined, freq: 4 }),
});

describe('a file that is spoilt', () => {
  it.each(GOOD)('%s is read, or refused in a sentence', async (_, good) => {
    expect((await readMusic(good)).length).toBeGreaterThan(0);
    let refused = 0;
    await fc.assert(
      fc.asyncProperty(spoiling, async ({ changes, cut }) => {
        const bytes = [...good];
        for (const { at, byte, how } of changes) bytes.splice(at % bytes.length, how === 'insert' ? 0 : 1, ...(how === 'remove' ? [] : [byte]));
        const spoilt = new Uint8Array(cut === undefined ? bytes : bytes.slice(0, cut % bytes.length));
        try {
          const found = await readMusic(spoilt, { isExpired: (() => { let steps = 0; return () => (steps += 1) > 5_000; })() });
          expect(found.length).toBeGreaterThan(0);
          for (const { rhythm, warnings, measures } of found) {
            expect(rhythm.every(({ length }) => length.compare(0) > 0)).toBe(true);
            expect(warnings.every((text) => /^[\p{Lu}“].*\.$/su.test(text))).toBe(true);
            for (const { start, length } of measures) expect(start.add(length).compare(new Fraction(0))).toBe(1);
          }
        } catch (error) {
          if (!(error instanceof EngineError)) throw error;
          expect(error.code).not.toBe('out_of_time');
          expect(error.message).toMatch(/^[\p{Lu}“].*\.$/su);
          refused += 1;
        }
      }),
      { numRuns: 800 },
    );
    expect(refused).toBeGreaterThan(100);
  });
});
