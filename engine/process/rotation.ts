import { z } from 'zod';
import { entriesWords, field, plain, playersParts, readingPart, rotationWords, subjectParts, word } from '../describe/sentence-parts';
import { plural, times } from '../describe/words';
import { gcd, sum } from '../exact/fraction';
import { count, entriesSchema, reading, rotateBy, turn } from '../study/fields';
import { locate } from '../study/locate';
import { rotate } from '../transform/rotate';
import { metreOf } from '../views/metre-of';
import { entrySpans } from './entries';
import { plainStatement } from './plain-statement';
import { read } from './read';
import type { ProcessRules } from './types';

const schema = z.strictObject({
  kind: z.literal('rotation'),
  steps: turn,
  by: rotateBy,
  count,
  entries: entriesSchema.optional(),
  reading: reading.optional(),
});

/** The subject entered one step later, and later again: statement k is read, then rotated by k × steps. */
export const rotation: ProcessRules<typeof schema> = {
  schema,
  label: 'rotated, from each statement to the next',
  begin: (_, instruments) => ({ kind: 'rotation', steps: 1, by: 'values', count: Math.max(2, instruments.length), entries: 'successive', reading: 'forwards' }),
  takesSubject: true,
  // A rotation by a pulse may cut one value in two.
  size: ({ process, subject }) => process.count * (subject.length + 1),
  statements({ section, process, path, subject, instruments }) {
    const figure = read(subject, process.reading);
    const length = sum(figure.map((value) => value.length));
    const spans = locate({ path: `${path}.entries` }, () => entrySpans(Array.from({ length: process.count }, () => length), process.entries ?? 'successive'));
    return spans.map(({ start }, index) =>
      plainStatement({
        start,
        length,
        instrument: instruments[index % instruments.length]!,
        subject: section.subject ?? null,
        reading: process.reading ?? 'forwards',
        rotation: index * process.steps,
        ...(process.by === 'values' ? {} : { rotationBy: process.by }),
        values: locate({ path: `${path}.by` }, () => rotate(figure, index * process.steps, process.by)),
      }),
    );
  },
  remarks({ process, subject }) {
    if (typeof process.by === 'object' || subject.length === 0) return [];
    const size = process.by === 'values' ? subject.length : subject.filter(({ rest }) => !rest).length;
    if (size === 0 || process.steps === 0) return [];
    const home = size / Number(gcd(BigInt(Math.abs(process.steps)), BigInt(size)));
    return [`It is back where it began after ${plural(home, 'statement')}.`];
  },
  sentence: ({ study, section, process }) => [
    ...subjectParts(study, section),
    plain(' is '),
    word('rotated', 'process'),
    plain(' by '),
    field(String(process.steps), 'steps', 'Steps from each statement to the next', { kind: 'integer' }, 'Below 0 it turns the other way.'),
    plain(' '),
    field(rotationWords(process.steps, process.by).replace(/^-?\d+ /, ''), 'by', 'What a step is', { kind: 'rotate-by' }),
    plain(' from each statement to the next, stated '),
    field(times(process.count), 'count', 'Number of statements', { kind: 'integer' }),
    plain(', '),
    ...(process.count > 1 ? [word(entriesWords(process.entries ?? 'successive', metreOf(study, section)), 'entries'), plain(', ')] : []),
    readingPart(process.reading),
    ...playersParts(study, section.instruments, process.count),
  ],
};
