import { EngineError } from '../errors';
import type { Fraction } from '../exact/fraction';
import { dynamicsOf } from '../print/dynamics';
import { parseMetre } from '../rhythm/metre';
import { secondsOfWhole } from '../rhythm/tempo';
import { buildStudy } from '../study/build';
import { type Study, type StudyInput, parseStudy } from '../study/schema';
import type { BuiltStudy } from '../study/types';
import { type PlannedMeasure, metrePlan, planMeasures, tempoOf } from '../views/measures';
import { playEvents } from '../views/play-events';
import type { PlayEvent } from '../views/types';
import { type MidiDivision, divisionFor } from './write/division';
import { percussionKeys } from './write/gm-percussion';
import { loudnessAt } from './write/loudness';
import { type MidiEvent, headerChunk, meta, textBytes, threeBytes, trackChunk } from './write/midi-bytes';
import { writtenTime } from './write/written-time';

/** Channel 10, counted from 0. */
const PERCUSSION = 9;
const ACCENTS = { none: 0, accent: 16, strong: 28 } as const;
/** Microseconds of a quarter: three bytes. */
const SLOWEST = 0xffffff;

type Timed = { readonly event: PlayEvent; readonly start: Fraction; readonly end: Fraction };
type Prepared = { readonly study: Study; readonly built: BuiltStudy; readonly measures: readonly PlannedMeasure[]; readonly written: (position: Fraction) => Fraction; readonly timed: readonly Timed[]; readonly division: MidiDivision };

function prepare(document: StudyInput): Prepared {
  const study = parseStudy(document);
  const built = buildStudy(study);
  const measures = planMeasures(study, built);
  const written = writtenTime(metrePlan(study, built));
  const statements = new Map(built.statements.map((statement) => [statement.id, statement]));
  const timed = playEvents(study, built).map((event): Timed => {
    const start = written(event.position);
    const end = written(event.position.add(statements.get(event.statement)!.rhythm[event.value]!.length));
    return { event, start, end };
  });
  const marks = [...measures.map(({ start }) => start), ...built.sections.map(({ start }) => start), built.totalLength];
  const positions = function* (): Generator<Fraction> {
    for (const { start, end } of timed) {
      yield start.mul(4);
      yield end.mul(4);
    }
    for (const mark of marks) yield written(mark).mul(4);
  };
  return { study, built, measures, written, timed, division: divisionFor(positions()) };
}

/** How finely `toMidi` writes a study, and how far off it is where its lengths have no common tick up to 32,767 a quarter. */
export const midiDivision = (document: StudyInput): MidiDivision => prepare(document).division;

function tempoEvent(whole: Fraction): number[] {
  const microseconds = Number(whole.mul(250_000).round().n);
  if (microseconds > SLOWEST || microseconds < 1) {
    throw new EngineError('cannot_write', 'A MIDI file cannot hold this tempo: a quarter may last from a millionth of a second to 16.7 seconds.');
  }
  return meta(0x51, threeBytes(microseconds));
}

/** Numerator, power of two, clocks of a beat (24 a quarter), 32nds of a quarter. */
function metreEvent(text: string): number[] {
  const { count, unit, groups, kind } = parseMetre(text);
  const beat = kind === 'compound' ? groups[0]! : 1;
  return meta(0x58, [count, Math.round(Math.log2(unit)), Math.max(1, Math.min(255, Math.round((96 * beat) / unit))), 8]);
}

