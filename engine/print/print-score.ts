import { EngineError } from '../errors';
import { placesOf, statementsOf } from '../study/line';
import type { Study } from '../study/schema';
import type { BuiltStudy } from '../study/types';
import { clockOf } from '../views/clock';
import { measureAt } from '../views/measures';
import type { Repeat } from '../views/repeats';
import { type Score, type Staff, scoreOf } from '../views/score';
import { tempoMarks } from '../views/tempo-marks';
import { cellOf, isSilent } from './cells';
import { cuesFor } from './cues';
import { type Dynamic, dynamicsOf } from './dynamics';
import { lanesOf, turnsOf } from './lanes';
import { rehearsalLetters } from './letters';
import { remembered } from './remembered';
import { staffDynamics } from './staff-dynamics';
import type { PrintGroup, PrintMeasure, PrintScore, PrintStaff } from './types';

type Sources = {
  readonly study: Study;
  readonly built: BuiltStudy;
  readonly score: Score;
  readonly dynamics: ReadonlyMap<string, readonly Dynamic[]>;
  /** indices of the measures whose end is held */
  readonly held: ReadonlySet<number>;
};

/** A repeat in which a dynamic changes after its first time is written out. */
function quietRepeats({ score, built, dynamics }: Pick<Sources, 'score' | 'built' | 'dynamics'>): Repeat[] {
  const changes = built.statements.flatMap(({ id }) => dynamics.get(id) ?? []);
  return score.repeats.filter(({ first, length, times }) => {
    const [start, end] = [score.measures[first]!.start, score.measures[first + length * times]?.start ?? built.totalLength];
    return changes.every((one) => (one.kind === 'level' ? one.at.compare(start) <= 0 || one.at.compare(end) >= 0 : one.to.compare(start) <= 0 || one.from.compare(end) >= 0));
  });
}

function measuresOf({ study, built, score }: Sources, repeats: readonly Repeat[]): PrintMeasure[] {
  const clock = clockOf(study, built);
  const letters = rehearsalLetters(score.measures, built, repeats);
  const tempos = new Map(tempoMarks(study, built, score.measures).map((mark) => [mark.measure, mark]));
  const sections = new Map<number, { id: string; name: string }[]>();
  study.sections.forEach(({ id, name }, index) => {
    const { start, length } = built.sections[index]!;
    const measure = length.n === 0n ? undefined : measureAt(score.measures, start);
    if (measure !== undefined) sections.set(measure.index, [...(sections.get(measure.index) ?? []), { id, name }]);
  });
  const begins = new Set(repeats.map(({ first }) => first));
  const ends = new Map(repeats.map(({ first, length, times }) => [first + length - 1, times]));
  return score.measures.map((measure): PrintMeasure => {
    const times = ends.get(measure.index);
    return {
      ...measure,
      sections: sections.get(measure.index) ?? [],
      letter: letters.get(measure.index) ?? null,
      tempo: tempos.get(measure.index) ?? null,
      seconds: clock.secondsAt(measure.start),
      ...(begins.has(measure.index) ? { begins: true as const } : {}),
      ...(times === undefined ? {} : { times }),
    };
  });
}

/** The measures whose last symbol carries a fermata: those that a section marked so ends with. */
function heldMeasures(study: Study, built: BuiltStudy, score: Score): Set<number> {
  const held = new Set<number>();
  study.sections.forEach(({ fermata }, index) => {
    const { start, length } = built.sections[index]!;
    if (!fermata || length.n === 0n) return;
    const measure = measureAt(score.measures, start.add(length));
    // A section that ends at a bar line ends with the measure before it.
    if (measure !== undefined) held.add(measure.start.equals(start.add(length)) ? Math.max(0, measure.index - 1) : measure.index);
  });
  return held;
}

