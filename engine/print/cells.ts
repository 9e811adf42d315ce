import { type Fraction, ZERO } from '../exact/fraction';
import { symbolLength } from '../notation/symbol-length';
import type { NotationSymbol } from '../notation/types';
import type { Rhythm } from '../rhythm/types';
import type { Staff } from '../views/score';
import type { PrintCell, PrintNote } from './types';

type Source = Pick<PrintNote, 'statement' | 'origin'>;
const NOWHERE: Source = { statement: null, origin: null };

/** Symbols with what stands about them; where each begins is worked out when it is first asked for. */
export function notesOf(symbols: readonly NotationSymbol[], values: Rhythm, sourceOf: (value: number) => Source, fermata = false): PrintNote[] {
  let places: Fraction[] | null = null;
  const place = (index: number): Fraction => {
    if (places === null) {
      let at = ZERO;
      places = symbols.map((symbol) => {
        const start = at;
        at = at.add(symbolLength(symbol));
        return start;
      });
    }
    return places[index]!;
  };
  return symbols.map((symbol, n): PrintNote => {
    const value = symbol.value === null ? undefined : values[symbol.value];
    const sounds = !symbol.rest && value !== undefined;
    return {
      symbol,
      get at() {
        return place(n);
      },
      sound: value?.sound ?? 1,
      ...(sounds && value.accent && !symbol.tiedFromBefore ? { accent: value.accent } : {}),
      ...(sounds && value.roll ? { roll: value.roll } : {}),
      ...(sounds && value.ends && !symbol.tiedOn ? { ends: value.ends } : {}),
      ...(fermata && n === symbols.length - 1 ? { fermata: true as const } : {}),
      ...(symbol.value === null ? NOWHERE : sourceOf(symbol.value)),
    };
  });
}

/** A measure of a spelled line with what stands about its symbols. */
export function cellOf(staff: Staff, index: number, fermata: boolean): PrintCell {
  const { instrument, measures, values, sources } = staff;
  const sourceOf = (value: number): Source => {
    const source = sources[value];
    return source ? { statement: source.statement.id, origin: source.statement.origins[source.value] ?? null } : NOWHERE;
  };
  return { instrument: instrument.id, notes: notesOf(measures[index]!.symbols, values, sourceOf, fermata), silent: isSilent(staff, index) };
}

export const isSilent = ({ measures }: Staff, index: number): boolean => measures[index]!.symbols.every(({ rest }) => rest);
