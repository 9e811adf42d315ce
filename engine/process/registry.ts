import type { z } from 'zod';
import type { Process } from '../study/schema';
import { additive } from './additive';
import { cycle } from './cycle';
import { fillingIn } from './filling-in';
import { phase } from './phase';
import { proportion } from './proportion';
import { resultantProcess } from './resultant';
import { rotation } from './rotation';
import type { ProcessRules } from './types';

/** Every process, by kind: a new one is its file and one line here. The order is that in which they are offered. */
export const PROCESSES = {
  proportion,
  rotation,
  phase,
  additive,
  'filling-in': fillingIn,
  cycle,
  resultant: resultantProcess,
} as const;

export type ProcessKind = keyof typeof PROCESSES;

/** The rules of a process. Its own type has been checked by the schema, which the kind has chosen. */
export const rulesOf = ({ kind }: Pick<Process, 'kind'>) => PROCESSES[kind] as unknown as ProcessRules<z.ZodObject>;

/** What may be chosen, in words. */
export const processChoices: readonly (readonly [ProcessKind, string])[] = (Object.keys(PROCESSES) as ProcessKind[]).map((kind) => [kind, PROCESSES[kind].label]);
