import { EngineError, type Fraction } from '@/engine';
import { readNumber, splitList } from './typed-number';

export type TypedCycle = { readonly length: Fraction; readonly entry?: Fraction; readonly repeats?: number };

/**
 * Cycles as they are typed: `3/4, 5/8 from 1/8, 1 x10` is three of them, the second enters after 1/8, the third turns ten times.
 * @throws EngineError with a sentence that says what to type
 */
export function readCycles(text: string): TypedCycle[] {
  const parts = splitList(text);
  if (parts.length === 0) throw new EngineError('invalid_fraction', 'Nothing is written here. Write cycles with commas between, such as 3/4, 5/8, 1.');
  return parts.map((part) => {
    const [, length = '', entry, repeats] = /^(.+?)(?:\s+from\s+(.+?))?(?:\s*[x×]\s*(\d{1,9}))?$/i.exec(part)!;
    return { length: readNumber(length), ...(entry === undefined ? {} : { entry: readNumber(entry) }), ...(repeats === undefined ? {} : { repeats: Number(repeats) }) };
  });
}
