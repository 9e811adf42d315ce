import { z } from 'zod';
import { roles } from './account';
import { cursorText, moment, searchText, uuid } from './common';

export const peopleParams = z.object({ q: searchText, cursor: cursorText });
export const personParams = z.object({ id: uuid });

export const personItem = z.object({
  id: z.string(),
  name: z.string(),
  email: z.string(),
  role: z.enum(roles),
  createdAt: moment,
  /** when the account was closed; null for an open one */
  disabledAt: moment.nullable(),
});

export const peopleResponse = z.object({ people: z.array(personItem), nextCursor: z.string().nullable() });
export const personResponse = z.object({ person: personItem });

export const updatePersonBody = z
  .strictObject({
    role: z.enum(roles, 'A role is composer, teacher, student or administrator.').optional(),
    disabled: z.boolean('Say true or false.').optional(),
  })
  .refine((body) => Object.values(body).some((value) => value !== undefined), 'Say what is to change.');

export type PeopleWire = z.input<typeof peopleResponse>;
export type Person = z.output<typeof personItem>;
