import { EngineError } from '../errors';
import type { ReadOptions } from './types';

/** Bytes that are read in one step. */
export const STEP_BYTES = 32 * 1024;
/** Events that are read in one step. */
export const STEP_EVENTS = 4_096;

/** Ends a step of reading. @throws EngineError `out_of_time` */
export async function nextStep({ pause, isExpired }: ReadOptions): Promise<void> {
  if (pause) await pause();
  if (isExpired?.()) throw new EngineError('out_of_time', 'Reading this file takes too long and was given up. Save the part that is needed as a file of its own.');
}

/** Bytes in steps. */
export async function* inSteps(bytes: Uint8Array, options: ReadOptions): AsyncGenerator<Uint8Array> {
  for (let at = 0; at < bytes.length; at += STEP_BYTES) {
    yield bytes.subarray(at, at + STEP_BYTES);
    await nextStep(options);
  }
}
