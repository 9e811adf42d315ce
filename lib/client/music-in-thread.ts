import type { Study } from '@/engine';
import { FILE_TYPES } from '../file-types';
import type { MusicKind } from '../music-files';
import { ApiError } from './get-json';
import type { MusicAnswer, MusicAsked } from './music-worker';

function ask(asked: MusicAsked, signal: AbortSignal): Promise<MusicAnswer> {
  return new Promise((resolve, reject) => {
    signal.throwIfAborted();
    const thread = new Worker(new URL('./music-worker.ts', import.meta.url), { type: 'module' });
    const stop = (act: () => void) => {
      thread.terminate();
      signal.removeEventListener('abort', onAbort);
      act();
    };
    const onAbort = () => stop(() => reject(signal.reason as Error));
    signal.addEventListener('abort', onAbort, { once: true });
    thread.onmessage = ({ data }: MessageEvent<MusicAnswer>) => stop(() => resolve(data));
    thread.onerror = () => stop(() => reject(new ApiError('internal', 'This browser could not write the file. Try again, or take it from another browser.', 0)));
    thread.postMessage(asked);
  });
}

const refuse = (message: string): never => {
  throw new ApiError('invalid', message, 422);
};

/**
 * Writes a study for other programs, in a thread of its own.
 * @throws ApiError with the reason where it cannot be written; AbortError where it was given up
 */
export async function musicBlob(study: Study, kind: MusicKind, player: string | undefined, signal: AbortSignal): Promise<Blob> {
  const answer = await ask({ study, kind, player }, signal);
  return 'bytes' in answer ? new Blob([answer.bytes], { type: FILE_TYPES[kind] }) : refuse('refused' in answer ? answer.refused : '');
}

/** How finely a MIDI file of a study counts, in a sentence. */
export async function midiWords(study: Study, signal: AbortSignal): Promise<string> {
  const answer = await ask({ study, kind: 'division' }, signal);
  if (!('division' in answer)) return 'refused' in answer ? answer.refused : '';
  const { ticks, isExact, worst } = answer.division;
  const count = ticks.toLocaleString('en');
  return isExact ? `Exact: every attack falls on a tick, ${count} to a quarter.` : `Not exact: attacks fall on the nearest of ${count} ticks to a quarter, at most ${worst} of a quarter off.`;
}
