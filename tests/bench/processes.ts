import { type StudyInput, attacks, buildStudy, parseStudy } from '../../engine';
import { medianOf, report } from './measure';
import { METRE, doubles, placePlain } from './plain-numbers';

type Process = Extract<StudyInput['sections'][number], { kind: 'process' }>['process'];
const VALUES = ['3/8', '1/8', '1/4', '(1/4)', '1/8', '1/8', '1/4', '1/2'];
const subjectOf = (values: number): string => Array.from({ length: values }, (_, index) => VALUES[index % VALUES.length]).join(' ');
const ATTACKS_OF = 7 / 8;
const INSTRUMENTS = ['a', 'b'];

function studyOf(process: Process, values: number): StudyInput {
  return {
    title: 'Measured', metre: '4/4', tempo: { beat: '1/4', perMinute: '84' },
    subjects: [{ id: 's', name: 'Subject', rhythm: subjectOf(values) }],
    instruments: INSTRUMENTS.map((id) => ({ id, name: id, family: 'wood' })),
    sections: [{ id: 'x', name: 'X', role: 'development', kind: 'process', subject: 's', process, instruments: INSTRUMENTS }],
  };
}

/** Each process with a subject of so many values that about so many attacks come of it. */
const CASES: Readonly<Record<string, (attacksWanted: number) => StudyInput>> = {
  proportion: (n) => studyOf({ kind: 'proportion', factors: ['1', '5/4', '3/2', '2'] }, Math.round(n / 4 / ATTACKS_OF)),
  rotation: (n) => studyOf({ kind: 'rotation', steps: 3, by: { pulse: '1/8' }, count: 8 }, Math.round(n / 8 / ATTACKS_OF)),
  phase: (n) => studyOf({ kind: 'phase', pulse: '1/8', shift: 1, repeatsPerShift: 4, shifts: 12 }, Math.round(n / 104 / ATTACKS_OF)),
  // The sum of 1 to the number of values.
  additive: (n) => studyOf({ kind: 'additive', direction: 'growing', from: 'front', repeatsEach: 1 }, Math.round(Math.sqrt((2 * n) / ATTACKS_OF))),
  // Stages and attacks both grow with the order.
  'filling-in': (n) => {
    const order = Math.min(256, Math.round(Math.sqrt(2 * n)));
    const repeatsEach = Math.max(1, Math.round((2 * n) / order ** 2));
    return studyOf({ kind: 'filling-in', order: Array.from({ length: order }, (_, k) => k), repeatsEach }, Math.ceil(order / ATTACKS_OF));
  },
  cycle: (n) => studyOf({ kind: 'cycle', colour: ['a', 'b', 'a'], until: 8 }, Math.round(n / 8 / ATTACKS_OF)),
};

const held = Object.entries(CASES).map(([kind, make]) =>
  report(`buildStudy: ${kind}`, [1_000, 10_000, 100_000].map((size) => {
    const study = parseStudy(make(size));
    const { lines } = buildStudy(study);
    const plain = lines.map(({ rhythm }) => doubles(rhythm));
    return {
      attacks: lines.reduce((sum, { rhythm }) => sum + attacks(rhythm).length, 0),
      ms: medianOf(() => buildStudy(study)),
      plainMs: medianOf(() => plain.map((line) => placePlain(line, METRE))),
    };
  })),
);
process.exitCode = held.every(Boolean) ? 0 : 1;
console.log(process.exitCode === 0 ? '\nEvery growth is within the limit.' : '\nA growth passes the limit.');
