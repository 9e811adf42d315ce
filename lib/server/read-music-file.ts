import 'server-only';
import { setImmediate } from 'node:timers/promises';
import { formatFraction, formatRhythm, readMusic, toFraction } from '@/engine';
import { AppError } from '../errors';
import type { ReadMusicResponse } from '../schemas/music';
import { READINGS, READING_TIME, UNPACKED_BYTES } from './limits';

let running = 0;

/**
 * Reads a file of music in steps, between which other requests are answered.
 * @throws EngineError where it cannot be read, or not in time; AppError `too_many` where too many are read already
 */
export async function readMusicFile(bytes: Uint8Array): Promise<ReadMusicResponse> {
  if (running >= READINGS) throw new AppError('too_many', 'Too many files are being read just now. Try again in a moment.');
  running += 1;
  try {
    const end = performance.now() + READING_TIME;
    const found = await readMusic(bytes, { pause: () => setImmediate(), isExpired: () => performance.now() > end, unpackedBytes: UNPACKED_BYTES });
    return {
      candidates: found.map(({ name, metre, tempo, rhythm, warnings }) => ({
        name,
        metre,
        tempo: { beat: formatFraction(toFraction(tempo.beat)), perMinute: formatFraction(toFraction(tempo.perMinute)) },
        rhythm: formatRhythm(rhythm),
        warnings: [...warnings],
      })),
    };
  } finally {
    running -= 1;
  }
}
