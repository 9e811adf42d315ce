export { EngineError, RhythmTextError, type EngineErrorCode } from './errors';
export { LIMITS } from './limits';
export { Fraction, formatFraction, isFactor, toFraction, toFactor, type Exact } from './exact/fraction';

export type { Reading, RetrogradeBy, Rhythm, Value } from './rhythm/types';
export { parseRhythm } from './rhythm/parse';
export { formatRhythm } from './rhythm/format';
export { attacks, measuresOf, totalLength } from './rhythm/measure';
export { parseMetre, metreOfLength, type Metre, type MetreKind, type ParsedMetre } from './rhythm/metre';
export { parseTempo, secondsOf, type Tempo } from './rhythm/tempo';

export { addToEach, augment, diminish } from './transform/augment';
export { retrograde } from './transform/retrograde';
export { rotate, type RotateBy } from './transform/rotate';
export { applySteps, type Step } from './transform/steps';

export { ladder, type Ladder } from './proportion/ladder';
export { checkLadder, claimWords, type LadderClaim } from './proportion/claim';
export { alignment } from './proportion/alignment';
export { canonEntries, type CanonVoice } from './proportion/canon-entries';
export { meetingOf, type EnteringCycle, type Meeting } from './proportion/meeting';
export { divide, fibonacci, roundParts, type RoundedPart } from './proportion/divide';
export { proportionName, proportionOf, type NamedProportion, type ProportionGenus } from './proportion/named';
export { pivotFor, tempoChain, type ChainedTempo, type Pivot } from './proportion/tempo-chain';
export { tempoFor } from './proportion/tempo-for';
export { resultant } from './proportion/resultant';
export { euclidean } from './proportion/euclidean';

export {
  parseStudy,
  studySchema,
  type Entries,
  type Family,
  type FreeSection,
  type Instrument,
  type MirrorSection,
  type Process,
  type ProcessSection,
  type ProportionProcess,
  type Role,
  type Section,
  type Study,
  type StudyInput,
} from './study/schema';
export { buildStudy } from './study/build';
export { stepsSchema } from './study/fields';
export type { LineSource } from './study/line';
export { proportionFactors } from './process/proportion';
export { PROCESSES, processChoices, rulesOf, type ProcessKind } from './process/registry';
export type { BuiltSection, BuiltStudy, Line, Palindrome, PalindromeSense, Statement } from './study/types';

export { spellLine } from './notation/spell-line';
export { SpellingError } from './notation/spelling-error';
export { symbolLength, writtenLength } from './notation/symbol-length';
export type { BeamMark, Base, MetrePlan, NotationMeasure, NotationSymbol, TupletMark } from './notation/types';
export type { PlayEvent } from './views/types';
export { clockOf, formatClock, spokenClock, type Clock, type ClockSpan } from './views/clock';
export {
  measureAt,
  metreOf,
  metrePlan,
  placeWords,
  planMeasures,
  tempoOf,
  writingOf,
  type MetreChange,
  type PlannedMeasure,
} from './views/measures';
export type { Repeat } from './views/repeats';
export { stretchedMetre, type Writing } from './views/writing';
export { tempoMarkWords, tempoMarks, type TempoMark } from './views/tempo-marks';
export { compareWritings, legibilityOf, legibilityWords, type Legibility, type WritingChoice } from './views/legibility';
export { scoreOf, type Score, type Staff } from './views/score';
export { CLICK, clickEvents, type ClickEvent, type ClickKind, type ClickTrack } from './views/click';
export { playEvents } from './views/play-events';
export { endWords, statementEnds, type StatementEnd } from './views/statement-ends';
export { printScore } from './print/print-score';
export { printRhythm } from './print/print-rhythm';
export { restRuns, type RestRun } from './print/rest-runs';
export { dynamicsOf, readDynamics, reversedDynamics, sectionDynamics, type Dynamic } from './print/dynamics';
export type { Cue, InstrumentChange, PrintCell, PrintGroup, PrintMeasure, PrintNote, PrintScore, PrintStaff, StaffDynamic, StaffPlace } from './print/types';
export { threadsOf, type Thread, type ThreadReading, type ThreadRow, type ThreadTick, type Threads } from './views/threads';

export {
  describeContext,
  describeSection,
  describeStatement,
  describeStudy,
  palindromeWords,
  tempoWords,
  type DescribeContext,
} from './describe/describe';
export { sectionSentence } from './describe/sentence';
export { readingWords, rotationWords, stepWords, type FieldControl, type FieldInput, type SentenceControl, type SentencePart } from './describe/sentence-parts';
export { mirrorWords, sectionRemarks, sectionSum, studyMetres, studySum, sumWords, type Remark, type Sum } from './describe/sums';
export { inSentence, listWords, measureNumber, measureWords, valueName, type DescribeOptions, type ValueNames } from './describe/words';

export { countSubjects, generateSubject } from './subjects/generate';
export { NoSubjectError, type GeneratedSubject, type SubjectConstraint, type SubjectConstraints } from './subjects/types';
export { countPatterns, type PatternCounts } from './subjects/count-patterns';
export { goldenSection } from './subjects/golden-section';
export { CATALOGUE } from './subjects/catalogue/catalogue';
export { searchCatalogue, type CatalogueQuery } from './subjects/catalogue/search-catalogue';
export type { CatalogueEntry, CatalogueFamily } from './subjects/catalogue/figure';

export { findTransformations, type Transformation } from './find/find-transformations';
export { nearestTransformation, type FittingStretch, type NearestTransformation } from './find/nearest-transformation';

export { checkAnswer } from './check/check-answer';
export type { SpellingRemark } from './check/spelling-remarks';
export { MISTAKES, type CheckInput, type CheckedAnswer, type CheckedValue, type Diagnosis, type Mistake, type MistakeAt, type Verdict } from './check/types';

export { packMxl } from './exchange/pack-mxl';
export { toMusicXML } from './exchange/to-musicxml';
export { staffShape, type StaffShape } from './print/staff-shape';
export { midiDivision, toMidi } from './exchange/to-midi';
export type { MidiDivision } from './exchange/write/division';
export { statementsCsv } from './exchange/statements-csv';
export { fromMidi } from './exchange/from-midi';
export { fromMusicXML } from './exchange/from-musicxml';
export { holdToNext } from './exchange/assemble';
export { readMusic } from './exchange/read-music';
export { takeMeasures, type TakenMeasures } from './exchange/take-measures';
export type { Candidate, ReadMeasure, ReadOptions } from './exchange/types';
