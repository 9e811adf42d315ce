import type { z } from 'zod';
import { ApiError } from './get-json';

/** What is wrong with what was typed: sentences by field, and one for the whole under `''`. */
export type FormErrors = Readonly<Record<string, string>>;

/** Reads what was typed as the server will. @returns the errors, the first of each field; null where it is right */
export function errorsOf(schema: z.ZodType, values: unknown): FormErrors | null {
  const read = schema.safeParse(values);
  if (read.success) return null;
  const errors: Record<string, string> = {};
  for (const { path, message } of read.error.issues) errors[path.map(String).join('.')] ??= message;
  return errors;
}

/** What an answer says is wrong: by field where it names fields, else as a whole. */
export function errorsOfAnswer(error: unknown): FormErrors {
  if (error instanceof ApiError && error.fields) return error.fields;
  return { '': error instanceof Error ? error.message : String(error) };
}
