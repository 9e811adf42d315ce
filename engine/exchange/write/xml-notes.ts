import type { Fraction } from '../../exact/fraction';
import { symbolLength } from '../../notation/symbol-length';
import type { NotationSymbol } from '../../notation/types';
import type { PrintNote } from '../../print/types';
import { element, textElement } from './xml';

const TYPES: Readonly<Record<NotationSymbol['base'], string>> = {
  '2': 'breve', '1': 'whole', '1/2': 'half', '1/4': 'quarter', '1/8': 'eighth', '1/16': '16th', '1/32': '32nd', '1/64': '64th', '1/128': '128th', '1/256': '256th',
};

/** A length in divisions of a quarter, a whole number. */
export const inDivisions = (length: Fraction, divisions: bigint): bigint => (length.n * 4n * divisions) / length.d;

/** Nested brackets say their own figures; the time modification is what they come to together. */
function tupletMarks({ tuplets }: NotationSymbol): string {
  return tuplets
    .map((mark, level) => {
      const number = level + 1;
      const figures =
        tuplets.length > 1
          ? `${element('tuplet-actual', {}, textElement('tuplet-number', mark.actual))}${element('tuplet-normal', {}, textElement('tuplet-number', mark.normal))}`
          : '';
      const starts = mark.starts ? element('tuplet', { type: 'start', number, placement: 'above' }, figures) : '';
      return `${starts}${mark.stops ? element('tuplet', { type: 'stop', number }) : ''}`;
    })
    .join('');
}

function notationsOf({ symbol, accent, roll, ends, fermata }: PrintNote): string {
  const { tiedFromBefore, tiedOn } = symbol;
  const articulation = accent === 'accent' ? '<accent placement="above"/>' : accent === 'strong' ? '<strong-accent type="up" placement="above"/>' : '';
  return [
    tiedFromBefore ? '<tied type="stop"/>' : '',
    tiedOn ? '<tied type="start"/>' : '',
    ends === 'let-ring' ? '<tied type="let-ring"/>' : '',
    tupletMarks(symbol),
    roll ? element('ornaments', {}, '<tremolo type="single">3</tremolo>') : '',
    articulation === '' ? '' : element('articulations', {}, articulation),
    fermata ? '<fermata/>' : '',
  ].join('');
}

/** A key such as `E4` as a place on the staff. */
const display = (key: string): string => element('unpitched', {}, textElement('display-step', key[0]!), textElement('display-octave', key.slice(1)));

/**
 * One note or rest, its children in the order of the schema.
 * @param place - where the sound stands, such as `E4`
 * @param instrument - the id of its instrument, where a part has several
 */
export function noteElement(note: PrintNote, divisions: bigint, place: string, instrument: string | null): string {
  const { base, dots, rest, tuplets, tiedFromBefore, tiedOn, beams } = note.symbol;
  const ratio = tuplets.reduce(({ actual, normal }, mark) => ({ actual: actual * mark.actual, normal: normal * mark.normal }), { actual: 1, normal: 1 });
  const notations = notationsOf(note);
  return element(
    'note',
    {},
    rest ? '<rest/>' : display(place),
    textElement('duration', inDivisions(symbolLength(note.symbol), divisions)),
    tiedFromBefore ? '<tie type="stop"/>' : '',
    tiedOn ? '<tie type="start"/>' : '',
    rest || instrument === null ? '' : element('instrument', { id: instrument }),
    textElement('voice', 1),
    textElement('type', TYPES[base]),
    '<dot/>'.repeat(dots),
    tuplets.length > 0 ? element('time-modification', {}, textElement('actual-notes', ratio.actual), textElement('normal-notes', ratio.normal)) : '',
    rest || base === '1' || base === '2' ? '' : textElement('stem', 'up'),
    ...beams.map((word, level) => textElement('beam', word, { number: level + 1 })),
    notations === '' ? '' : element('notations', {}, notations),
  );
}

/** A measure in which nothing sounds. */
export const silentMeasure = (length: Fraction, divisions: bigint, fermata: boolean): string =>
  element('note', {}, '<rest measure="yes"/>', textElement('duration', inDivisions(length, divisions)), textElement('voice', 1), fermata ? '<notations><fermata/></notations>' : '');
