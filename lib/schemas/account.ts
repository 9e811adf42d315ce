import { z } from 'zod';
import { COMMON_PASSWORDS } from './common-passwords';
import { isKeepable, moment, typedText } from './common';

/** Fewest and most characters of a password. */
export const PASSWORD_LENGTH = { min: 8, max: 128 } as const;

export const roles = ['composer', 'teacher', 'student', 'administrator'] as const;
/** The roles that registration offers. */
export const offeredRoles = ['composer', 'teacher', 'student'] as const;
export type Role = (typeof roles)[number];
export type OfferedRole = (typeof offeredRoles)[number];
export const valueNames = ['american', 'british'] as const;
export const paperSizes = ['a4', 'letter'] as const;

const name = typedText('A name', 100);

/** 254 is the longest address that mail can be sent to (RFC 5321, 4.5.3.1.3, less the angle brackets). */
export const emailText = z
  .string('An e-mail address is text.')
  .max(254, 'An e-mail address has at most 254 characters.')
  .transform((text) => text.trim())
  .pipe(z.string().regex(/^[^\s\p{Cc}\p{Surrogate}@]+@[^\s\p{Cc}\p{Surrogate}@]+$/u, 'An e-mail address has an @ with something before and after it.'));

const newPassword = z
  .string('A password is text.')
  .min(PASSWORD_LENGTH.min, `A password has at least ${PASSWORD_LENGTH.min} characters.`)
  .max(PASSWORD_LENGTH.max, `A password has at most ${PASSWORD_LENGTH.max} characters.`)
  .refine(isKeepable, 'This password holds a character that cannot be typed again: choose another.')
  .refine(
    (text) => !COMMON_PASSWORDS.has(text.toLowerCase()) && new Set(text).size > 1,
    'This password is among the first that anybody would guess: choose another.',
  );

/** Whether a password is the address that it belongs to, or the part before its @. */
export function isAddress(password: string, email: string): boolean {
  const [whole, given] = [email.trim().toLowerCase(), password.trim().toLowerCase()];
  return given === whole || given === whole.split('@')[0];
}

export const ADDRESS_AS_PASSWORD = 'A password must not be the e-mail address itself: choose another.';

/** POST /api/register. No composition rules (NIST SP 800-63B, 5.1.1.2): length, and not one of the first guesses. */
export const registerBody = z
  .strictObject({ name, email: emailText, password: newPassword, role: z.enum(offeredRoles, 'Choose composer, teacher or student.') })
  .refine(({ email, password }) => !isAddress(password, email), { path: ['password'], message: ADDRESS_AS_PASSWORD });

export const accountItem = z.object({
  id: z.string(),
  name: z.string(),
  email: z.string(),
  role: z.enum(roles),
  valueNames: z.enum(valueNames),
  paperSize: z.enum(paperSizes),
  createdAt: moment,
});
export const accountResponse = z.object({ account: accountItem });

export const updateAccountBody = z
  .strictObject({
    name: name.optional(),
    valueNames: z.enum(valueNames, 'Names of values are american or british.').optional(),
    paperSize: z.enum(paperSizes, 'Paper is a4 or letter.').optional(),
  })
  .refine((body) => Object.values(body).some((value) => value !== undefined), 'Say what is to change.');

/** `current` may be any text, however long ago its rules were other ones. */
export const changePasswordBody = z.strictObject({
  current: z.string('A password is text.').min(1, 'Type the present password.').max(PASSWORD_LENGTH.max, 'This is not the present password.'),
  next: newPassword,
});

export type AccountWire = z.input<typeof accountResponse>;
export type Account = z.output<typeof accountItem>;
