import { z } from 'zod';
import { field, instrumentName, plain, readingPart, subjectParts, word } from '../describe/sentence-parts';
import { listWords, plural, times } from '../describe/words';
import { EngineError } from '../errors';
import { ZERO, gcd } from '../exact/fraction';
import { LIMITS } from '../limits';
import { count, id, reading } from '../study/fields';
import { plainStatement, successive } from './plain-statement';
import { read } from './read';
import type { ProcessContext, ProcessRules } from './types';

const schema = z.strictObject({
  kind: z.literal('cycle'),
  colour: z.array(id).min(1).max(LIMITS.statements),
  until: z.union([z.literal('alignment'), count]),
  reading: reading.optional(),
});
type CycleProcess = z.output<typeof schema>;

/** How often the subject goes round: a count, or until subject and colour end together. */
function rounds({ process, subject, path }: Pick<ProcessContext<CycleProcess>, 'process' | 'subject' | 'path'>): number {
  if (process.until !== 'alignment') return process.until;
  const attacks = subject.filter(({ rest }) => !rest).length;
  if (attacks === 0) throw new EngineError('invalid_argument', 'This subject has no attack, so that subject and colour never end together. Say how often it goes round.', { path: `${path}.until` });
  const needed = process.colour.length / Number(gcd(BigInt(attacks), BigInt(process.colour.length)));
  if (needed <= LIMITS.statements) return needed;
  throw new EngineError('too_large', `Subject and colour end together after ${needed} rounds; ${LIMITS.statements} is the limit.`, { path: `${path}.until` });
}

/** The subject goes round and round, its attacks handed through a row of instruments: attack j goes to colour j modulo their number. */
export const cycle: ProcessRules<typeof schema> = {
  schema,
  label: 'passed from hand to hand, attack by attack',
  begin: (_, instruments) => ({ kind: 'cycle', colour: [...instruments].slice(0, LIMITS.statements), until: 'alignment', reading: 'forwards' }),
  takesSubject: true,
  ownInstruments: ({ colour }) => colour,
  size: (context) => rounds(context) * context.subject.length,
  statements(context) {
    const { section, process, subject } = context;
    const figure = read(subject, process.reading);
    const attacks = figure.filter(({ rest }) => !rest).length;
    return successive(
      Array.from({ length: rounds(context) }, (_, round) => (start) =>
        plainStatement({
          start,
          instrument: null,
          assigned: Array.from({ length: attacks }, (__, attack) => process.colour[(round * attacks + attack) % process.colour.length]!),
          subject: section.subject ?? null,
          reading: process.reading ?? 'forwards',
          values: figure,
        }),
      ),
      ZERO,
    );
  },
  remarks({ process, subject }) {
    const attacks = subject.filter(({ rest }) => !rest).length;
    if (attacks === 0) return [];
    const colours = process.colour.length;
    const needed = colours / Number(gcd(BigInt(attacks), BigInt(colours)));
    return [`${plural(attacks, 'attack')} and ${plural(colours, 'colour')} end together after ${plural(needed, 'round')}, ${needed * attacks} attacks in all.`];
  },
  sentence: ({ study, section, process }) => [
    ...subjectParts(study, section),
    plain(' goes round, its attacks '),
    word('passed from hand to hand', 'process'),
    plain(' through '),
    field(listWords(process.colour.map((one) => instrumentName(study, one))), 'colour', 'Colour: the instruments in turn', { kind: 'instruments' }),
    plain(', '),
    field(process.until === 'alignment' ? 'until both end together' : times(process.until), 'until', 'How long', { kind: 'until' }),
    plain(', '),
    readingPart(process.reading),
    plain('.'),
  ],
};
