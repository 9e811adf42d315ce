import fc from 'fast-check';
import { type StudyInput, attacks, formatFraction, parseRhythm } from '@/engine';
import { arbitraryLength } from '../rhythm/arbitrary-rhythm';
import { INSTRUMENTS } from '../study/make-study';

type ProcessSection = Extract<StudyInput['sections'][number], { kind: 'process' }>;
type Process = ProcessSection['process'];

const reading = fc.constantFrom('forwards' as const, 'backwards-values' as const, 'backwards-attacks' as const);
const length = arbitraryLength.map(formatFraction);
const by = fc.oneof(fc.constantFrom('values' as const, 'attacks' as const), length.map((pulse) => ({ pulse })));
const some = fc.integer({ min: 1, max: 4 });

/** A process of each kind but proportion, for a subject of so many attacks. */
export const arbitraryProcess = (subjectAttacks: number): fc.Arbitrary<Process> =>
  fc.oneof(
    fc.record({ kind: fc.constant('rotation' as const), steps: fc.integer({ min: -5, max: 5 }), by, count: some, reading }),
    fc.record({ kind: fc.constant('phase' as const), pulse: length, shift: fc.integer({ min: -3, max: 3 }), repeatsPerShift: some, shifts: fc.integer({ min: 0, max: 3 }), reading }),
    fc.record({ kind: fc.constant('additive' as const), direction: fc.constantFrom('growing' as const, 'shrinking' as const), from: fc.constantFrom('front' as const, 'back' as const), repeatsEach: some, reading }),
    fc.record({ kind: fc.constant('filling-in' as const), order: fc.shuffledSubarray(Array.from({ length: subjectAttacks }, (_, k) => k)), repeatsEach: some, reading }),
    fc.record({ kind: fc.constant('cycle' as const), colour: fc.array(fc.constantFrom(...INSTRUMENTS), { minLength: 1, maxLength: 5 }), until: some, reading }),
    fc.record({ kind: fc.constant('resultant' as const), a: fc.integer({ min: 1, max: 12 }), b: fc.integer({ min: 1, max: 12 }), unit: length }),
  );

/** A section of such a process on the subject `s`, played by two instruments. */
export const arbitraryProcessSection = (rhythm: string): fc.Arbitrary<ProcessSection> =>
  arbitraryProcess(attacks(parseRhythm(rhythm)).length).map((process) => ({
    id: 'a', name: 'A', role: 'exposition', kind: 'process', subject: 's', instruments: ['bell', 'block'], process,
  }));
