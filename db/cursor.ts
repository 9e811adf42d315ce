/**
 * Where the next page of a list begins: the values that the last row was sorted by, as text that only the server reads.
 * It names a place, and gives no right: the owner stands in the query.
 */
export function writeCursor(values: readonly (string | number)[]): string {
  return Buffer.from(JSON.stringify(values)).toString('base64url');
}

/** @returns the values, or undefined where the text was not written by `writeCursor` with these kinds */
export function readCursor(text: string, kinds: readonly ('string' | 'number' | 'uuid' | 'moment')[]): (string | number)[] | undefined {
  if (!/^[\w-]+$/.test(text)) return undefined;
  let values: unknown;
  try {
    values = JSON.parse(Buffer.from(text, 'base64url').toString('utf8'));
  } catch {
    return undefined;
  }
  if (!Array.isArray(values) || values.length !== kinds.length) return undefined;
  const fits = values.every((value: unknown, index) => {
    const kind = kinds[index];
    if (kind === 'number') return typeof value === 'number' && Number.isFinite(value);
    if (typeof value !== 'string' || /[\0\p{Surrogate}]/u.test(value)) return false;
    if (kind === 'uuid') return UUID.test(value);
    return kind === 'string' || isMoment(value);
  });
  return fits ? (values as (string | number)[]) : undefined;
}

/** The form of the ids that the database makes. */
export const UUID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;
const MOMENT = /^(?!0000)\d{4}-(0[1-9]|1[0-2])-(0[1-9]|[12]\d|3[01])T([01]\d|2[0-3]):[0-5]\d:[0-5]\d\.\d{3}Z$/;
/** A day that the calendar has: the 31st of February reads as one of March. The database has no year 0. */
const isMoment = (text: string): boolean => MOMENT.test(text) && new Date(text).toISOString() === text;
