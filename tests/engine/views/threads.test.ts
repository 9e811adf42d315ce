import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type Reading, type StudyInput, type ThreadReading, buildStudy, threadsOf } from '@/engine';

const study = (factors: string[], more: { readings?: Reading[]; rotations?: number[]; entries?: 'ending-together' } = {}): StudyInput => ({
  title: 'Weir',
  metre: '4/4',
  tempo: { beat: '1/4', perMinute: '60' },
  subjects: [{ id: 's', name: 'Subject', rhythm: '1/4 (1/8) 1/8 1/2' }],
  instruments: [
    { id: 'bell', name: 'Bell', family: 'metal' },
    { id: 'block', name: 'Block', family: 'wood' },
  ],
  sections: [
    { id: 'a', name: 'Rise', role: 'exposition', kind: 'process', subject: 's', process: { kind: 'proportion', factors, ...more }, instruments: ['bell', 'block'] },
  ],
});
const threads = (document: StudyInput, reading: ThreadReading) => threadsOf(buildStudy(document).statements, reading);
const shown = (document: StudyInput, reading: ThreadReading) =>
  threads(document, reading).rows.map(({ start, ticks }) => [start.toFraction(), ...ticks.map(({ at }) => at.toFraction())]);

describe('threadsOf', () => {
  test('in time, from one start, to one end', () => {
    const document = study(['1', '2']);
    expect(shown(document, 'in-time')).toEqual([['0', '0', '3/8', '1/2'], ['1', '1', '7/4', '2']]);
    expect(shown(document, 'from-one-start')).toEqual([['0', '0', '3/8', '1/2'], ['0', '0', '3/4', '1']]);
    expect(shown(document, 'to-one-end')).toEqual([['1', '1', '11/8', '3/2'], ['0', '0', '3/4', '1']]);
    expect(threads(document, 'in-time').extent.toFraction()).toBe('3');
    expect(threads(document, 'to-one-end').extent.toFraction()).toBe('2');
  });

  test('threads run parallel in augmentation, cross in a retrograde, wrap round in a rotation', () => {
    const pairs = (document: StudyInput) => threads(document, 'from-one-start').threads.map(({ from, to }) => [from, to]);
    expect(pairs(study(['1', '2']))).toEqual([[0, 0], [1, 1], [2, 2]]);
    expect(pairs(study(['1', '1'], { readings: ['forwards', 'backwards-values'] }))).toEqual([[0, 2], [1, 1], [2, 0]]);
    expect(pairs(study(['1', '1'], { rotations: [0, 1] }))).toEqual([[0, 2], [1, 0], [2, 1]]);
  });

  test('every thread ties the same attack of the subject, each attack once', () => {
    const reading = fc.constantFrom<Reading>('forwards', 'backwards-values', 'backwards-attacks');
    fc.assert(
      fc.property(fc.array(reading, { minLength: 1, maxLength: 4 }), fc.array(fc.integer({ min: -5, max: 5 }), { minLength: 1, maxLength: 4 }), (readings, rotations) => {
        const { rows, threads: all } = threads(study(['1', '3/2', '2', '3'], { readings, rotations }), 'in-time');
        expect(all).toHaveLength(3 * 3);
        for (const { row, from, to, origin } of all) {
          expect(rows[row]!.ticks[from]!.origin).toBe(origin);
          expect(rows[row + 1]!.ticks[to]!.origin).toBe(origin);
        }
        for (let row = 0; row < 3; row += 1) {
          expect(new Set(all.filter((one) => one.row === row).map(({ to }) => to)).size).toBe(3);
        }
      }),
    );
  });
});
