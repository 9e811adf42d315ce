import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { demoStudies } from '@/db/demo';
import {
  EngineError, type Family, Fraction, type Rhythm, type Value, attacks, buildStudy, formatRhythm, fromMidi, fromMusicXML, midiDivision, parseMetre, parseStudy, readMusic, spellLine, toMidi, toMusicXML, totalLength,
} from '@/engine';
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

/** A study of one free line on an instrument of twelve sounds. */
const studyOf = (rhythm: Rhythm, metre: string, family: Family = 'skin', sounds = 12) =>
  parseStudy({
    title: 'Weir', metre, tempo: { beat: '1/4', perMinute: '84' },
    instruments: [{ id: 'x', name: 'Sluice boards', family, sounds }],
    sections: [{ id: 'a', name: 'A', role: 'episode', kind: 'free', lines: [{ instrument: 'x', rhythm: formatRhythm(rhythm) }] }],
  });
/** Accent, roll and sound as paper tells them: rests have none, the first sound is that of a note without a number. */
const marks = (rhythm: Rhythm) => rhythm.filter(({ rest: isRest }) => !isRest).map(({ accent, roll, sound }) => [accent, roll, sound ?? 1]);
const FAMILIES = ['metal', 'wood', 'skin', 'found'] as const;

describe('what toMusicXML and toMidi write comes back', () => {
  it('MusicXML: lengths, tuplets, ties, accents, rolls and sounds; metre and tempo', async () => {
    let read = 0;
    await fc.assert(
      fc.asyncProperty(fc.oneof(mixedRhythm, arbitraryRhythm).filter(strikes), fc.constantFrom(...METRES), async (rhythm, metre) => {
        const study = studyOf(rhythm, metre);
        let text;
        try {
          text = toMusicXML(study);
        } catch (error) {
          if (error instanceof EngineError && error.code === 'unspellable') return;
          throw error;
        }
        const [candidate] = await fromMusicXML(text);
        const { length } = parseMetre(metre);
        expect(asRead(candidate!.rhythm)).toBe(asRead(rhythm, length.mul(totalLength(rhythm).div(length).ceil())));
        expect(marks(candidate!.rhythm)).toEqual(marks(rhythm));
        expect([candidate!.name, candidate!.metre, candidate!.tempo]).toEqual(['Sluice boards', parseMetre(metre).text, { beat: '1/4', perMinute: '84' }]);
        // The metre says its groups; where it says none, customary ones are meant by writer and reader alike.
        expect(candidate!.warnings).toEqual([]);
        read += 1;
      }),
      { numRuns: 150 },
    );
    expect(read).toBeGreaterThan(50);
  });

  it('MIDI: lengths and, where all of them are used, sounds; metre and tempo', async () => {
    await fc.assert(
      fc.asyncProperty(arbitraryRhythm.filter(strikes), fc.constantFrom(...METRES), async (rhythm, metre) => {
        const study = studyOf(rhythm, metre);
        if (!midiDivision(study).exact) return;
        const [candidate] = await fromMidi(toMidi(study));
        expect(asRead(candidate!.rhythm)).toBe(asRead(rhythm));
        const used = [...new Set(marks(rhythm).map(([, , sound]) => sound as number))].sort((a, b) => a - b);
        if (used.length > 1) expect(candidate!.rhythm.flatMap(({ sound }) => sound ?? [])).toEqual(marks(rhythm).map(([, , sound]) => used.indexOf(sound as number) + 1));
        expect([candidate!.name, candidate!.tempo.perMinute, parseMetre(candidate!.metre).count]).toEqual(['Sluice boards', '84', parseMetre(metre).count]);
      }),
    );
  });

  it.each(FAMILIES.flatMap((family) => Array.from({ length: 11 }, (_, n) => [family, n + 2] as const)))('sounds of %s, %s of them, in their order', async (family, sounds) => {
    const rhythm = Array.from({ length: sounds }, (_, n) => ({ length: new Fraction(1, 4), rest: false, sound: n + 1 }));
    const study = studyOf(rhythm, '4/4', family, sounds);
    for (const [candidate] of [await fromMidi(toMidi(study)), await fromMusicXML(toMusicXML(study))]) expect(marks(candidate!.rhythm.slice(0, sounds))).toEqual(marks(rhythm));
  });

  it.each(demoStudies.map(({ slug, study }) => [slug, study] as const))('every line of %s', async (_, input) => {
    const built = buildStudy(parseStudy(input));
    const lines = new Map(built.lines.map(({ instrument, rhythm }) => [parseStudy(input).instruments.find(({ id }) => id === instrument)!.name, rhythm]));
    const xml = await fromMusicXML(mxl(toMusicXML(input)));
    expect(xml.map(({ name }) => name).sort()).toEqual([...lines.keys()].sort());
    for (const { name, rhythm } of [...xml, ...(await fromMidi(toMidi(input)))]) {
      const line = lines.get(name)!;
      // A stretch that is written as another tempo has other lengths on paper; its attacks are as many.
      expect([name, attacks(rhythm).length]).toEqual([name, attacks(line).length]);
      const sections = parseStudy(input).sections;
      if (sections.every(({ writing }) => writing === undefined || writing === 'values')) expect([name, attacks(rhythm).map((at) => at.toFraction())]).toEqual([name, attacks(line).map((at) => at.toFraction())]);
    }
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
