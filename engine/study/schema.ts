import { z } from 'zod';
import { EngineError } from '../errors';
import { LIMITS } from '../limits';
import { PROCESSES } from '../process/registry';
import { exactText, id, metreText, name, rhythmText, stepsSchema, tempoSchema } from './fields';

/** Every process of the registry, told apart by its kind. */
const schemas = Object.values(PROCESSES).map(({ schema }) => schema);
export const processSchema = z.discriminatedUnion('kind', schemas as [(typeof schemas)[number], ...typeof schemas]);

/** How an attack ends, where it does not just end: it goes wherever the attack goes. Attacks are counted from 0. */
const marksSchema = z.array(z.strictObject({ attack: z.int().min(0).max(LIMITS.rhythmValues), ends: z.enum(['let-ring', 'choke']) })).max(LIMITS.marks);
/** Levels and hairpins, such as `p < f > mp`, or words. */
const dynamics = z.string().max(LIMITS.name);

const lineSchema = z.strictObject({ instrument: id, rhythm: rhythmText, marks: marksSchema.optional(), dynamics: dynamics.optional() });

const sectionCommon = {
  id,
  name,
  role: z.enum(['exposition', 'episode', 'development', 'recapitulation', 'coda', 'other']),
  metre: metreText.optional(),
  tempo: tempoSchema.optional(),
  writing: z.enum(['values', 'tempo', 'metre']).optional(),
  under: z.array(lineSchema).max(LIMITS.lines).optional(),
  dynamics: dynamics.optional(),
  /** whether everybody holds its end */
  fermata: z.literal(true).optional(),
};

const processSectionSchema = z.strictObject({
  ...sectionCommon,
  kind: z.literal('process'),
  subject: id.optional(),
  process: processSchema,
  instruments: z.array(id).max(LIMITS.instruments),
  before: stepsSchema.optional(),
  /** one a statement, repeated in turn, in place of the section's; an empty one leaves the section's */
  statementDynamics: z.array(dynamics).max(LIMITS.statements).optional(),
});
const freeSectionSchema = z.strictObject({
  ...sectionCommon,
  kind: z.literal('free'),
  lines: z.array(lineSchema).max(LIMITS.lines),
});
const mirrorSectionSchema = z.strictObject({
  ...sectionCommon,
  kind: z.literal('mirror'),
  of: id,
  by: z.enum(['values', 'attacks']).optional(),
});

export const sectionSchema = z.discriminatedUnion('kind', [processSectionSchema, freeSectionSchema, mirrorSectionSchema]);

/**
 * The shape of a study document, format 1. It checks shape and limits; what the music makes of it (rhythm text, fractions,
 * ids that exist, mirrors, overlaps) is checked by `buildStudy`.
 */
export const studySchema = z.strictObject({
  format: z.literal(1).default(1),
  title: name,
  composer: z.string().trim().max(LIMITS.name).optional(),
  /** the line that the composer chooses to state their rights with; the program states none */
  rights: z.string().trim().max(LIMITS.name).optional(),
  metre: metreText,
  tempo: tempoSchema,
  pickup: exactText.optional(),
  subjects: z.array(z.strictObject({ id, name, rhythm: rhythmText, marks: marksSchema.optional() })).max(LIMITS.subjects).default([]),
  instruments: z
    .array(
      z.strictObject({
        id,
        name,
        family: z.enum(['metal', 'wood', 'skin', 'found']),
        sound: z.string().max(LIMITS.id).optional(),
        /** how many sounds the instrument has, 1 where nothing is said */
        sounds: z.int().min(1).max(LIMITS.sounds).optional(),
      }),
    )
    .max(LIMITS.instruments),
  players: z
    .array(z.strictObject({ id, name, instruments: z.array(id).max(LIMITS.instruments) }))
    .max(LIMITS.players)
    .default([]),
  sections: z.array(sectionSchema).min(1).max(LIMITS.sections),
});

/** A study document as it may be written. */
export type StudyInput = z.input<typeof studySchema>;
/** A study document that has passed the schema. */
export type Study = z.output<typeof studySchema>;
export type Section = Study['sections'][number];
export type ProcessSection = Extract<Section, { kind: 'process' }>;
export type FreeSection = Extract<Section, { kind: 'free' }>;
export type MirrorSection = Extract<Section, { kind: 'mirror' }>;
export type Process = ProcessSection['process'];
export type { ProportionProcess } from '../process/proportion';
export type { Entries } from './fields';
export type Instrument = Study['instruments'][number];
export type Family = Instrument['family'];
export type Role = Section['role'];

const pathWords = (path: readonly PropertyKey[]): string =>
  path.length === 0 ? 'the study' : `“${path.map((part) => (typeof part === 'number' ? part + 1 : String(part))).join(' › ')}”`;

function issueError(issue: z.core.$ZodIssue): EngineError {
  const path = issue.path.map(String).join('.');
  if (issue.code === 'unrecognized_keys') {
    const keys = issue.keys.map((key) => `“${key.slice(0, 60)}”`).join(', ');
    return new EngineError('unknown_field', `${keys} in ${pathWords(issue.path)} is not known to this version. The study is kept as it was.`, { path });
  }
  if (issue.code === 'too_big') {
    return new EngineError('too_large', `There is too much in ${pathWords(issue.path)}: ${String(issue.maximum)} is the limit.`, { path });
  }
  const detail = issue.code === 'custom' ? issue.message : `${pathWords(issue.path)} is missing or cannot be read: ${issue.message}.`;
  return new EngineError('invalid_document', `This is not a study that can be read. ${detail}`, { path });
}

/**
 * Checks the shape of a study document.
 * @throws EngineError `unknown_field`, `too_large` or `invalid_document`, with the `path` of the first fault
 */
export function parseStudy(document: unknown): Study {
  const result = studySchema.safeParse(document);
  if (result.success) return result.data;
  throw issueError(result.error.issues[0]!);
}
