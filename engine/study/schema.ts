import { z } from 'zod';
import { EngineError } from '../errors';
import { LIMITS } from '../limits';

/** An exact fraction as text; an integer is taken too, and kept as text. */
const exactText = z
  .union([z.string().min(1).max(LIMITS.fractionText), z.int()])
  .transform(String);
const id = z.string().min(1).max(LIMITS.id);
const name = z.string().trim().min(1).max(LIMITS.name);
const metreText = z.string().min(1).max(LIMITS.name);
const rhythmText = z.string().max(LIMITS.rhythmTextLength);
const count = z.int().min(1).max(LIMITS.statements);
const turn = z.int().min(-LIMITS.rhythmValues).max(LIMITS.rhythmValues);
const reading = z.enum(['forwards', 'backwards-values', 'backwards-attacks']);

export const tempoSchema = z.strictObject({ beat: exactText, perMinute: exactText });

const stepSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('augment'), factor: exactText }),
  z.strictObject({ kind: z.literal('diminish'), factor: exactText }),
  z.strictObject({ kind: z.literal('retrograde'), by: z.enum(['values', 'attacks']) }),
  z.strictObject({
    kind: z.literal('rotate'),
    steps: turn,
    by: z.union([z.enum(['values', 'attacks']), z.strictObject({ pulse: exactText })]),
  }),
  z.strictObject({ kind: z.literal('add'), amount: exactText }),
]);

/** `successive`, `together`, `ending-together`, or a new entry every so often. */
const entriesSchema = z.union([z.enum(['successive', 'together', 'ending-together']), z.strictObject({ every: exactText })]);

const proportionSchema = z
  .strictObject({
    kind: z.literal('proportion'),
    factors: z.array(exactText).min(1).max(LIMITS.statements).optional(),
    ratio: exactText.optional(),
    count: count.optional(),
    entries: entriesSchema.optional(),
    reading: reading.optional(),
    readings: z.array(reading).min(1).max(LIMITS.statements).optional(),
    rotations: z.array(turn).min(1).max(LIMITS.statements).optional(),
  })
  .refine(
    ({ factors, ratio, count }) =>
      factors === undefined ? ratio !== undefined && count !== undefined : ratio === undefined && count === undefined,
    { message: 'A proportion has either a list of factors, or a ratio and a count.' },
  );

const rotationSchema = z.strictObject({
  kind: z.literal('rotation'),
  steps: turn,
  by: z.union([z.enum(['values', 'attacks']), z.strictObject({ pulse: exactText })]),
  count,
  entries: entriesSchema.optional(),
  reading: reading.optional(),
});
const repeats = z.int().min(1).max(LIMITS.repeatCount);
const phaseSchema = z.strictObject({
  kind: z.literal('phase'),
  pulse: exactText,
  shift: z.int().min(-LIMITS.pulses).max(LIMITS.pulses),
  repeatsPerShift: repeats,
  shifts: z.int().min(0).max(LIMITS.statements),
  reading: reading.optional(),
});
const additiveSchema = z.strictObject({
  kind: z.literal('additive'),
  direction: z.enum(['growing', 'shrinking']),
  from: z.enum(['front', 'back']),
  repeatsEach: repeats,
  reading: reading.optional(),
});
const fillingInSchema = z.strictObject({
  kind: z.literal('filling-in'),
  order: z.array(z.int().min(0)).max(LIMITS.statements),
  repeatsEach: repeats,
  reading: reading.optional(),
});
const cycleSchema = z.strictObject({
  kind: z.literal('cycle'),
  colour: z.array(id).min(1).max(LIMITS.statements),
  until: z.union([z.literal('alignment'), count]),
  reading: reading.optional(),
});
const resultantSchema = z.strictObject({
  kind: z.literal('resultant'),
  a: z.int().min(1).max(LIMITS.pulses),
  b: z.int().min(1).max(LIMITS.pulses),
  unit: exactText,
});

export const processSchema = z.discriminatedUnion('kind', [
  proportionSchema,
  rotationSchema,
  phaseSchema,
  additiveSchema,
  fillingInSchema,
  cycleSchema,
  resultantSchema,
]);

const lineSchema = z.strictObject({ instrument: id, rhythm: rhythmText });

const sectionCommon = {
  id,
  name,
  role: z.enum(['exposition', 'episode', 'development', 'recapitulation', 'coda', 'other']),
  metre: metreText.optional(),
  tempo: tempoSchema.optional(),
  writing: z.enum(['values', 'tempo', 'metre']).optional(),
  under: z.array(lineSchema).max(LIMITS.lines).optional(),
  dynamics: z.string().max(LIMITS.name).optional(),
};

const processSectionSchema = z.strictObject({
  ...sectionCommon,
  kind: z.literal('process'),
  subject: id.optional(),
  process: processSchema,
  instruments: z.array(id).max(LIMITS.instruments),
  before: z.array(stepSchema).max(LIMITS.steps).optional(),
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
  metre: metreText,
  tempo: tempoSchema,
  pickup: exactText.optional(),
  subjects: z.array(z.strictObject({ id, name, rhythm: rhythmText })).max(LIMITS.subjects).default([]),
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
export type ProportionProcess = Extract<Process, { kind: 'proportion' }>;
export type Entries = NonNullable<ProportionProcess['entries']>;
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
