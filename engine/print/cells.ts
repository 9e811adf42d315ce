import { ZERO } from '../exact/fraction';
import { symbolLength } from '../notation/symbol-length';
import type { Staff } from '../views/score';
import type { PrintCell, PrintNote } from './types';

/** A measure of a spelled line with what stands about its symbols. */
export function cellOf({ instrument, measures, values, sources }: Staff, index: number, fermata: boolean): PrintCell {
  const { symbols } = measures[index]!;
  let at = ZERO;
  const notes = symbols.map((symbol, n): PrintNote => {
    const value = symbol.value === null ? undefined : values[symbol.value];
    const source = symbol.value === null ? null : (sources[symbol.value] ?? null);
    const start = at;
    at = at.add(symbolLength(symbol));
    const sounds = !symbol.rest && value !== undefined;
    return {
      symbol,
      at: start,
      sound: value?.sound ?? 1,
      ...(sounds && value.accent && !symbol.tiedFromBefore ? { accent: value.accent } : {}),
      ...(sounds && value.roll ? { roll: value.roll } : {}),
      ...(sounds && value.ends && !symbol.tiedOn ? { ends: value.ends } : {}),
      ...(fermata && n === symbols.length - 1 ? { fermata: true as const } : {}),
      statement: source?.statement.id ?? null,
      origin: source === null ? null : (source.statement.origins[source.value] ?? null),
    };
  });
  return { instrument: instrument.id, notes, silent: symbols.every(({ rest }) => rest) };
}

/** Remembers what it has worked out. */
export function remembered<T>(make: (index: number) => T): (index: number) => T {
  const known = new Map<number, T>();
  return (index) => {
    let made = known.get(index);
    if (made === undefined) known.set(index, (made = make(index)));
    return made;
  };
}

export const isSilent = ({ measures }: Staff, index: number): boolean => measures[index]!.symbols.every(({ rest }) => rest);
