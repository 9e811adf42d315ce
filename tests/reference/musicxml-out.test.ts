import { JSDOM } from 'jsdom';
import { beforeAll, describe, expect, it } from 'vitest';
import type { VerovioToolkit } from 'verovio/esm';
import { demoStudies } from '@/db/demo';
import { Fraction, type StudyInput, attacks, buildStudy, fromMusicXML, packMxl, parseMetre, parseStudy, printScore, toMusicXML } from '@/engine';
import { musicXmlSound } from '../../engine/exchange/write/xml-instruments';
import { NAMED_SOUNDS } from '@/lib/client/player/sounds';
import { openReader, readStaves } from '../helpers/independent-reader';
import { writtenStudies } from '../helpers/written-studies';
import { canValidate, standardSounds, validate } from '../helpers/xmllint';
import { crowded } from '../engraving/studies';

/** Sixty in CI, three hundred where somebody asks for them. */
const MANY = process.env.SESQUI_MANY ? 300 : 60;
const random = writtenStudies(MANY, 20261201);
const named = demoStudies.map(({ study }): [string, StudyInput] => [study.title, study]);
const whole: [string, StudyInput][] = [...named, ...random.map((study, index): [string, StudyInput] => [`random ${index + 1}`, study])];
const parser = new new JSDOM('').window.DOMParser();

type File = { readonly label: string; readonly study: StudyInput; readonly part?: string; readonly text: string };
const filesOf = (label: string, study: StudyInput): File[] =>
  [undefined, ...(study.players ?? []).map(({ id }) => id)].map((part) => ({ label: `${label}, ${part ?? 'score'}`, study, ...(part === undefined ? {} : { part }), text: toMusicXML(study, part === undefined ? {} : { part }) }));
const files = whole.flatMap(([label, study]) => filesOf(label, study));

const kids = (parent: Element, name: string): Element[] => [...parent.children].filter(({ tagName }) => tagName === name);
const textOf = (parent: Element, name: string): string | undefined => kids(parent, name)[0]?.textContent ?? undefined;

/** Children of a note in the order of the schema (musicxml.xsd, complexType note). */
const ORDER = ['unpitched', 'rest', 'duration', 'tie', 'instrument', 'voice', 'type', 'dot', 'time-modification', 'stem', 'beam', 'notations'];

