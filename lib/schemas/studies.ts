import { z } from 'zod';
import { LIMITS, studySchema, type Study } from '@/engine';

/** A moment: a `Date` in the program, ISO text on the wire. */
export const moment = z.codec(z.iso.datetime(), z.date(), {
  decode: (text) => new Date(text),
  encode: (date) => date.toISOString(),
});

export const studyParams = z.object({
  id: z
    .string()
    .max(LIMITS.id, `A study's name in an address has at most ${LIMITS.id} characters.`)
    .regex(/^[a-z0-9-]+$/i, "A study's name in an address has letters, digits and hyphens only."),
});

export const studyListItem = z.object({
  id: z.string(),
  /** the readable name in the address; demo studies have one */
  slug: z.string().nullable(),
  title: z.string(),
  summary: z.string(),
  version: z.int(),
  updatedAt: moment,
});

export const studyListResponse = z.object({ studies: z.array(studyListItem) });

export const studyItem = z.object({
  id: z.string(),
  slug: z.string().nullable(),
  title: z.string(),
  version: z.int(),
  document: z.custom<Study>((value) => studySchema.safeParse(value).success, 'This is not a study that can be read.'),
  updatedAt: moment,
  isDemo: z.boolean(),
});

export const studyResponse = z.object({ study: studyItem });

/** What the API sends, and the client's cache holds. */
export type StudyListWire = z.input<typeof studyListResponse>;
export type StudyWire = z.input<typeof studyResponse>;
/** What pages work with. */
export type StudyListItem = z.output<typeof studyListItem>;
export type StudyItem = z.output<typeof studyItem>;
