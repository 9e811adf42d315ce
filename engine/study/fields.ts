import { z } from 'zod';
import { LIMITS } from '../limits';

/** An exact fraction as text; an integer is taken too, and kept as text. */
export const exactText = z
  .union([z.string().min(1).max(LIMITS.fractionText), z.int()])
  .transform(String);
export const id = z.string().min(1).max(LIMITS.id);
export const name = z.string().trim().min(1).max(LIMITS.name);
export const metreText = z.string().min(1).max(LIMITS.name);
export const rhythmText = z.string().max(LIMITS.rhythmTextLength);
/** how many statements, or the like */
export const count = z.int().min(1).max(LIMITS.statements);
/** how often something is played */
export const repeats = z.int().min(1).max(LIMITS.repeatCount);
/** steps of a rotation */
export const turn = z.int().min(-LIMITS.rhythmValues).max(LIMITS.rhythmValues);
/** what a rotation counts */
export const rotateBy = z.union([z.enum(['values', 'attacks']), z.strictObject({ pulse: exactText })]);
export const reading = z.enum(['forwards', 'backwards-values', 'backwards-attacks']);
/** `successive`, `together`, `ending-together`, or a new entry every so often. */
export const entriesSchema = z.union([z.enum(['successive', 'together', 'ending-together']), z.strictObject({ every: exactText })]);
export type Entries = z.output<typeof entriesSchema>;

export const tempoSchema = z.strictObject({ beat: exactText, perMinute: exactText });

export const stepSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('augment'), factor: exactText }),
  z.strictObject({ kind: z.literal('diminish'), factor: exactText }),
  z.strictObject({ kind: z.literal('retrograde'), by: z.enum(['values', 'attacks']) }),
  z.strictObject({ kind: z.literal('rotate'), steps: turn, by: rotateBy }),
  z.strictObject({ kind: z.literal('add'), amount: exactText }),
]);
/** A chain of transformations. */
export const stepsSchema = z.array(stepSchema).max(LIMITS.steps);
