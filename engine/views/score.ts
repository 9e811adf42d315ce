import { EngineError } from '../errors';
import { formatFraction } from '../exact/fraction';
import { nearestFactors } from '../notation/nearest';
import { canSpell, spellLine } from '../notation/spell-line';
import { SpellingError } from '../notation/spelling-error';
import type { MetrePlan, NotationMeasure } from '../notation/types';
import type { Rhythm } from '../rhythm/types';
import { type LineSource, assembleLine, lineSources, placesOf, statementsOf } from '../study/line';
import type { Instrument, Study } from '../study/schema';
import type { BuiltStudy } from '../study/types';
import { type PlannedMeasure, metrePlan, planMeasures } from './measures';
import { type Repeat, repeatsOf } from './repeats';
import { isUnscaled, writtenLine, writtenPlan } from './written-line';
import { writtenSpans } from './writing';

export type Staff = {
  readonly instrument: Instrument;
  /** one for each planned measure; empty where the line cannot be written */
  readonly measures: readonly NotationMeasure[];
  /** the line that is spelled, at its written lengths: symbols point into it by index */
  readonly values: Rhythm;
  /** for each value of the line, the statement that it belongs to */
  readonly sources: readonly LineSource[];
  /** why the line cannot be written */
  readonly error?: EngineError;
};

export type Score = {
  readonly measures: readonly PlannedMeasure[];
  readonly staves: readonly Staff[];
  /** what is printed once and played several times, in order */
  readonly repeats: readonly Repeat[];
  /** sections that cannot be written as they ask, and why; they are written in longer values */
  readonly refusals: readonly EngineError[];
};

/**
 * A refusal to spell, told of the statement it happens in, with the factors near its own that can be written there.
 * @param plan - null where stretches are written as tempos, and other factors would change them
 */
function explain(study: Study, measures: readonly PlannedMeasure[], plan: MetrePlan | null, sources: readonly LineSource[], error: EngineError): EngineError {
  const source = error instanceof SpellingError ? sources[error.value] : null;
  if (!(error instanceof SpellingError) || !source) return error;
  const { statement } = source;
  const section = study.sections.find(({ id }) => id === statement.section)!;
  const lead: Rhythm = statement.start.n === 0n ? [] : [{ length: statement.start, rest: true }];
  const stretches = plan === null ? [] : nearestFactors(statement.rhythm, (stretched) => canSpell([...lead, ...stretched], plan));
  const factors = stretches.map((stretch) => formatFraction(statement.factor.mul(stretch)));
  const length = formatFraction(statement.rhythm[source.value]!.length);
  const what = statement.subject === null ? 'Line' : `At ${formatFraction(statement.factor)} times its length, statement`;
  const offer = factors.length === 0 ? '' : statement.subject === null ? ` Stretched ${stretches.map(formatFraction).join(' or ')} times, it could.` : ` Factors near it that can: ${factors.join(', ')}.`;
  return new EngineError(
    error.code,
    `${what} ${statement.index + 1} of “${section.name}” cannot be written with ties and tuplets: see measure ${measures[error.measure]?.number ?? error.measure + 1}, where a value lasts ${length}.${offer}`,
    { section: section.id },
  );
}

/** The whole score: every instrument's line, spelled in the study's metres, with the way back to its statements. */
export function scoreOf(study: Study, built: BuiltStudy): Score {
  const sounding = metrePlan(study, built);
  const plan = writtenPlan(sounding);
  const measures = planMeasures(study, built);
  const places = placesOf(built.statements, built.totalLength);
  const staves = study.instruments.map((instrument): Staff => {
    const own = statementsOf(built.statements, instrument.id, places);
    const line = { values: assembleLine(own, built.totalLength, places), sources: lineSources(own, built.totalLength, places) };
    const { values, sources } = isUnscaled(sounding) ? line : writtenLine(line.values, line.sources, sounding);
    try {
      return { instrument, measures: spellLine(values, plan), values, sources };
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      return { instrument, measures: [], values, sources, error: explain(study, measures, isUnscaled(sounding) ? plan : null, sources, error) };
    }
  });
  return { measures, staves, repeats: repeatsOf(measures, staves, built), refusals: writtenSpans(study, built).refusals };
}