function staffOf(sources: Sources, id: string, lane: readonly Staff[]): PrintStaff {
  const { built, score, dynamics, held } = sources;
  const count = score.measures.length;
  const { turns, changes } = lane.length === 1 ? { turns: null, changes: [] } : turnsOf(lane, count);
  const who = (index: number): Staff => lane[turns === null ? 0 : turns[index]!]!;
  const instruments = new Set(lane.map(({ instrument }) => instrument.id));
  const places = placesOf(built.statements, built.totalLength);
  const own = [...new Set([...instruments].flatMap((one) => statementsOf(built.statements, one, places).map((statement) => statement.id)))];
  const byId = new Map(built.statements.map((statement) => [statement.id, statement]));
  const statements = own.map((one) => byId.get(one)!).toSorted((a, b) => a.start.compare(b.start));
  return {
    id,
    instruments: lane.map(({ instrument, values }) => ({ ...instrument, sounds: instrument.sounds ?? values.reduce((most, { sound }) => Math.max(most, sound ?? 1), 1) })),
    cell: remembered((index) => cellOf(who(index), index, held.has(index))),
    isSilent: remembered((index) => isSilent(who(index), index)),
    dynamics: staffDynamics(statements, instruments, dynamics, score.measures),
    changes,
    cues: [],
  };
}

/** An instrument as if somebody played it alone. */
function playerOf(study: Study, instrument: string): Study['players'][number] | undefined {
  const own = study.instruments.find(({ id }) => id === instrument);
  return own === undefined ? undefined : { id: own.id, name: own.name, instruments: [own.id] };
}

/** Neighbouring staves of one player. */
function groupsOf(study: Study, staves: readonly PrintStaff[]): PrintGroup[] {
  const whose = (staff: PrintStaff) => study.players.find(({ instruments }) => instruments.includes(staff.instruments[0]!.id));
  const groups: PrintGroup[] = [];
  staves.forEach((staff, index) => {
    const player = whose(staff);
    const last = groups.at(-1);
    if (player === undefined) return;
    if (last !== undefined && last.player === player.id && last.first + last.length === index) groups[groups.length - 1] = { ...last, length: last.length + 1 };
    else groups.push({ player: player.id, name: player.name, first: index, length: 1 });
  });
  return groups;
}

/**
 * Everything that is printed of a study: of the whole, one staff an instrument, in the study's order; of a player's part, as few
 * staves as will do, with changes of instrument and cues.
 * @param options.part - id of a player, or of an instrument that is to have a part of its own
 * @throws EngineError `unknown_player`
 */
export function printScore(study: Study, built: BuiltStudy, { part }: { part?: string } = {}): PrintScore {
  const score = scoreOf(study, built);
  const player = part === undefined ? null : (study.players.find(({ id }) => id === part) ?? playerOf(study, part));
  if (player === undefined) throw new EngineError('unknown_player', `There is no player and no instrument “${part}” in this study.`);
  const dynamics = dynamicsOf(study, built);
  const repeats = quietRepeats({ score, built, dynamics });
  const sources: Sources = { study, built, score, dynamics, held: heldMeasures(study, built, score) };
  const written = score.staves.filter(({ error }) => error === undefined);
  const measures = measuresOf(sources, repeats);
  const printed = measures.map(({ index }) => index).filter((index) => !repeats.some(({ first, length, times }) => index >= first + length && index < first + length * times));
  const isPrinted = new Set(printed);
  let staves: PrintStaff[];
  if (player === null) staves = written.map((staff) => staffOf(sources, staff.instrument.id, [staff]));
  else {
    const own = written.filter(({ instrument }) => player.instruments.includes(instrument.id));
    const others = written.filter(({ instrument }) => !player.instruments.includes(instrument.id));
    staves = lanesOf(own, measures.length)
      .map((lane, index) => staffOf(sources, `${player.id}.${index + 1}`, lane))
      .map((staff, _, all) => ({
        ...staff,
        cues: all.length > 1 ? [] : cuesFor(staff, others, measures.length, (index) => isPrinted.has(index)),
      }));
  }
  return {
    title: study.title,
    composer: study.composer || null,
    rights: study.rights || null,
    players: study.players,
    part: player === null ? null : { id: player.id, name: player.name },
    measures,
    printed,
    staves,
    groups: player === null ? groupsOf(study, staves) : [],
    repeats,
    duration: clockOf(study, built).total,
    failures: score.staves.flatMap(({ instrument, error }) => (error === undefined ? [] : [{ instrument, error }])),
    refusals: score.refusals,
  };
}
