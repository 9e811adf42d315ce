import { z } from 'zod';
import { field, plain, playersParts, readingPart, subjectParts, word } from '../describe/sentence-parts';
import { times } from '../describe/words';
import { reading, repeats } from '../study/fields';
import { stagesInTurn } from './plain-statement';
import { read } from './read';
import type { ProcessRules } from './types';

const schema = z.strictObject({
  kind: z.literal('additive'),
  direction: z.enum(['growing', 'shrinking']),
  from: z.enum(['front', 'back']),
  repeatsEach: repeats,
  reading: reading.optional(),
});

/**
 * The subject built up value by value, or taken down. Growing, stage k holds the first (from the back: the last) k + 1 values
 * of the subject as it is read; shrinking is the same stages in reverse order.
 */
export const additive: ProcessRules<typeof schema> = {
  schema,
  label: 'built up or taken down, value by value',
  begin: () => ({ kind: 'additive', direction: 'growing', from: 'front', repeatsEach: 2, reading: 'forwards' }),
  takesSubject: true,
  size: ({ process, subject }) => (process.repeatsEach * subject.length * (subject.length + 1)) / 2,
  statements(context) {
    const { process, subject } = context;
    const figure = read(subject, process.reading);
    const sizes = figure.map((_, index) => index + 1);
    if (process.direction === 'shrinking') sizes.reverse();
    return stagesInTurn(context, sizes.map((size) => (process.from === 'front' ? figure.slice(0, size) : figure.slice(figure.length - size))));
  },
  sentence: ({ study, section, process }) => [
    ...subjectParts(study, section),
    plain(' is '),
    word(process.direction === 'growing' ? 'built up' : 'taken down', 'process'),
    plain(' value by value, '),
    field(process.direction, 'direction', 'Direction', { kind: 'choice', options: [['growing', 'growing'], ['shrinking', 'shrinking']] }),
    plain(', with '),
    field(process.from === 'front' ? 'its beginning' : 'its end', 'from', 'What every stage holds', { kind: 'choice', options: [['front', 'its beginning'], ['back', 'its end']] }),
    plain(' in every stage, each stage '),
    field(times(process.repeatsEach), 'repeatsEach', 'Times through each stage', { kind: 'integer' }),
    plain(', '),
    readingPart(process.reading),
    ...playersParts(study, section.instruments, section.instruments.length),
  ],
};
