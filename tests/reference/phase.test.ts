import { describe, expect, it } from 'vitest';
import { attacks, augment, formatRhythm, measuresOf, parseRhythm, retrograde, rotate, totalLength } from '@/engine';
import { fromBox, toBox } from './rhythms';

/** The 12-pulse clapping pattern (Reich 1972): a public listing of all its states; Haack, College Math. J. 22(3), 1991. */
const PATTERN = 'xxx.xx.x.xx.';
const ROTATIONS = [
  'xxx.xx.x.xx.', 'xx.xx.x.xx.x', 'x.xx.x.xx.xx', '.xx.x.xx.xxx', 'xx.x.xx.xxx.', 'x.x.xx.xxx.x',
  '.x.xx.xxx.xx', 'x.xx.xxx.xx.', '.xx.xxx.xx.x', 'xx.xxx.xx.x.', 'x.xxx.xx.x.x', '.xxx.xx.x.xx',
];
/** Recomputed from the pattern, not published. */
const TOGETHER = [8, 4, 5, 6, 5, 6, 4, 6, 5, 6, 5, 4];
const DIFFERENT = [8, 12, 11, 10, 11, 10, 12, 10, 11, 10, 11, 12];

const pattern = fromBox(PATTERN);
const turned = (pulses: number) => rotate(pattern, pulses, { pulse: '1/8' });
const at = (box: string) => [...box].flatMap((pulse, index) => (pulse === 'x' ? [index] : []));

describe('the clapping pattern (Reich 1972; Haack 1991; a public listing of its states)', () => {
  it('has 8 attacks in 12 pulses, at 0 1 2 4 5 7 9 10', () => {
    expect(attacks(pattern).map((a) => a.mul(8).toFraction())).toEqual(['0', '1', '2', '4', '5', '7', '9', '10']);
    expect(totalLength(pattern).toFraction()).toBe('3/2');
  });

  it.each(ROTATIONS.map((box, k) => [k, box] as const))('shifted by %d pulses: %s', (k, box) => {
    expect(toBox(turned(k), 12)).toBe(box);
    expect(toBox(rotate(fromBox(box), 1, { pulse: '1/8' }), 12)).toBe(ROTATIONS[(k + 1) % 12]);
  });

  it('comes back to the first state with the 13th section', () => {
    expect(toBox(turned(12), 12)).toBe(PATTERN);
    expect(new Set(ROTATIONS).size).toBe(12);
  });

  it('T9: skipping ahead and falling behind give the same states in opposite order', () => {
    for (let k = 0; k <= 12; k += 1) expect(toBox(turned(-k), 12)).toBe(ROTATIONS[(12 - k) % 12]);
  });

  it('claps together and apart as often as counted, symmetrically about shift 6', () => {
    const together = ROTATIONS.map((_, k) => at(toBox(turned(k), 12)).filter((pulse) => PATTERN[pulse] === 'x').length);
    const different = ROTATIONS.map((_, k) => new Set([...at(PATTERN), ...at(toBox(turned(k), 12))]).size);
    expect(together).toEqual(TOGETHER);
    expect(different).toEqual(DIFFERENT);
    expect(together.slice(1)).toEqual(together.slice(1).reverse());
  });

  it('is its own mirror up to rotation: its values reversed are rotation 3', () => {
    expect(toBox(retrograde(pattern, 'values'), 12)).toBe(ROTATIONS[3]);
  });

  it('T6: rotates 8 ways by attack, 12 by pulse, of which 4 begin with a rest', () => {
    const byAttack = Array.from({ length: 8 }, (_, k) => formatRhythm(rotate(pattern, k, 'attacks')));
    expect(new Set(byAttack).size).toBe(8);
    expect(formatRhythm(rotate(pattern, 8, 'attacks'))).toBe(formatRhythm(pattern));
    const byPulse = Array.from({ length: 12 }, (_, k) => turned(k));
    expect(new Set(byPulse.map(formatRhythm)).size).toBe(12);
    expect(byPulse.filter(([first]) => first!.rest)).toHaveLength(4);
    const begins = ROTATIONS.filter((box) => box.startsWith('x'));
    expect(new Set(byAttack.map((text) => toBox(parseRhythm(text), 12)))).toEqual(new Set(begins));
  });

  it.each([
    [12, 156, 1872],
    [8, 104, 1248],
  ])('13 sections of %d repeats: %d measures of 12/8, %d pulses (the score’s twelve; another source’s eight)', (repeats, measures, pulses) => {
    const whole = Array.from({ length: 13 }, (_, k) => Array.from({ length: repeats }, () => turned(k))).flat(2);
    expect(measuresOf(totalLength(whole), '12/8').toFraction()).toBe(String(measures));
    expect(totalLength(whole).mul(8).toFraction()).toBe(String(pulses));
  });
});