/** Title, rights, tempos, metres and the names of the sections. */
function conductorTrack({ study, built, measures, written }: Prepared, ticks: (position: Fraction) => number): MidiEvent[] {
  const events: MidiEvent[] = [{ at: 0, order: 0, bytes: meta(0x03, textBytes(study.title)) }];
  if (study.rights) events.push({ at: 0, order: 0, bytes: meta(0x02, textBytes(study.rights)) });
  let metre = '';
  for (const measure of measures) {
    if (measure.metre === metre) continue;
    metre = measure.metre;
    events.push({ at: ticks(written(measure.start)), order: 1, bytes: metreEvent(metre) });
  }
  study.sections.forEach(({ name }, index) => {
    const { start, length } = built.sections[index]!;
    if (length.n > 0n) events.push({ at: ticks(written(start)), order: 3, bytes: meta(0x06, textBytes(name)) });
  });
  const changes = [...metrePlan(study, built).map(({ at }) => at), ...built.sections.map(({ start }) => start)].toSorted((a, b) => a.compare(b));
  const plan = metrePlan(study, built);
  let before: Fraction | null = null;
  for (const at of changes) {
    if (at.compare(built.totalLength) >= 0 && at.n !== 0n) continue;
    const section = study.sections[built.sections.findLastIndex(({ start }) => start.compare(at) <= 0)]!;
    const scale = plan.findLast((change) => change.at.compare(at) <= 0)!.scale;
    const whole = secondsOfWhole(tempoOf(study, section)).mul(scale);
    if (before?.equals(whole)) continue;
    before = whole;
    events.push({ at: ticks(written(at)), order: 2, bytes: tempoEvent(whole) });
  }
  return events;
}

/**
 * A study as a Standard MIDI File, format 1: a track of tempos, metres and section names, then one for each instrument, its
 * strokes on channel 10 with keys of the General MIDI percussion map. Times are those of the page: a stretch that is written as
 * another tempo is a change of tempo here too. Every stroke of every repeat is there; a note lasts its written length; a roll is
 * one note. Where no division holds every time, each falls on the nearest tick (`midiDivision` says how far off at most); a
 * quarter lasts a whole number of microseconds, as the format asks.
 * @throws EngineError as `buildStudy`; `cannot_write`, `too_large` where the format cannot hold it
 * @see Standard MIDI Files 1.0 (RP-001); General MIDI Level 1 (RP-003)
 */
export function toMidi(document: StudyInput): Uint8Array {
  const prepared = prepare(document);
  const { study, built, timed, written, division } = prepared;
  const ticks = (position: Fraction): number => Number(position.mul(4 * division.division).round().n);
  const end = ticks(written(built.totalLength));
  const dynamics = dynamicsOf(study, built);
  const sounds = new Map<string, number>();
  for (const { event } of timed) sounds.set(event.instrument, Math.max(sounds.get(event.instrument) ?? 1, event.sound ?? 1));
  const tracks = study.instruments.map((instrument): MidiEvent[] => {
    const keys = percussionKeys(instrument, Math.max(instrument.sounds ?? 1, sounds.get(instrument.id) ?? 1));
    const name = textBytes(instrument.name);
    const events: MidiEvent[] = [{ at: 0, order: 0, bytes: meta(0x03, name) }, { at: 0, order: 0, bytes: meta(0x04, name) }];
    for (const { event, start, end: stop } of timed) {
      if (event.instrument !== instrument.id) continue;
      const key = keys[Math.min((event.sound ?? 1), keys.length) - 1]!;
      const loud = Math.min(127, loudnessAt(dynamics.get(event.statement) ?? [], event.position) + ACCENTS[event.accent ?? 'none']);
      const at = ticks(start);
      events.push({ at, order: 5, bytes: [0x90 | PERCUSSION, key, loud] });
      // Shorter than a tick, a note would end before it begins.
      events.push({ at: Math.max(at + 1, ticks(stop)), order: 4, bytes: [0x80 | PERCUSSION, key, 64] });
    }
    return events;
  });
  const chunks = [headerChunk(tracks.length + 1, division.division), trackChunk(conductorTrack(prepared, ticks), end), ...tracks.map((track) => trackChunk(track, end))];
  const bytes = new Uint8Array(chunks.reduce((sum, { length }) => sum + length, 0));
  let at = 0;
  for (const chunk of chunks) {
    bytes.set(chunk, at);
    at += chunk.length;
  }
  return bytes;
}

