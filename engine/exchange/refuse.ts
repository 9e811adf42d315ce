import { EngineError } from '../errors';

/** A file that is damaged, cut off or of another kind. */
export const unreadable = (message: string): never => {
  throw new EngineError('unreadable_music', message);
};

/** A file that could do harm. */
export const hostile = (message: string): never => {
  throw new EngineError('hostile_file', message);
};

export const tooLarge = (message: string): never => {
  throw new EngineError('too_large', message);
};

export const megabytes = (bytes: number): string => `${Math.floor(bytes / 1024 / 1024)} MB`;

/** What a file calls something, fit to be shown: one line, no control characters, not too long. */
export const shown = (text: string, most = 60): string => {
  const line = text.replace(/[\p{Cc}\p{Cf}\p{Cs}\s]+/gu, ' ').trim();
  return line.length > most ? `${line.slice(0, most - 1)}…` : line;
};
