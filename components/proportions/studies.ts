import { EngineError, type Fraction, LIMITS, type StudyInput, formatFraction, isFactor, toFraction } from '@/engine';
import { blankStudy } from '@/lib/client/new-study';

/** The subject of a new study lasts two measures. */
const SUBJECT_MEASURES = toFraction(2);

/** A study whose statements last so many measures of 4/4 each. */
export function studyOfLengths(title: string, lengths: readonly Fraction[]): StudyInput {
  const factors = lengths.slice(0, LIMITS.statements).map((length) => length.div(SUBJECT_MEASURES));
  const wrong = factors.findIndex((factor) => !isFactor(factor));
  if (wrong !== -1) throw new EngineError('invalid_factor', `A statement of ${lengths[wrong]!.toFraction(true)} measures is out of a study’s reach.`);
  return withProcess(title, { kind: 'proportion', factors: factors.map(formatFraction), entries: 'successive' });
}

type ProcessSection = Extract<StudyInput['sections'][number], { kind: 'process' }>;

export function withProcess(title: string, process: ProcessSection['process'], rest: Partial<ProcessSection> = {}, study: Partial<StudyInput> = {}): StudyInput {
  const section = blankStudy.sections[0] as ProcessSection;
  return { ...blankStudy, ...study, title, sections: [{ ...section, ...rest, process }] };
}

/** A study of lines that go round until they meet. */
export function studyOfCycles(cycles: readonly { length: Fraction; turns: Fraction }[]): StudyInput {
  if (cycles.some(({ turns }) => turns.compare(LIMITS.repeatCount) > 0)) throw new EngineError('too_large', `A line can be repeated ${LIMITS.repeatCount} times at most.`);
  const families = ['wood', 'skin', 'metal', 'found'] as const;
  const instruments = cycles.map((_, index) => ({ id: `cycle-${index + 1}`, name: `Cycle ${index + 1}`, family: families[index % families.length]! }));
  const lines = cycles.map(({ length, turns }, index) => ({ instrument: `cycle-${index + 1}`, rhythm: `[${formatFraction(length)}]x${turns.n}` }));
  return { ...blankStudy, title: 'Cycles', subjects: [], instruments, sections: [{ id: 'cycles', name: 'Cycles', role: 'other', kind: 'free', lines }] };
}