describe('MusicXML that we write', () => {
  it('comes from as many random studies as were asked for', () => expect(random).toHaveLength(MANY));

  it.skipIf(!canValidate())('is valid by the MusicXML 4.0 schema (W3C Community Group, 2021), every score and part', () => {
    const all = [...files, ...filesOf('crowded', { ...crowded, sections: crowded.sections.slice(0, 5) })];
    expect(validate(new Map(all.map(({ text }, index) => [`f${index}`, text])))).toBe('');
  });
  if (!canValidate()) it.skip('the schema or xmllint is not here: only the structural checks below were made', () => undefined);

  it('names sounds of the standard’s list only', ({ skip }) => {
    const standard = standardSounds();
    if (standard === null) return skip('the list of sounds is not here');
    const used = Object.entries(NAMED_SOUNDS).flatMap(([family, sounds]) => Object.keys(sounds).map((sound) => musicXmlSound({ id: 'x', name: 'X', family: family as 'metal', sound })));
    for (const id of used) if (id !== undefined) expect(standard).toContain(id);
    expect(used.filter((id) => id !== undefined).length).toBeGreaterThan(15);
  });

  it('has every measure as long as its metre, whole durations, and children in the order of the schema', () => {
    for (const { label, text, study, part } of files) {
      const xml = parser.parseFromString(text, 'application/xml');
      expect(xml.querySelector('parsererror'), label).toBeNull();
      const parsed = parseStudy(study);
      const { measures } = printScore(parsed, buildStudy(parsed), part === undefined ? {} : { part });
      for (const one of xml.querySelectorAll('score-partwise > part')) {
        let divisions = 0;
        const bars = kids(one, 'measure');
        expect(bars).toHaveLength(measures.length);
        bars.forEach((bar, index) => {
          for (const attributes of kids(bar, 'attributes')) divisions = Number(textOf(attributes, 'divisions') ?? divisions);
          let sum = new Fraction(0);
          for (const note of kids(bar, 'note')) {
            const duration = textOf(note, 'duration')!;
            expect(duration).toMatch(/^[1-9]\d*$/);
            sum = sum.add(new Fraction(BigInt(duration), BigInt(divisions) * 4n));
            const places = [...note.children].map(({ tagName }) => ORDER.indexOf(tagName));
            expect(places).toEqual(places.toSorted((a, b) => a - b));
            expect(places).not.toContain(-1);
          }
          const planned = measures[index]!;
          expect(sum.toFraction(), `${label}, measure ${planned.number}`).toBe(planned.length.div(planned.scale).toFraction());
          if (planned.scale.equals(1) && planned.number > 0) expect(sum.toFraction()).toBe(parseMetre(planned.metre).length.toFraction());
        });
      }
    }
  });

  it('keeps names as they were typed, what XML cannot hold aside', () => {
    for (const { text, study } of files.filter(({ part }) => part === undefined)) {
      const xml = parser.parseFromString(text, 'application/xml');
      // A parser gives a line's end inside text as one character, and keeps tabs.
      const kept = (name: string): string => name.trim().replace(/[\u0000-\u0008\u000B\u000C\u000E-\u001F]/g, '\uFFFD');
      expect(xml.querySelector('work-title')?.textContent).toBe(kept(study.title));
      expect([...xml.querySelectorAll('instrument-name')].map(({ textContent }) => textContent)).toEqual(expect.arrayContaining(study.instruments.map(({ name }) => kept(name))));
    }
  });

  it('numbers MIDI’s keys from 1: GM 56, a cowbell, is 57 (check values, 10.1, from the MusicXML tutorial)', () => {
    const text = toMusicXML({ title: 'X', metre: '4/4', tempo: { beat: '1/4', perMinute: '60' }, instruments: [{ id: 'cowbell', name: 'Cowbell', family: 'metal' }], sections: [{ id: 'a', name: 'A', role: 'other', kind: 'free', lines: [{ instrument: 'cowbell', rhythm: '1' }] }] });
    expect(text).toContain('<midi-channel>10</midi-channel><midi-unpitched>57</midi-unpitched>');
    // One-line cowbell: E4 (the same source).
    expect(text).toContain('<unpitched><display-step>E</display-step><display-octave>4</display-octave></unpitched>');
  });

  it('comes back as the same rhythm, plain and compressed', async () => {
    for (const { label, text, study } of files.filter(({ part }) => part === undefined)) {
      const built = buildStudy(study);
      const read = await fromMusicXML(label.endsWith('1, score') ? packMxl(text) : text);
      expect(read.map(({ rhythm }) => attacks(rhythm).map((at) => at.toFraction())), label).toEqual(built.lines.map(({ rhythm }) => attacks(rhythm).map((at) => at.toFraction())));
      const lengths = (rhythm: (typeof read)[number]['rhythm']): string[] => rhythm.filter(({ rest }) => !rest).map(({ length }) => length.toFraction());
      expect(read.map(({ rhythm }) => lengths(rhythm)), label).toEqual(built.lines.map(({ rhythm }) => lengths(rhythm)));
    }
  });
});

describe('Verovio 6.3.0 reads our attacks in it', () => {
  let reader: VerovioToolkit;
  beforeAll(async () => {
    reader = await openReader();
  });

  /** Brackets within brackets are not read right by this reader: tests/reference/independent-reader.test.ts shows how. */
  const isNested = (text: string): boolean => text.includes('<tuplet-actual>');

  /** It counts a silent measure of an additive metre as nothing: for it the groups are added. */
  const withSums = (text: string): string => text.replace(/<beats>([\d+]+)<\/beats>/g, (_, beats: string) => `<beats>${beats.split('+').reduce((sum, one) => sum + Number(one), 0)}</beats>`);

  it('in every staff of every score', () => {
    let read = 0;
    for (const { label, text, study } of files.filter(({ part }) => part === undefined)) {
      if (isNested(text)) continue;
      const built = buildStudy(study);
      const staves = readStaves(reader, withSums(text));
      built.lines.forEach(({ rhythm, instrument }, index) => {
        const grid = rhythm.reduce((common, { length }) => lcm(common, length.d), 1n);
        const onsets = (staves.get(index + 1) ?? []).map(({ on }) => new Fraction(BigInt(Math.round(on * Number(grid))), grid).toFraction());
        expect(onsets, `${label}, ${instrument}`).toEqual(attacks(rhythm).map((at) => at.toFraction()));
      });
      read += 1;
    }
    expect(read).toBeGreaterThan(MANY * 0.6);
  }, 240_000);
});

const gcd = (a: bigint, b: bigint): bigint => (b === 0n ? a : gcd(b, a % b));
const lcm = (a: bigint, b: bigint): bigint => (a / gcd(a, b)) * b;
