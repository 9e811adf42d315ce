import tonejsMidi from '@tonejs/midi';
import { parseMidi } from 'midi-file';
import { describe, expect, it } from 'vitest';
import { demoStudies } from '@/db/demo';
import { Fraction, type StudyInput, attacks, buildStudy, clockOf, fromMidi, midiDivision, parseMetre, parseStudy, planMeasures, playEvents, toMidi } from '@/engine';
import { variableLength } from '../../engine/exchange/write/midi-bytes';
import { percussionKeys } from '../../engine/exchange/write/gm-percussion';
import { writtenStudies } from '../helpers/written-studies';

const { Midi } = tonejsMidi;
const MANY = process.env.SESQUI_MANY ? 300 : 60;
const studies: [string, StudyInput][] = [...demoStudies.map(({ study }): [string, StudyInput] => [study.title, study]), ...writtenStudies(MANY, 20261202).map((study, n): [string, StudyInput] => [`random ${n + 1}`, study])];

const piece = (rhythm: string, extra: Partial<StudyInput> = {}): StudyInput => ({
  title: 'X', metre: '4/4', tempo: { beat: '1/4', perMinute: '120' }, instruments: [{ id: 'snare', name: 'Snare', family: 'skin', sound: 'snare-drum' }],
  sections: [{ id: 'a', name: 'A', role: 'other', kind: 'free', lines: [{ instrument: 'snare', rhythm }] }], ...extra,
});
const hex = (bytes: Uint8Array): string => [...bytes].map((byte) => byte.toString(16).padStart(2, '0')).join(' ').toUpperCase();

// Check values, 10.2: Standard MIDI Files 1.0 (RP-001) as quoted there.
describe('bytes of the standard', () => {
  it('a header: format 1, tracks, division', () => {
    const bytes = toMidi(piece('1/4'));
    expect(hex(bytes.slice(0, 14))).toBe('4D 54 68 64 00 00 00 06 00 01 00 02 01 E0');
  });
  it('a variable-length quantity: 8E 7E is 1918; and those of the standard’s table (from memory)', () => {
    expect(variableLength(1918)).toEqual([0x8e, 0x7e]);
    for (const [value, bytes] of [[0, [0]], [0x40, [0x40]], [0x7f, [0x7f]], [0x80, [0x81, 0]], [0x2000, [0xc0, 0]], [0x3fff, [0xff, 0x7f]], [0x4000, [0x81, 0x80, 0]], [0x0fffffff, [0xff, 0xff, 0xff, 0x7f]]] as const) expect(variableLength(value)).toEqual(bytes);
  });
  it.each([['120', '07 A1 20'], ['60', '0F 42 40'], ['72', '0C B7 35'], ['84', '0A E6 2E'], ['90', '0A 2C 2B'], ['96', '09 89 68'], ['100', '09 27 C0'], ['126', '07 44 1E'], ['144', '06 5B 9B'], ['160', '05 B8 D8'], ['168', '05 73 17'], ['180', '05 16 15'], ['270', '03 64 0E']])('quarter = %s is FF 51 03 %s', (perMinute, bytes) => {
    expect(hex(toMidi(piece('1/4', { tempo: { beat: '1/4', perMinute } })))).toContain(`FF 51 03 ${bytes}`);
  });
  it('6/8 is FF 58 04 06 03 24 08', () => expect(hex(toMidi(piece('3/4', { metre: '6/8' })))).toContain('FF 58 04 06 03 24 08'));
  it('at 480 a triplet eighth is 160 ticks, a quintuplet sixteenth 96', () => {
    const onsets = (rhythm: string) => parseMidi(toMidi(piece(rhythm))).tracks[1]!.reduce<{ at: number; on: number[] }>(({ at, on }, event) => ({ at: at + event.deltaTime, on: event.type === 'noteOn' ? [...on, at + event.deltaTime] : on }), { at: 0, on: [] }).on;
    expect(onsets('1/12 1/12 1/12')).toEqual([0, 160, 320]);
    expect(onsets('1/20 1/20 1/20 1/20 1/20')).toEqual([0, 96, 192, 288, 384]);
  });
});

// Check values, 10.3: General MIDI Level 1 percussion (RP-003).
describe('keys of the General MIDI percussion map', () => {
  it.each([['snare-drum', 38], ['cowbell', 56], ['claves', 75], ['triangle', 80], ['bass-drum', 35]] as const)('%s is %i', (sound, key) => {
    expect(percussionKeys({ id: 'x', name: 'X', family: 'skin', sound }, 1)).toEqual([key]);
  });
  it('gives every sound a key of its own, of the 47 of the map', () => {
    for (const family of ['metal', 'wood', 'skin', 'found'] as const) {
      for (let sounds = 1; sounds <= 12; sounds += 1) {
        const keys = percussionKeys({ id: 'x', name: 'X', family, sound: 'tom-toms' }, sounds);
        expect(new Set(keys).size).toBe(sounds);
        for (const key of keys) expect(key >= 35 && key <= 81).toBe(true);
      }
    }
  });
});

