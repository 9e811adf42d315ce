import fc from 'fast-check';
import { EngineError, type StudyInput, buildStudy, parseStudy, printScore } from '@/engine';
import { arbitraryProcessSection } from '../engine/process/arbitrary-process';
import { arbitraryStudy } from '../engine/study/arbitrary-study';
import { study } from '../engine/study/make-study';

/** Names that a careless writer of files would break over. */
const hostile = fc.constantFrom('Weir', '=1+1', '@SUM(A1)', '-2', '“Quoted” & <bold>', 'a,b;c "d"', 'Zeile\nzwei', '鼓 🥁', ']]>', '&amp;', '\u0001bell', 'tab\tand more');
const dynamics = fc.constantFrom(undefined, 'mf', 'p < f', 'ff > p < mf', 'very quietly', '< f', 'sfz');
const maybe = fc.boolean();

/** Studies with everything that a file can hold, on top of any study: names, marks, dynamics, fermatas, players, metres. */
const decorated = fc
  .tuple(
    fc.oneof(arbitraryStudy, arbitraryProcessSection('1/4 1/8 (1/8) 3/8').map((section) => study([section], { subjects: [{ id: 's', name: 'S', rhythm: '1/4 1/8 (1/8) 3/8' }] }))),
    fc.record({ title: hostile, name: hostile, composer: hostile, dynamics, perStatement: fc.array(fc.constantFrom('p', 'f > p', ''), { maxLength: 3 }), fermata: maybe, metre: fc.constantFrom('4/4', '3/4', '6/8', '7/8', '3+2+2/8'), marks: maybe, perMinute: fc.constantFrom('60', '84', '126', '72 1/2') }),
  )
  .map(([document, extra]): StudyInput => ({
    ...document,
    title: extra.title,
    composer: extra.composer,
    rights: `© ${extra.name}`,
    metre: extra.metre,
    tempo: { beat: '1/4', perMinute: extra.perMinute },
    players: [
      { id: 'p', name: extra.name, instruments: ['bell', 'block', 'pot'] },
      { id: 'q', name: 'Other', instruments: ['drum', 'pot'] },
    ],
    subjects: document.subjects!.map((subject) => ({ ...subject, ...(extra.marks ? { marks: [{ attack: 0, ends: 'let-ring' as const }, { attack: 1, ends: 'choke' as const }] } : {}) })),
    sections: document.sections.map((section, index) => ({
      ...section,
      name: index === 0 ? extra.name : section.name,
      ...(extra.dynamics === undefined || index % 2 === 1 ? {} : { dynamics: extra.dynamics }),
      ...(extra.fermata ? { fermata: true as const } : {}),
      ...(section.kind === 'process' && extra.perStatement.length > 0 ? { statementDynamics: extra.perStatement } : {}),
    })),
  }));

const MEASURES = 160;

/** Whether a study can be written at all, and is of a size that a test reads in no time. */
function isWritten(document: StudyInput): boolean {
  try {
    const parsed = parseStudy(document);
    const built = buildStudy(parsed);
    if (built.statements.reduce((sum, { rhythm }) => sum + rhythm.length, 0) > 600 || built.totalLength.compare(MEASURES) > 0) return false;
    const { failures, measures } = printScore(parsed, built);
    return failures.length === 0 && measures.length > 0 && measures.length <= MEASURES;
  } catch (error) {
    if (error instanceof EngineError) return false;
    throw error;
  }
}

/** So many random studies that can be written, always the same for the same seed. */
export function writtenStudies(count: number, seed: number): StudyInput[] {
  const found: StudyInput[] = [];
  for (let round = 0; found.length < count && round < 40; round += 1) found.push(...fc.sample(decorated, { seed: seed + round, numRuns: count }).filter(isWritten));
  return found.slice(0, count);
}
