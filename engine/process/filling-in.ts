import { z } from 'zod';
import { field, plain, playersParts, readingPart, subjectParts, word } from '../describe/sentence-parts';
import { times } from '../describe/words';
import { EngineError } from '../errors';
import { LIMITS } from '../limits';
import { reading, repeats } from '../study/fields';
import type { Value } from '../rhythm/types';
import { silenced } from '../transform/rotate';
import { stagesInTurn } from './plain-statement';
import { read } from './read';
import type { ProcessRules, TracedValue } from './types';

const schema = z.strictObject({
  kind: z.literal('filling-in'),
  order: z.array(z.int().min(0)).max(LIMITS.statements),
  repeatsEach: repeats,
  reading: reading.optional(),
});

const attackCount = (values: readonly Value[]): number => values.filter(({ rest }) => !rest).length;

function checkOrder(order: readonly number[], attacks: number, path: string): void {
  order.forEach((attack, index) => {
    const where = { path: `${path}.order.${index}` };
    if (attack >= attacks) throw new EngineError('invalid_argument', `The subject has ${attacks} attacks; there is no attack ${attack + 1} to fill in.`, where);
    if (order.indexOf(attack) < index) throw new EngineError('invalid_argument', `Attack ${attack + 1} is filled in twice. Name each attack once.`, where);
  });
}

/** The figure with all attacks but these as rests of the same length. */
function sounding(figure: readonly TracedValue[], heard: ReadonlySet<number>): TracedValue[] {
  let attack = 0;
  return figure.map((value) => (value.rest || heard.has(attack++) ? value : { ...silenced(value), origin: null }));
}

/**
 * Rests replaced by attacks, one at a time. Stage k, from 0, sounds the first k attacks of `order`, counted in the subject as
 * it is read; the rest are rests, and stage 0 is silent.
 */
export const fillingIn: ProcessRules<typeof schema> = {
  schema,
  label: 'filled in, attack by attack',
  begin: (subject) => ({ kind: 'filling-in', order: Array.from({ length: Math.min(attackCount(subject), LIMITS.statements) }, (_, attack) => attack), repeatsEach: 2, reading: 'forwards' }),
  takesSubject: true,
  size: ({ process, subject }) => (process.order.length + 1) * process.repeatsEach * subject.length,
  statements(context) {
    const { process, path, subject } = context;
    const figure = read(subject, process.reading);
    checkOrder(process.order, attackCount(figure), path);
    return stagesInTurn(context, Array.from({ length: process.order.length + 1 }, (_, k) => sounding(figure, new Set(process.order.slice(0, k)))));
  },
  sentence: ({ study, section, process }) => [
    ...subjectParts(study, section),
    plain(' is '),
    word('filled in', 'process'),
    plain(' out of silence, its attacks in the order '),
    field(process.order.length === 0 ? 'of none' : process.order.map((attack) => attack + 1).join(', '), 'order', 'Order of attacks', { kind: 'ordinals' }, 'Numbers of attacks, the first is 1, with commas between.'),
    plain(', each stage '),
    field(times(process.repeatsEach), 'repeatsEach', 'Times through each stage', { kind: 'integer' }),
    plain(', '),
    readingPart(process.reading),
    ...playersParts(study, section.instruments, section.instruments.length),
  ],
};
