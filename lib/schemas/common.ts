import { z } from 'zod';

/** A moment: a `Date` in the program, ISO text on the wire. */
export const moment = z.codec(z.iso.datetime(), z.date(), {
  decode: (text) => new Date(text),
  encode: (date) => date.toISOString(),
});

/** Characters that no database text can hold: the zero character, and halves of characters that stand alone. */
const UNKEEPABLE = /[\0\p{Surrogate}]/u;

export const isKeepable = (text: string): boolean => !UNKEEPABLE.test(text);

/**
 * Text that people type, trimmed.
 * @param what - how it is called at the beginning of a sentence, e.g. “A name”
 */
export const typedText = (what: string, most: number, least = 1) =>
  z
    .string(`${what} is text.`)
    .max(most * 4, `${what} has at most ${most} characters.`)
    .refine(isKeepable, `${what} holds a character that cannot be kept: type it again.`)
    .transform((text) => text.trim())
    .pipe(z.string().min(least, `${what} is missing.`).max(most, `${what} has at most ${most} characters.`));

/** What looks for something: empty text looks for everything. */
export const searchText = typedText('What is looked for', 100, 0).default('');

/** The place in a list that the next page begins at; only the server reads it. */
export const cursorText = z.string().min(1).max(2_000, 'This place in the list cannot be read: begin at the top.').optional();

/** An id of our own making. */
export const uuid = z.uuid('This id cannot be read.');

/** An answer that says only that it was done. */
export const doneResponse = z.object({ ok: z.literal(true) });
