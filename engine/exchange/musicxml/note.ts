import type { Fraction } from '../../exact/fraction';
import type { Value } from '../../rhythm/types';
import type { Odd } from '../odd';
import { type XmlNode, childOf, childrenOf, textIn } from '../read-xml';

/** What of a note tells it from others of its chord or voice: its pitch, or its place on the staff and its instrument. */
export type NoteKey = {
  readonly id: string;
  /** staff place of an unpitched note, in steps from C0; null where none is written */
  readonly place: number | null;
  readonly instrument: string | null;
  readonly isPitched: boolean;
};

/** A note, chord or rest of a voice, as it is read. */
export type NoteEvent = {
  readonly start: Fraction;
  end: Fraction;
  readonly measure: string;
  readonly isRest: boolean;
  readonly keys: NoteKey[];
  /** whether each note of it goes on from one before */
  isTiedFromBefore: boolean;
  isTiedOn: boolean;
  accent: Value['accent'];
  roll: boolean;
};

const STEPS: Readonly<Record<string, number>> = { C: 0, D: 1, E: 2, F: 3, G: 4, A: 5, B: 6 };
const SEMITONES: Readonly<Record<string, number>> = { C: 0, D: 2, E: 4, F: 5, G: 7, A: 9, B: 11 };

function placeOf(node: XmlNode | undefined, step: string, octave: string): number | null {
  const [letter, number] = [textIn(node, step) ?? '', textIn(node, octave) ?? ''];
  return Object.hasOwn(STEPS, letter) && /^\d$/.test(number) ? Number(number) * 7 + STEPS[letter]! : null;
}

export function keyOf(note: XmlNode): NoteKey {
  const pitch = childOf(note, 'pitch');
  const instrument = childOf(note, 'instrument')?.attributes.id ?? null;
  if (pitch) {
    const letter = textIn(pitch, 'step') ?? '';
    const alter = Number(textIn(pitch, 'alter') ?? 0);
    return { id: `p${Number(textIn(pitch, 'octave') ?? 0) * 12 + (SEMITONES[letter] ?? 0) + (Number.isFinite(alter) ? alter : 0)}`, place: null, instrument, isPitched: true };
  }
  const place = placeOf(childOf(note, 'unpitched'), 'display-step', 'display-octave');
  return { id: `u${place ?? ''}/${instrument ?? ''}`, place, instrument, isPitched: false };
}

/** Ties as they sound; where a file has only the drawn ones, those. */
export function tiesOf(note: XmlNode): { isFrom: boolean; isOn: boolean } {
  const heard = childrenOf(note, 'tie');
  const ties = heard.length > 0 ? heard : childrenOf(note, 'notations').flatMap((one) => childrenOf(one, 'tied'));
  const types = ties.map(({ attributes }) => attributes.type);
  return { isFrom: types.includes('stop') || types.includes('continue'), isOn: types.includes('start') || types.includes('continue') };
}

/** Accent and roll; strokes that are no roll are told. */
export function marksOf(note: XmlNode, odd: Odd, measure: string): { accent: Value['accent']; roll: boolean } {
  const notations = childrenOf(note, 'notations');
  const articulations = notations.flatMap((one) => childrenOf(one, 'articulations')).flatMap(({ children }) => children.map(({ name }) => name));
  const accent = articulations.includes('strong-accent') ? 'strong' : articulations.includes('accent') ? 'accent' : undefined;
  let roll = false;
  for (const { attributes, text } of notations.flatMap((one) => childrenOf(one, 'ornaments')).flatMap((one) => childrenOf(one, 'tremolo'))) {
    const strokes = Number(text.trim() || 3);
    const isPlain = attributes.type === undefined || attributes.type === 'single';
    if (attributes.type === 'unmeasured' || (isPlain && (strokes === 3 || strokes === 0))) roll = true;
    else if (isPlain) odd.note('Repeated strokes were left out: each note counts once', measure);
    else odd.note('Tremolo between two notes was left out: each note counts once', measure);
  }
  return { accent, roll };
}
