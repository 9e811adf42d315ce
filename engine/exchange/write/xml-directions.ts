import { type Fraction, ONE, formatFraction, toFraction } from '../../exact/fraction';
import { readDynamics } from '../../print/dynamics';
import type { PrintMeasure, PrintStaff, StaffPlace } from '../../print/types';
import type { TempoMark } from '../../views/tempo-marks';
import { element, textElement } from './xml';

/** Something that is said at a place of a measure. Lower `order` comes first at one place. */
export type Direction = { readonly offset: Fraction; readonly order: number; readonly xml: string };

const UNITS: readonly (readonly [string, string])[] = [
  ['1/4', 'quarter'], ['1/8', 'eighth'], ['1/2', 'half'], ['1/16', '16th'], ['1', 'whole'], ['1/32', '32nd'], ['2', 'breve'], ['1/64', '64th'],
];

/** A length as a value with dots; null where it is none. */
function unit(length: Fraction): { name: string; dots: number } | null {
  for (const [base, name] of UNITS) {
    const ratio = length.div(toFraction(base));
    const dots = ['1', '3/2', '7/4'].findIndex((times) => ratio.equals(times));
    if (dots !== -1) return { name, dots };
  }
  return null;
}

const plain = ({ name, dots }: { name: string; dots: number }): string => `${textElement('beat-unit', name)}${'<beat-unit-dot/>'.repeat(dots)}`;

/** A length as one value, or as two tied; null where it is neither. */
function beatUnits(length: Fraction): string | null {
  const one = unit(length);
  if (one !== null) return plain(one);
  for (const [base, name] of UNITS) {
    const rest = length.sub(toFraction(base));
    const other = rest.s > 0n && rest.n > 0n ? unit(rest) : null;
    if (other !== null && other.dots === 0) return `${plain({ name, dots: 0 })}<beat-unit-tied>${plain(other)}</beat-unit-tied>`;
  }
  return null;
}

const direction = (type: string, attributes: Record<string, string>, ...after: string[]): string => element('direction', attributes, element('direction-type', {}, type), ...after);

/** Decimal text of a tempo: `sound` takes decimals only. */
const decimal = (value: Fraction): string => String(Number(value.valueOf().toFixed(6)));

/** A tempo: what lasts as long before and after, then the metronome. */
export function tempoDirections({ beat, perMinute, equivalence }: TempoMark): string {
  const before = equivalence === null ? null : beatUnits(equivalence.before);
  const after = equivalence === null ? null : beatUnits(equivalence.after);
  const counted = beatUnits(beat);
  const sound = `<sound tempo="${decimal(perMinute.mul(beat).mul(4))}"/>`;
  const same = before !== null && after !== null ? direction(element('metronome', {}, before, after), { placement: 'above', system: 'only-top' }) : '';
  const metronome = counted === null ? textElement('words', `${formatFraction(beat)} = ${perMinute.toFraction(true)}`) : element('metronome', {}, counted, textElement('per-minute', perMinute.toFraction(true)));
  return `${same}${direction(metronome, { placement: 'above', system: 'only-top' }, sound)}`;
}

/** What stands over the top staff where a measure begins. */
export function measureDirections({ letter, sections, tempo }: PrintMeasure): Direction[] {
  const offset = ONE.sub(ONE);
  const top = { placement: 'above', system: 'only-top' };
  const found: Direction[] = [];
  if (tempo !== null) found.push({ offset, order: 0, xml: tempoDirections(tempo) });
  if (letter !== null) found.push({ offset, order: 1, xml: direction(textElement('rehearsal', letter), top) });
  for (const { name } of sections) found.push({ offset, order: 2, xml: direction(textElement('words', name, { 'font-weight': 'bold' }), top) });
  return found;
}

/** The dynamics of a staff, by measure. */
export function dynamicDirections({ dynamics }: PrintStaff): Map<number, Direction[]> {
  const found = new Map<number, Direction[]>();
  const add = ({ measure, offset }: StaffPlace, order: number, xml: string): void => void found.set(measure, [...(found.get(measure) ?? []), { offset, order, xml }]);
  for (const one of dynamics) {
    const below = { placement: 'below' };
    if (one.kind === 'level') {
      const mark = one.isMark ? readDynamics(one.text)?.levels[0] : null;
      add(one.place, 5, direction(mark ? element('dynamics', {}, `<${mark}/>`) : textElement('words', one.text, { 'font-style': 'italic' }), below));
      continue;
    }
    add(one.from, 6, direction(`<wedge type="${one.direction === 'louder' ? 'crescendo' : 'diminuendo'}" number="1"/>`, below));
    // A wedge ends before another begins at the same place.
    add(one.to, 4, direction('<wedge type="stop" number="1"/>', below));
  }
  return found;
}

/** An instrument that is taken up. */
export const changeDirection = (words: string): string => direction(textElement('words', words), { placement: 'above' });

/** A sound that is stopped short (MusicXML 4.0, the damp element). */
export const DAMP = direction('<damp/>', { placement: 'above' });
