import { EngineError } from '../errors';
import { spellLine } from '../notation/spell-line';
import type { NotationMeasure } from '../notation/types';
import type { Rhythm } from '../rhythm/types';
import { type LineSource, assembleLine, statementsOf } from '../study/line';
import type { Instrument, Study } from '../study/schema';
import type { BuiltStudy } from '../study/types';
import { type PlannedMeasure, metrePlan, planMeasures } from './measures';

export type Staff = {
  readonly instrument: Instrument;
  /** one for each planned measure; empty where the line cannot be written */
  readonly measures: readonly NotationMeasure[];
  /** the line that is spelled: symbols point into it by index */
  readonly values: Rhythm;
  /** for each value of the line, the statement that it belongs to */
  readonly sources: readonly LineSource[];
  /** why the line cannot be written */
  readonly error?: EngineError;
};

export type Score = { readonly measures: readonly PlannedMeasure[]; readonly staves: readonly Staff[] };

/** A refusal to spell, told in terms of the statement it happens in. */
function explain(study: Study, sources: readonly LineSource[], error: EngineError): EngineError {
  const { value, nearest } = error as EngineError & { value?: number; nearest?: readonly { toString(): string }[] };
  const source = value === undefined ? null : sources[value];
  if (!source || nearest === undefined) return error;
  const section = study.sections.find(({ id }) => id === source.statement.section);
  const told = new EngineError(error.code, `“${section?.name}”, statement ${source.statement.index + 1}: ${error.message}`, {
    section: source.statement.section,
  });
  return told;
}

/** The whole score: every instrument's line, spelled in the study's metres, with the way back to its statements. */
export function scoreOf(study: Study, built: BuiltStudy): Score {
  const plan = metrePlan(study, built);
  const staves = study.instruments.map((instrument): Staff => {
    const { values, sources } = assembleLine(statementsOf(built.statements, instrument.id), built.totalLength);
    try {
      return { instrument, measures: spellLine(values, plan), values, sources };
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      return { instrument, measures: [], values, sources, error: explain(study, sources, error) };
    }
  });
  return { measures: planMeasures(study, built), staves };
}