describe('an independent reader (@tonejs/midi 2.0.28 over midi-file 1.2.4) finds our music', () => {
  it.each(studies)('%s', (_, document) => {
    const study = parseStudy(document);
    const built = buildStudy(study);
    const { division, exact, worst } = midiDivision(document);
    const midi = new Midi(toMidi(document));
    expect(midi.header.ppq).toBe(division);
    expect(division).toBeLessThanOrEqual(32_767);
    expect(exact).toBe(worst.n === 0n);
    const withNotes = built.lines.filter(({ rhythm }) => rhythm.some(({ rest }) => !rest));
    const tracks = midi.tracks.filter(({ notes }) => notes.length > 0);
    expect(tracks).toHaveLength(withNotes.length);
    withNotes.forEach(({ instrument, rhythm }, index) => {
      const track = tracks[index]!;
      expect(track.channel).toBe(9);
      expect(track.name).toBe(study.instruments.find(({ id }) => id === instrument)!.name);
      const read = track.notes.map(({ ticks }) => ticks).sort((a, b) => a - b);
      const ours = attacks(rhythm).map((at) => at.mul(4 * division));
      expect(read).toHaveLength(ours.length);
      read.forEach((tick, n) => {
        const error = ours[n]!.sub(tick).abs().div(division);
        expect(error.compare(worst) <= 0, `${instrument}, attack ${n + 1}: ${error.toFraction()} of a quarter`).toBe(true);
      });
    });
    // Tempo: a whole number of microseconds, so within half of one of the exact.
    const clock = clockOf(study, built);
    for (const { ticks, bpm } of midi.header.tempos) {
      const span = clock.spans.findLast(({ start }) => start.mul(4 * division).compare(ticks) <= 0)!;
      expect(Math.abs(60e6 / bpm - span.secondsOfWhole.valueOf() * 250_000)).toBeLessThanOrEqual(0.51);
    }
    const metres = planMeasures(study, built).filter(({ metre }, index, all) => index === 0 || all[index - 1]!.metre !== metre);
    expect(midi.header.timeSignatures.map(({ timeSignature }) => timeSignature.join('/'))).toEqual(metres.map(({ metre }) => `${parseMetre(metre).count}/${parseMetre(metre).unit}`));
  });
});

describe('what comes back, and what does not fit', () => {
  it('the same rhythm', async () => {
    for (const [label, document] of studies) {
      if (!midiDivision(document).exact) continue;
      const lines = buildStudy(document).lines.filter(({ rhythm }) => rhythm.some(({ rest }) => !rest));
      const read = await fromMidi(toMidi(document)).catch(() => []);
      expect(read.map(({ rhythm }) => attacks(rhythm).map((at) => at.toFraction())), label).toEqual(lines.map(({ rhythm }) => attacks(rhythm).map((at) => at.toFraction())));
      const lengths = (rhythm: (typeof lines)[number]['rhythm']): string[] => rhythm.filter(({ rest }) => !rest).map(({ length }) => length.toFraction());
      expect(read.map(({ rhythm }) => lengths(rhythm)), label).toEqual(lines.map(({ rhythm }) => lengths(rhythm)));
    }
  });

  it('says how far off it is where no division holds every attack', () => {
    // 11, 13, 17 and 19 to a quarter: their common division, 46,189, is above 32,767.
    const document = piece('1/44 1/44 9/44 | 1/52 1/52 11/52 | 1/68 15/68 | 1/76 17/76'.replaceAll(' |', ''));
    const { division, exact, worst } = midiDivision(document);
    expect(exact).toBe(false);
    expect(division).toBeLessThanOrEqual(32_767);
    expect(worst.compare(new Fraction(1, 2 * division)) <= 0).toBe(true);
    expect(worst.n).toBeGreaterThan(0n);
  });

  it('a stretch written as another tempo is one here too, and sounds when it should', () => {
    const document: StudyInput = {
      title: 'X', metre: '4/4', tempo: { beat: '1/4', perMinute: '90' }, instruments: [{ id: 'a', name: 'A', family: 'wood' }],
      subjects: [{ id: 's', name: 'S', rhythm: '1/4 1/8 1/8 1/2' }],
      sections: [{ id: 'x', name: 'X', role: 'other', kind: 'process', subject: 's', instruments: ['a'], writing: 'tempo', process: { kind: 'proportion', factors: ['1', '3/2', '2'], entries: 'successive' } }],
    };
    const midi = new Midi(toMidi(document));
    const events = playEvents(parseStudy(document), buildStudy(document));
    expect(midi.header.tempos.map(({ bpm }) => Math.round(bpm * 1000) / 1000)).toEqual([90, 60, 45]);
    // Tempos are whole microseconds a quarter: less than 8 microseconds away after 12 quarters.
    midi.tracks.at(-1)!.notes.forEach(({ time }, index) => expect(Math.abs(time - events[index]!.seconds.valueOf())).toBeLessThan(8e-6));
  });

  it('a tempo that the format cannot hold is refused in a sentence', () => {
    expect(() => toMidi(piece('1/4', { tempo: { beat: '1/4', perMinute: '3' } }))).toThrow(/16\.7 seconds/);
  });
});
