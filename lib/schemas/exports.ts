import { z } from 'zod';
import { LIMITS } from '@/engine';
import { STAFF_SIZES } from '../engraving/page-options';
import { moment } from './common';
import { studyParams, versionNumber } from './studies';

export const PAPERS = ['a4', 'letter'] as const;
export const ORIENTATIONS = ['portrait', 'landscape'] as const;
const paper = z.enum(PAPERS, 'Paper is a4 or letter.').default('a4');
const orientation = z.enum(ORIENTATIONS, 'Paper lies portrait or landscape.').default('portrait');
const STAFF = `A staff is ${STAFF_SIZES.least} to ${STAFF_SIZES.most} mm tall, in steps of half a millimetre.`;
const staff = z.number(STAFF).min(STAFF_SIZES.least, STAFF).max(STAFF_SIZES.most, STAFF).multipleOf(0.5, STAFF);

/** How a print is laid out, in the address of GET …/score.pdf and its like. */
export const pageQuery = z.strictObject({
  paper,
  orientation,
  staff: z.string().regex(/^\d(\.\d)?$/, STAFF).transform(Number).pipe(staff).optional(),
});
/** Addresses of files that have no choices. */
export const noQuery = z.strictObject({});

const playerId = z.string().min(1).max(LIMITS.id, `A player's id has at most ${LIMITS.id} characters.`);

/** The last piece of the address of a part: the player's id and the kind of file. */
export const partParams = studyParams.extend({
  file: z
    .string()
    .max(LIMITS.id + 12)
    .regex(/^.+\.(?:pdf|musicxml|mxl)$/su, 'A part comes as .pdf, .musicxml or .mxl.')
    .transform((file) => {
      const at = file.lastIndexOf('.');
      return { player: file.slice(0, at), kind: file.slice(at + 1) as 'pdf' | 'musicxml' | 'mxl' };
    }),
});

/** POST /api/exports: a document as it stands in the browser, or a saved study by its id. `document` is read by `parseStudy`. */
export const exportBody = z
  .strictObject({
    what: z.enum(['score', 'part', 'parts'], 'Ask for the score, a part, or all parts.'),
    player: playerId.optional(),
    paper,
    orientation,
    staff: staff.optional(),
    document: z.unknown().optional(),
    study: studyParams.shape.id.optional(),
    /** the version that the asker sees; another one there is refused as `version_conflict` */
    version: versionNumber.optional(),
  })
  .refine(({ what, player }) => (what === 'part') === (player !== undefined), { message: 'A part needs its player, and nothing else does.', path: ['player'] })
  .refine(({ document, study }) => (document === undefined) !== (study === undefined), { message: 'Send a document, or name a saved study.', path: ['document'] })
  .refine(({ study, version }) => study !== undefined || version === undefined, { message: 'Only a saved study has a version.', path: ['version'] });

export const exportParams = z.object({ id: z.uuid('This id cannot be read.') });

export const exportStates = ['queued', 'running', 'done', 'failed', 'cancelled'] as const;

export const exportItem = z.object({
  id: z.string(),
  what: z.enum(['score', 'part', 'parts']),
  state: z.enum(exportStates),
  /** pages that are made, or of all parts the parts; `total` is null until it is known */
  done: z.int(),
  total: z.int().nullable(),
  /** why it could not be made */
  error: z.object({ code: z.string(), message: z.string() }).nullable(),
  file: z.object({ name: z.string(), type: z.string() }).nullable(),
  createdAt: moment,
});

export const exportResponse = z.object({
  export: exportItem,
  /** what a guest shows to come back to it, in the header `x-export-token`; sent once */
  token: z.string().optional(),
});
export const EXPORT_TOKEN = 'x-export-token';

export type ExportBody = z.input<typeof exportBody>;
export type ExportWire = z.input<typeof exportResponse>;
export type ExportItem = z.output<typeof exportItem>;
