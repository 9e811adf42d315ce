import { type Fraction, ZERO, lcm } from '../../exact/fraction';
import { symbolLength } from '../../notation/symbol-length';
import { staffShape } from '../../print/staff-shape';
import type { PrintMeasure, PrintScore, PrintStaff } from '../../print/types';
import { parseMetre } from '../../rhythm/metre';
import { element, textElement } from './xml';
import { DAMP, type Direction, changeDirection, dynamicDirections, measureDirections } from './xml-directions';
import type { ScoreInstrument } from './xml-instruments';
import { inDivisions, noteElement, silentMeasure } from './xml-notes';

/** The least number of divisions of a quarter that makes every length of a print whole. */
export function divisionsOf({ measures, staves }: PrintScore): bigint {
  const seen = new Set<bigint>();
  const need = (length: Fraction): void => void seen.add(length.mul(4).d);
  for (const { length, scale } of measures) need(length.div(scale));
  for (const staff of staves) {
    for (const { index } of measures) if (!staff.isSilent(index)) for (const { symbol } of staff.cell(index).notes) need(symbolLength(symbol));
    for (const one of staff.dynamics) for (const { offset } of one.kind === 'level' ? [one.place] : [one.from, one.to]) need(offset);
  }
  return [...seen].reduce(lcm, 1n);
}

function timeElement(signature: string): string {
  const { text, count, unit } = parseMetre(signature);
  return element('time', {}, textElement('beats', text.includes('+') ? text.split('/')[0]! : count), textElement('beat-type', unit));
}

/** Divisions and clef at the start, the metre where it changes, the lines of the staff where the instrument does. */
function attributesElement(measure: PrintMeasure, divisions: bigint, lines: number | null): string {
  const isFirst = measure.index === 0;
  if (!isFirst && measure.signature === null && lines === null) return '';
  return element(
    'attributes',
    {},
    isFirst ? textElement('divisions', divisions) : '',
    measure.signature === null ? '' : timeElement(measure.signature),
    isFirst ? element('clef', {}, textElement('sign', 'percussion')) : '',
    lines === null ? '' : element('staff-details', {}, textElement('staff-lines', lines)),
  );
}

/**
 * Directions put among the notes: before the note that they stand over, by their offset from its beginning; what stands at the
 * measure's end comes last, where the reader has arrived there.
 */
function interleave(notes: readonly { readonly at: Fraction; readonly xml: string }[], directions: readonly Direction[], length: Fraction, divisions: bigint): string {
  const sorted = directions.toSorted((a, b) => a.offset.compare(b.offset) || a.order - b.order);
  const parts: string[] = [];
  let next = 0;
  const say = (from: Fraction, until: Fraction | null): void => {
    for (; next < sorted.length && (until === null || sorted[next]!.offset.compare(until) < 0); next += 1) {
      const { offset, xml } = sorted[next]!;
      const away = inDivisions(offset.sub(from), divisions);
      // The offset comes after the kinds of direction and before the sound.
      parts.push(away === 0n ? xml : xml.replace('</direction-type>', `</direction-type><offset>${away}</offset>`));
    }
  };
  notes.forEach(({ at, xml }, index) => {
    say(at, notes[index + 1]?.at ?? length);
    parts.push(xml);
  });
  say(length, null);
  return parts.join('');
}

/** All measures of one part; every repeat is written out. */
export function partMeasures(score: PrintScore, staff: PrintStaff, instruments: readonly ScoreInstrument[], divisions: bigint, isTop: boolean): string {
  const dynamics = dynamicDirections(staff);
  let lines: number | null = null;
  return score.measures
    .map((measure) => {
      const cell = staff.cell(measure.index);
      const sounds = staff.instruments.find(({ id }) => id === cell.instrument)?.sounds ?? 1;
      const { display } = staffShape(sounds);
      const changed = display.lines === (lines ?? 5) ? null : display.lines;
      lines = display.lines;
      const own = instruments.filter(({ instrument }) => instrument.id === cell.instrument);
      const idOf = (sound: number): string | null => (instruments.length < 2 ? null : own[Math.min(sound, own.length) - 1]!.id);
      const directions = [...(isTop ? measureDirections(measure) : []), ...(dynamics.get(measure.index) ?? [])];
      for (const { instrument, said, entry } of staff.changes) {
        const name = staff.instruments.find(({ id }) => id === instrument)?.name ?? '';
        if (entry === measure.index) directions.push({ offset: ZERO, order: 3, xml: changeDirection(name) });
        else if (said === measure.index) directions.push({ offset: ZERO, order: 3, xml: changeDirection(`To ${name}`) });
      }
      const notes = cell.silent
        ? [{ at: ZERO, xml: silentMeasure(measure.length.div(measure.scale), divisions, cell.notes.some(({ fermata }) => fermata)) }]
        : cell.notes.map((note) => {
            if (note.ends === 'choke') directions.push({ offset: note.at, order: 7, xml: DAMP });
            return { at: note.at, xml: noteElement(note, divisions, display.keys[Math.min(note.sound, display.keys.length) - 1]!, idOf(note.sound)) };
          });
      const isPickup = measure.number === 0;
      const isLast = measure.index === score.measures.length - 1;
      return element(
        'measure',
        { number: measure.number, implicit: isPickup ? 'yes' : undefined },
        attributesElement(measure, divisions, changed),
        interleave(notes, directions, measure.length.div(measure.scale), divisions),
        isLast ? element('barline', { location: 'right' }, textElement('bar-style', 'light-heavy')) : '',
      );
    })
    .join('\n');
}