describe('counts of patterns, by rotating and dropping doubles', () => {
  const boxes = (n: number): string[] => Array.from({ length: 2 ** n }, (_, bits) => bits.toString(2).padStart(n, '0').replaceAll('1', 'x').replaceAll('0', '.'));
  const least = (box: string, readings: string[]): string =>
    readings
      .flatMap((one) => Array.from({ length: box.length }, (_, k) => toBox(rotate(fromBox(one), k, { pulse: '1/8' }), box.length)))
      .sort()[0]!;
  const reversed = (box: string) => [...box].reverse().join('');

  /** OEIS A000031 (number.house/seq/A000031) */
  it.each([[1, 2], [2, 3], [3, 4], [4, 6], [5, 8], [6, 14], [7, 20], [8, 36]])('A000031: necklaces of %d pulses: %d', (n, count) => {
    expect(new Set(boxes(n).map((box) => least(box, [box]))).size).toBe(count);
  });

  /** OEIS A000029; T19: necklaces and bracelets first differ at 6, 14 and 13 */
  it.each([[1, 2], [2, 3], [3, 4], [4, 6], [5, 8], [6, 13], [7, 18]])('A000029: bracelets of %d pulses: %d', (n, count) => {
    expect(new Set(boxes(n).map((box) => least(box, [box, reversed(box)]))).size).toBe(count);
  });

  it('8 attacks in 12 pulses: 495 patterns, 43 necklaces, 10 of them with no two rests side by side (recomputed)', () => {
    const all = boxes(12).filter((box) => at(box).length === 8);
    expect(all).toHaveLength(495);
    const necklaces = new Set(all.map((box) => least(box, [box])));
    expect(necklaces.size).toBe(43);
    expect([...necklaces].filter((box) => !(box + box).includes('..'))).toHaveLength(10);
  });
});

describe('a labelled cycle of 12 (Reich, Piano Phase, 1967: 12 notes, five pitches; en.wikipedia.org/wiki/Piano_Phase)', () => {
  const LABELS = ['E4', 'F#4', 'B4', 'C#5', 'D5', 'F#4', 'E4', 'C#5', 'B4', 'F#4', 'D5', 'C#5'];
  it('rotates with its labels, 12 ways, and is home again after 12', () => {
    const pitches = [...new Set(LABELS)];
    expect(pitches).toHaveLength(5);
    const cycle = parseRhythm(LABELS.map((label) => `1/16@${pitches.indexOf(label) + 1}`).join(' '));
    const labelsOf = (k: number) => rotate(cycle, k, { pulse: '1/16' }).map((v) => pitches[v.sound! - 1]);
    expect(labelsOf(1)).toEqual([...LABELS.slice(1), LABELS[0]]);
    expect(labelsOf(12)).toEqual(LABELS);
    expect(new Set(Array.from({ length: 12 }, (_, k) => labelsOf(k).join(' '))).size).toBe(12);
    expect(augment(cycle, 1)).toEqual(cycle);
  });
});
