import { z } from 'zod';
import { field, instrumentParts, plain, readingPart, subjectParts, word } from '../describe/sentence-parts';
import { plural, times } from '../describe/words';
import { EngineError } from '../errors';
import { formatFraction, sum, toFraction } from '../exact/fraction';
import { LIMITS } from '../limits';
import { alignment } from '../proportion/alignment';
import { count, exactText, reading, repeats } from '../study/fields';
import { locate } from '../study/locate';
import { rotate } from '../transform/rotate';
import { plainStatement } from './plain-statement';
import { read, repeated } from './read';
import type { ProcessRules } from './types';

const schema = z.strictObject({
  kind: z.literal('phase'),
  pulse: exactText,
  shift: z.int().min(-LIMITS.pulses).max(LIMITS.pulses),
  repeatsPerShift: repeats,
  shifts: z.union([z.literal(0), count]),
  reading: reading.optional(),
});

/**
 * One instrument keeps to the subject while another enters it later, a few pulses more in each block. Block k, from 0 to
 * `shifts`, lasts `repeatsPerShift` subjects; its statements are 2k, who stays, and 2k + 1, who moves.
 */
export const phase: ProcessRules<typeof schema> = {
  schema,
  label: 'shifted against itself, block by block',
  begin: () => ({ kind: 'phase', pulse: '1/8', shift: 1, repeatsPerShift: 4, shifts: 4, reading: 'forwards' }),
  takesSubject: true,
  players: 2,
  size: ({ process, subject }) => (process.shifts + 1) * process.repeatsPerShift * (2 * subject.length + 1),
  statements({ section, process, path, subject, instruments }) {
    if (instruments.length !== 2) {
      throw new EngineError('invalid_argument', `A phase is played by two instruments, one that stays and one that moves; here are ${instruments.length}.`, { path: path.replace(/process$/, 'instruments') });
    }
    const figure = read(subject, process.reading);
    const block = sum(figure.map((value) => value.length)).mul(process.repeatsPerShift);
    const pulse = locate({ path: `${path}.pulse` }, () => toFraction(process.pulse));
    return Array.from({ length: process.shifts + 1 }, (_, shift) => shift).flatMap((k) =>
      [0, k * process.shift].map((steps, voice) =>
        plainStatement({
          start: block.mul(k),
          length: block,
          instrument: instruments[voice]!,
          subject: section.subject ?? null,
          reading: process.reading ?? 'forwards',
          rotation: steps,
          ...(voice === 0 ? {} : { rotationBy: { pulse: process.pulse } }),
          repeats: process.repeatsPerShift,
          values: repeated(voice === 0 ? figure : locate({ path: `${path}.pulse` }, () => rotate(figure, steps, { pulse })), process.repeatsPerShift),
        }),
      ),
    );
  },
  remarks({ process, subject }) {
    const total = sum(subject.map((value) => value.length));
    const step = toFraction(process.pulse).mul(process.shift);
    if (step.n === 0n || total.n === 0n) return ['Nothing is shifted: both play the same throughout.'];
    // Together again once the shifts add up to whole subjects.
    const together = Number(alignment([step.abs(), total]).div(step.abs()));
    const after = `Both are together again after ${plural(together, 'shift')}`;
    return [process.shifts < together ? `${after}; here there are ${process.shifts}.` : `${after}.`];
  },
  sentence: ({ study, section, process }) => {
    const [stays, moves] = instrumentParts(study, section.instruments.slice(0, 2)).filter(({ control }) => control !== undefined);
    const others = instrumentParts(study, section.instruments.slice(2), 2);
    return [
      ...subjectParts(study, section),
      plain(' is '),
      word('shifted against itself', 'process'),
      plain(': '),
      ...(stays ? [stays, plain(' keeps to it')] : []),
      ...(moves ? [plain(', '), moves, plain(' enters it later by ')] : [plain(', shifted by ')]),
      field(String(process.shift), 'shift', 'Pulses that each shift adds', { kind: 'integer' }, 'Below 0 the second enters earlier.'),
      plain(` ${plural(process.shift, 'pulse').replace(/^-?\d+ /, '')} of `),
      field(formatFraction(toFraction(process.pulse)), 'pulse', 'Pulse', { kind: 'exact' }),
      plain(' after every '),
      field(process.repeatsPerShift === 1 ? 'time' : String(process.repeatsPerShift), 'repeatsPerShift', 'Times through before each shift', { kind: 'integer' }),
      plain(process.repeatsPerShift === 1 ? ' through, shifted ' : ' times through, shifted '),
      field(process.shifts === 0 ? 'never' : times(process.shifts), 'shifts', 'Number of shifts', { kind: 'integer' }),
      plain(', '),
      readingPart(process.reading),
      plain('.'),
      ...(others.length > 0 ? [plain(' Too many to play it: '), ...others, plain('.')] : []),
    ];
  },
};
