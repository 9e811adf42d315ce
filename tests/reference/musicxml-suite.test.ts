import fs from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { type Candidate, formatFraction, formatRhythm, fromMusicXML, totalLength } from '@/engine';

/** “Unofficial MusicXML Test Suite”, R. Kainhofer (github lilypond/lilypond, input/regression/musicxml, 9ab8390f; MIT). */
const SUITE = path.resolve(import.meta.dirname, '../../../shared/reference/musicxml-suite');
const isThere = fs.existsSync(SUITE);
const files = isThere ? fs.readdirSync(SUITE).filter((name) => /\.(xml|musicxml|mxl)$/.test(name)) : [];
if (!isThere) console.info('The MusicXML test suite is not at hand: its files are not read.');

const read = async (start: string): Promise<Candidate[]> => fromMusicXML(fs.readFileSync(path.join(SUITE, files.find((name) => name.startsWith(start))!)));
/** the only voice, in quarters */
const quarters = async (start: string) => (await read(start))[0]!.rhythm.map(({ length, rest }) => (rest ? `(${length.mul(4).toFraction()})` : length.mul(4).toFraction()));
const times = (count: number, value: string) => Array<string>(count).fill(value);
const halving = (from: number, factor: number) => Array.from({ length: 14 }, (_, n) => (factor * from) / 2 ** n);

describe.skipIf(!isThere)('the MusicXML test suite', () => {
  it.each(files)('%s is read, and adds up', async (name) => {
    for (const { rhythm, measures, metre, warnings } of await fromMusicXML(fs.readFileSync(path.join(SUITE, name)))) {
      const last = measures.at(-1)!;
      expect(formatFraction(totalLength(rhythm))).toBe(formatFraction(last.start.add(last.length)));
      expect(metre).toMatch(/^[\d+]+\/\d+$/);
      for (const warning of warnings) expect(warning).toMatch(/^\p{Lu}.*\.$/su);
    }
  });

  // What the files hold by their own description, and the figures of check-values.md, section 12.1, worked out apart from us.
  it('03a: every value from maxima to 1024th, plain, dotted, double-dotted; bars of 32, 48, 56 quarters', async () => {
    const [{ rhythm, measures }] = (await read('03a')) as [Candidate];
    expect(rhythm).toHaveLength(45);
    // The last of each row stands twice, so that the bars are full.
    const row = (factor: number) => [...halving(32, factor), (factor * 32) / 2 ** 13].map((value) => String(value / 4));
    expect(rhythm.map(({ length }) => String(length.valueOf()))).toEqual([1, 1.5, 1.75].flatMap(row));
    expect(measures.filter((_, index) => index % 2 === 0).map(({ length }) => length.mul(4).toFraction())).toEqual(['32', '48', '56']);
  });
  it('02a: rests from whole to 1024th, plain and dotted; 26 of them in 6 measures', async () => {
    const [{ rhythm, measures }] = (await read('02a')) as [Candidate];
    expect([rhythm.length, measures.length, rhythm.every(({ rest }) => rest)]).toEqual([26, 6, true]);
  });
  it('03c: divisions 1, 8, 38: quarters 1 1 1 1, then 2 2', async () => expect(await quarters('03c')).toEqual(['1', '1', '1', '1', '2', '2']));
  it('03d: metres of every kind, one bar not full', async () => {
    const [{ measures, warnings }] = (await read('03d')) as [Candidate];
    expect([...new Set(measures.map(({ metre }) => metre))]).toEqual(['1/8', '2/8', '3/4', '4/4', '5/16', '7/8', '9/8', '31/8', '2/2']);
    expect(warnings.filter((text) => text.includes('is not full'))).toHaveLength(1);
  });
  it('03e: no divisions: duration 4 is a whole note, and it is told', async () => {
    const [{ rhythm, warnings }] = (await read('03e')) as [Candidate];
    expect(formatRhythm(rhythm)).toBe('1');
    expect(warnings.join()).toContain('1 was assumed');
  });
  it('11c: (3+2)/8 and (5+3+1)/4', async () => expect((await read('11c'))[0]!.measures.map(({ metre }) => metre)).toEqual(['3+2/8', '5+3+1/4']));
  it('23a: 3:2, 4:2, 4:1, 7:3, 6:2 in 14/4: 2/3, 1/2, 1/4, 3/7, 1/3 of a quarter', async () => {
    expect(await quarters('23a')).toEqual([...times(9, '2/3'), ...times(4, '1/2'), ...times(4, '1/4'), ...times(7, '3/7'), ...times(6, '1/3')]);
    expect((await read('23a'))[0]!.metre).toBe('14/4');
  });
  it('23d: nested: 16ths of 2/15 of a quarter, eighths of 2/9; every bar 2 quarters', async () => {
    const lengths = await quarters('23d');
    expect(lengths).toContain('2/15');
    expect(lengths.slice(-3)).toEqual(times(3, '2/9'));
    expect((await read('23d'))[0]!.measures.map(({ length }) => length.mul(4).toFraction())).toEqual(['2', '2', '2']);
  });
  it('33b: one note tied over the bar', async () => expect(await quarters('33b')).toEqual(['8']));
  it('33i: ties that are not ended are told, and the last is joined', async () => {
    const [{ rhythm, warnings }] = (await read('33i')) as [Candidate];
    expect(formatRhythm(rhythm)).toBe('1 1 1 2');
    expect(warnings.join(' ')).toContain('A tie is begun and not ended');
  });
  it('45a: a repeat is told', async () => expect((await read('45a'))[0]!.warnings.join()).toContain('Repeats are read once'));
  it('46d: bars of 3/2, 2, 2, 3 quarters, the first a pickup', async () => {
    const { measures } = (await read('46d'))[0]!;
    expect(measures.map(({ number, length }) => [number, length.mul(4).toFraction()])).toEqual([['0', '3/2'], ['1', '2'], ['X1', '2'], ['2', '3']]);
  });
  it('46f: measures 1 and 3 hold two quarters of four, and it is told', async () => {
    const { measures, warnings } = (await read('46f'))[0]!;
    expect(measures.map(({ length }) => length.mul(4).toFraction())).toEqual(['2', '4', '2', '4']);
    expect(warnings.join()).toContain('A measure is not full: it lasts 1/2 of a whole note, where 4/4 lasts 1 (measures 1 and 3).');
  });
  it('46i: measures 1 and 3 hold five quarters of four, and it is told', async () => {
    const { measures, warnings } = (await read('46i'))[0]!;
    expect(measures.map(({ length }) => length.mul(4).toFraction())).toEqual(['5', '4', '5', '4']);
    expect(warnings.join()).toContain('A measure is over-full: it lasts 5/4 of a whole note, where 4/4 lasts 1 (measures 1 and 3).');
  });
  it('46j: an empty measure is a rest of its metre', async () => expect((await read('46j'))[0]!.warnings.join()).toContain('An empty measure was read as a rest'));
  it('73a: timpani, cymbals at three places, triangle at two', async () => {
    expect((await read('73a')).map(({ name, rhythm }) => [name, formatRhythm(rhythm)])).toEqual([['Timpani', '3/2 1/2'], ['Cymbals', '3/4@3 1/4@1 1@2'], ['Triangle', '3/4@2 1/4@2 1@1']]);
  });
});
