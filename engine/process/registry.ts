import type { Process } from '../study/schema';
import { proportion } from './proportion';
import type { ProcessRules } from './types';

/** Every process that can be built, by kind: a new one is its file and one line here. */
const registry: { readonly [K in Process['kind']]?: ProcessRules<Extract<Process, { kind: K }>> } = {
  proportion,
};

/** The rules of a process, or undefined where this version cannot build it. */
export const rulesOf = (kind: Process['kind']): ProcessRules | undefined => registry[kind] as ProcessRules | undefined;
