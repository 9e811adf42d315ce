import { Fraction, type Rhythm, formatRhythm, retrograde } from '@/engine';

/** Constraints in whole pulses, as the tests try them. */
export type Tried = {
  readonly pulses: number;
  readonly values?: readonly number[] | undefined;
  readonly attacks?: number | undefined;
  readonly rests: boolean;
  readonly differingNeighbours: boolean;
  readonly palindrome: boolean;
  readonly entries?: readonly number[] | undefined;
  readonly even: boolean;
};

type Pulses = readonly { readonly length: number; readonly rest: boolean }[];

/** Every rhythm of so many pulses, two rests never side by side, one made of nothing but a rest left out. */
export function everyRhythm(pulses: number, rests: boolean): Pulses[] {
  const onwards = (left: number, mayRest: boolean): Pulses[] => {
    if (left === 0) return [[]];
    const found: Pulses[] = [];
    for (let length = 1; length <= left; length += 1) {
      for (const then of onwards(left - length, rests)) found.push([{ length, rest: false }, ...then]);
      if (mayRest) for (const then of onwards(left - length, false)) found.push([{ length, rest: true }, ...then]);
    }
    return found;
  };
  return onwards(pulses, rests).filter((items) => items.some((item) => !item.rest));
}

const places = (items: Pulses): number[] => {
  let at = 0;
  return items.flatMap((item) => {
    at += item.length;
    return item.rest ? [] : [at - item.length];
  });
};

/** Evenest: any number of neighbouring gaps around the cycle adds up to one of two neighbouring numbers at most. */
function isEven(attacks: readonly number[], pulses: number): boolean {
  const n = attacks.length;
  for (let width = 1; width < n; width += 1) {
    const spans = attacks.map((at, k) => (attacks[(k + width) % n]! - at + pulses) % pulses);
    if (Math.max(...spans) - Math.min(...spans) > 1) return false;
  }
  return true;
}

function tiles(attacks: readonly number[], entries: readonly number[], pulses: number): boolean {
  const struck = entries.flatMap((entry) => attacks.map((at) => (at + entry + 2 * pulses) % pulses)).sort((a, b) => a - b);
  return struck.length === pulses && struck.every((pulse, k) => pulse === k);
}

/** Whether a rhythm meets constraints, said once more, apart from the engine's own counting. */
export function meets(items: Pulses, tried: Tried): boolean {
  const attacks = places(items);
  if (tried.values && !items.every((item) => tried.values!.includes(item.length))) return false;
  if (tried.attacks !== undefined && attacks.length !== tried.attacks) return false;
  if (!tried.rests && items.some((item) => item.rest)) return false;
  if (tried.differingNeighbours && items.some((item, k) => k > 0 && items[k - 1]!.length === item.length)) return false;
  if (tried.palindrome) {
    const rhythm = items.map(({ length, rest }) => ({ length: new Fraction(length), rest }));
    if (formatRhythm(rhythm) !== formatRhythm(retrograde(rhythm, 'values'))) return false;
  }
  if (tried.entries && !tiles(attacks, tried.entries, tried.pulses)) return false;
  return !tried.even || isEven(attacks, tried.pulses);
}

/** A rhythm in pulses. */
export const inPulses = (rhythm: Rhythm, pulse: Fraction): Pulses =>
  rhythm.map(({ length, rest }) => ({ length: Number(length.div(pulse)), rest }));
