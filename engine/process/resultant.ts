import { z } from 'zod';
import { field, plain, playersParts, word } from '../describe/sentence-parts';
import { plural } from '../describe/words';
import { EngineError } from '../errors';
import { ZERO, formatFraction, gcd, toFraction } from '../exact/fraction';
import { LIMITS } from '../limits';
import { resultant } from '../proportion/resultant';
import { exactText } from '../study/fields';
import { locate } from '../study/locate';
import { plainStatement } from './plain-statement';
import type { ProcessRules } from './types';

const schema = z.strictObject({
  kind: z.literal('resultant'),
  a: z.int().min(1).max(LIMITS.pulses),
  b: z.int().min(1).max(LIMITS.pulses),
  unit: exactText,
});

/** Two steady pulses against each other, as one rhythm. No subject; one statement. */
export const resultantProcess: ProcessRules<typeof schema> = {
  schema,
  label: 'two steady pulses heard as one rhythm',
  begin: () => ({ kind: 'resultant', a: 3, b: 2, unit: '1/8' }),
  takesSubject: false,
  size: ({ process: { a, b } }) => (a + b) / Number(gcd(BigInt(a), BigInt(b))),
  statements({ process, path, instruments }) {
    const unit = locate({ path: `${path}.unit` }, () => {
      const length = toFraction(process.unit);
      if (length.compare(ZERO) <= 0) throw new EngineError('invalid_argument', `The unit of both pulses must be above 0; ${formatFraction(length)} is not.`);
      return length;
    });
    const values = resultant(process.a, process.b).map((gap) => ({ length: unit.mul(gap), rest: false, origin: null }));
    return [plainStatement({ start: ZERO, instrument: instruments[0]!, subject: null, values })];
  },
  remarks({ process: { a, b } }) {
    const end = (a * b) / Number(gcd(BigInt(a), BigInt(b)));
    return [`Both pulses are together again after ${plural(end, 'unit')}, ${plural(resultant(a, b).length, 'attack')}.`];
  },
  sentence: ({ study, section, process }) => [
    plain('A pulse of '),
    field(String(process.a), 'a', 'First pulse, in units', { kind: 'integer' }),
    plain(' and one of '),
    field(String(process.b), 'b', 'Second pulse, in units', { kind: 'integer' }),
    plain(', in units of '),
    field(formatFraction(toFraction(process.unit)), 'unit', 'Unit', { kind: 'exact' }),
    plain(', are '),
    word('heard as one rhythm', 'process'),
    ...playersParts(study, section.instruments, 1),
  ],
};
