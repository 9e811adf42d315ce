import { type Rhythm, type Step, applySteps, attacks, checkAnswer, findTransformations, parseRhythm, rotate } from '../../engine';
import { medianOf, report } from './measure';

/** Lengths that do not recur in any order. */
const lengths = ['1/4', '1/8', '(1/8)', '3/16', '1/16', '5/16'];
const line = (size: number): Rhythm => parseRhythm(Array.from({ length: size }, (_, index) => lengths[(index * index + 3 * index) % 7 % lengths.length]).join(' '));

/** For scale: as many plain comparisons as the task has values. */
const plain = (rhythm: Rhythm): number => medianOf(() => rhythm.map(({ length }) => length.valueOf()).reduce((a, b) => a + b, 0));

function finding(): boolean {
  return report('findTransformations: a rhythm stretched, reversed and rotated', [100, 1_000, 10_000].map((size) => {
    const from = line(size);
    const to = rotate(applySteps(from, [{ kind: 'augment', factor: '7/5' }, { kind: 'retrograde', by: 'attacks' }]), Math.floor(size / 3), 'values');
    return { attacks: attacks(from).length, ms: medianOf(() => findTransformations(from, to)), plainMs: plain(from) };
  }));
}

function checking(): boolean {
  const steps: Step[] = [{ kind: 'augment', factor: '3/2' }];
  return report('checkAnswer: one value left out in the middle', [100, 1_000, 10_000].map((size) => {
    const subject = line(size);
    const answer = applySteps(subject, steps).toSpliced(Math.floor(size / 2), 1);
    return { attacks: attacks(subject).length, ms: medianOf(() => checkAnswer({ subject, steps, answer })), plainMs: plain(subject) };
  }));
}

process.exitCode = [finding(), checking()].every(Boolean) ? 0 : 1;
