import 'server-only';
import { EngineError, parseStudy, type Study } from '@/engine';
import { AppError } from '../errors';
import { isKeepable } from '../schemas/common';

/** The path of the first text that no database can hold, undefined where there is none. */
function unkeepable(value: unknown, path: readonly string[] = []): string | undefined {
  if (typeof value === 'string') return isKeepable(value) ? undefined : path.join('.');
  if (typeof value !== 'object' || value === null) return undefined;
  for (const [key, inner] of Object.entries(value)) {
    const found = unkeepable(inner, [...path, key]);
    if (found !== undefined) return found;
  }
  return undefined;
}

function formatOf(value: unknown): unknown {
  return typeof value === 'object' && value !== null && 'format' in value ? value.format : undefined;
}

/**
 * Reads a study document that came with a request; whether it can be built is found out when it is saved.
 * @throws EngineError naming the place where it is no study of this format; AppError where a text cannot be kept
 */
export function readDocument(value: unknown): Study {
  const format = formatOf(value);
  if (typeof format === 'number' && format !== 1) {
    throw new EngineError('invalid_document', `Another version of Sesqui wrote this study (format ${format}), and this one cannot read it. What was saved before is kept as it was.`, { path: 'format' });
  }
  const study = parseStudy(value);
  const path = unkeepable(study);
  if (path === undefined) return study;
  const message = 'A text in this study holds a character that cannot be kept: type it again.';
  throw new AppError('invalid', message, { [path]: message });
}
