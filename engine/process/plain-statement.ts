import { type Fraction, ONE, ZERO, sum } from '../exact/fraction';
import type { Reading } from '../rhythm/types';
import { repeated } from './read';
import type { Placed, ProcessContext, TracedValue } from './types';

type Given = Pick<Placed, 'start' | 'instrument' | 'subject'> & Partial<Omit<Placed, 'length' | 'end' | 'values'>> & { readonly values: readonly TracedValue[]; readonly length?: Fraction };

/** A statement at its own length, forwards and not rotated, but for what is given. */
export function plainStatement({ length, ...given }: Given): Placed {
  const lasts = length ?? sum(given.values.map((value) => value.length));
  return { factor: ONE, reading: 'forwards', rotation: 0, mirrored: false, ...given, length: lasts, end: given.start.add(lasts) };
}

/** Statements one after another, each from where the one before ends. */
export function successive(statements: readonly ((start: Fraction) => Placed)[], from: Fraction): Placed[] {
  let at = from;
  return statements.map((make) => {
    const placed = make(at);
    at = placed.end;
    return placed;
  });
}

type Staged = Pick<ProcessContext<{ reading?: Reading | undefined; repeatsEach: number }>, 'section' | 'process' | 'instruments'>;

/** Figures played one after another, each so many times, by the instruments in turn. */
export function stagesInTurn({ section, process: { reading = 'forwards', repeatsEach }, instruments }: Staged, stages: readonly (readonly TracedValue[])[]): Placed[] {
  return successive(
    stages.map((stage, index) => (start) =>
      plainStatement({ start, instrument: instruments[index % instruments.length]!, subject: section.subject ?? null, reading, repeats: repeatsEach, values: repeated(stage, repeatsEach) }),
    ),
    ZERO,
  );
}
