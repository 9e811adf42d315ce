import { z } from 'zod';
import { LIMITS, studySchema, type Study } from '@/engine';
import { cursorText, moment, searchText, typedText, uuid } from './common';
import { errorResponse } from './error';

export { moment } from './common';

export const studyParams = z.object({
  id: z
    .string()
    .max(LIMITS.id, `A study's name in an address has at most ${LIMITS.id} characters.`)
    .regex(/^[a-z0-9-]+$/i, "A study's name in an address has letters, digits and hyphens only."),
});

/** The form of a study drawn small: sections in order, each with a share of the whole. */
export const strip = z.array(
  z.object({
    /** 0 to 1 */
    share: z.number(),
    /** who plays when: `from` and `to` are 0 to 1 within the section */
    parts: z.array(z.object({ from: z.number(), to: z.number(), family: z.enum(['metal', 'wood', 'skin', 'found']) })),
  }),
);

export const studyListItem = z.object({
  id: z.string(),
  /** the readable name in the address; demo studies have one */
  slug: z.string().nullable(),
  title: z.string(),
  summary: z.string(),
  version: z.int(),
  createdAt: moment,
  updatedAt: moment,
  /** when it was thrown away; it can be restored for `DELETED_DAYS` */
  deletedAt: moment.nullable(),
  /** exact, as a mixed number: `77`, `12 1/2` */
  measures: z.string(),
  seconds: z.number(),
  strip,
});

/** How long a study that was thrown away can be restored. */
export const DELETED_DAYS = 30;
/** Studies on one page of the list, and versions on one page of theirs. */
export const PAGE_SIZE = 30;

/** `changed`: the last changed first. `title`: A to Z. `length`: the shortest first. */
export const studySorts = ['changed', 'title', 'length'] as const;
export type StudySort = (typeof studySorts)[number];

/** The address of GET /api/studies: without `list`, the demo studies. */
export const studyListParams = z.discriminatedUnion('list', [
  z.object({ list: z.literal('demo') }),
  z.object({
    list: z.literal('own'),
    q: searchText,
    sort: z.enum(studySorts, 'A list is sorted by changed, title or length.').default('changed'),
    cursor: cursorText,
    deleted: z.enum(['true', 'false'], 'Say true or false.').default('false').transform((text) => text === 'true'),
  }),
], 'There is a list of demo studies and a list of one’s own.');

export const studyListResponse = z.object({ studies: z.array(studyListItem) });
export const ownStudyListResponse = z.object({ studies: z.array(studyListItem), nextCursor: z.string().nullable() });

const document = z.custom<Study>((value) => studySchema.safeParse(value).success, 'This is not a study that can be read.');

export const studyItem = z.object({
  id: z.string(),
  slug: z.string().nullable(),
  title: z.string(),
  version: z.int(),
  document,
  updatedAt: moment,
  isDemo: z.boolean(),
});

export const studyResponse = z.object({ study: studyItem });
/** A study as a list shows it: the answer of deleting and restoring. */
export const studyListItemResponse = z.object({ study: studyListItem });

/** The answer 409 `version_conflict`: somebody saved first, and this is what they saved. */
export const conflictResponse = errorResponse.extend({ current: studyItem });

export const versionNumber = z.int('A version is a whole number.').min(1, 'Versions count from 1.').max(2_000_000_000, 'There is no such version.');
const title = typedText('A title', LIMITS.name);

/** `document` is read by `parseStudy` afterwards, whose refusals name the place. */
export const createStudyBody = z.strictObject({ document: z.unknown(), saveId: uuid });
export const saveStudyBody = z.strictObject({ document: z.unknown(), baseVersion: versionNumber, saveId: uuid });
export const renameStudyBody = z.strictObject({ title, baseVersion: versionNumber, saveId: uuid.optional() });
export const copyStudyBody = z.strictObject({ title: title.optional(), saveId: uuid.optional() });

export const versionListParams = z.object({ cursor: cursorText });
export const versionParams = studyParams.extend({
  version: z.string().regex(/^[1-9]\d{0,8}$/, 'Versions count from 1.').transform(Number),
});
export const versionListItem = z.object({ version: z.int(), createdAt: moment, title: z.string() });
export const versionListResponse = z.object({ versions: z.array(versionListItem), nextCursor: z.string().nullable() });
export const versionResponse = z.object({ version: versionListItem.extend({ document }) });

/** What the API sends, and the client's cache holds. */
export type StudyListWire = z.input<typeof studyListResponse>;
export type OwnStudyListWire = z.input<typeof ownStudyListResponse>;
export type StudyWire = z.input<typeof studyResponse>;
export type VersionListWire = z.input<typeof versionListResponse>;
export type VersionWire = z.input<typeof versionResponse>;
export type ConflictWire = z.input<typeof conflictResponse>;
/** What pages work with. */
export type StudyListItem = z.output<typeof studyListItem>;
export type StudyItem = z.output<typeof studyItem>;
export type Strip = z.output<typeof strip>;
export type VersionListItem = z.output<typeof versionListItem>;
