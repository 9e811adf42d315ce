import { z } from 'zod';
import { LIMITS, MISTAKES, stepsSchema } from '@/engine';

/** Longest rhythm text and list that the open API takes: it answers at once, or not at all. */
export const OPEN_TEXT = 20_000;
const OPEN_ITEMS = 200;

const rhythm = z.string().min(1, 'A rhythm is missing.').max(OPEN_TEXT, `A rhythm has at most ${OPEN_TEXT} characters here.`).describe('Rhythm text: lengths in whole notes, rests in round brackets, such as 1/4 (1/8) 3/8');
const exact = z.string().min(1).max(LIMITS.fractionText).describe('An exact fraction as text, such as 3/2, 1 1/2, 1.5 or 150%');
const fraction = z.string().describe('An exact fraction in lowest terms, such as 3/2');
const metre = z.string().min(1).max(60).describe('A metre, such as 4/4, 7/8 or 3+2+2/8');
const list = z.array(exact).min(1).max(OPEN_ITEMS);
const steps = stepsSchema.describe('A chain of transformations, first to last');

export const transformBody = z.strictObject({ rhythm, steps, metre: metre.optional() });
export const transformResponse = z.object({ rhythm: z.string(), total: fraction, attacks: z.array(fraction), measures: fraction.optional().describe('How many measures of the metre it lasts') });

export const checkBody = z.strictObject({ subject: rhythm, steps, answer: rhythm, metre: metre.optional() });
const value = z.string().describe('A value as rhythm text');
export const checkResponse = z.object({
  correct: z.boolean(),
  expected: z.string(),
  marks: z.object({ got: z.int(), of: z.int() }),
  values: z.array(z.object({ expected: value.optional(), given: value.optional(), verdict: z.enum(['right', 'wrong-length', 'wrong-kind', 'missing', 'extra']) })),
  diagnoses: z.array(z.object({ code: z.enum(MISTAKES), message: z.string(), at: z.object({ value: z.int(), measure: z.int().optional(), beat: z.string().optional() }) })),
  spelling: z.array(z.object({ value: z.int(), message: z.string() })).describe('How the answer is spelled, apart from the marks'),
});

export const findBody = z.strictObject({ from: rhythm, to: rhythm });
const retrograde = z.union([z.literal(false), z.enum(['values', 'attacks'])]);
export const findResponse = z.object({
  found: z.array(z.object({ factor: fraction, retrograde, rotation: z.int() })).describe('Every transformation that turns the first into the second, fewest operations first'),
  nearest: z
    .object({ ratios: z.array(fraction.nullable()), stretch: z.object({ from: z.int(), to: z.int(), length: z.int(), factor: fraction, retrograde }).nullable() })
    .nullable()
    .describe('Where none does: the ratio of each value, and the longest stretch that one transformation explains'),
});

export const lengthsBody = z.strictObject({ lengths: list, claim: exact.optional() });
export const lengthsResponse = z.object({
  total: fraction,
  toFirst: z.array(fraction),
  steps: z.array(z.object({ ratio: fraction, name: z.string().nullable() })),
  equalSteps: z.boolean(),
  claim: z.object({ holds: z.boolean(), step: z.int().nullable().describe('The first step that breaks it, from 0'), run: z.array(fraction).describe('The run that would satisfy it') }).nullable(),
});

const tempo = z.strictObject({ beat: exact, perMinute: exact });
export const stretchBody = z.strictObject({ measures: exact, metre, tempo, factor: exact });
export const stretchResponse = z.object({
  measures: fraction, beats: fraction, seconds: fraction, endsInto: fraction.describe('How much of its last measure has gone by; 0 where it ends with a measure'),
  name: z.string().nullable(),
  writing: z.object({ tempo: z.object({ before: fraction, after: fraction, perMinute: fraction }), metre: z.string().nullable().describe('null where no metre has that length') }),
});

export const tempoBody = z.strictObject({ tempo, pivots: z.array(z.strictObject({ before: exact, after: exact })).max(32) });
export const tempoResponse = z.object({ tempos: z.array(z.object({ perMinute: fraction, factor: fraction, metronome: fraction, off: fraction.describe('Beats that a metronome of whole numbers is ahead after a minute') })) });

const cycle = z.union([exact, z.strictObject({ length: exact, entry: exact.optional().describe('When it enters; 0 where nothing is said'), repeats: z.int().min(1).max(1_000_000_000).optional().describe('How often it turns; without end where nothing is said') })]);
export const alignmentBody = z.strictObject({ cycles: z.array(cycle).min(1).max(OPEN_ITEMS) });
export const alignmentResponse = z.object({
  meet: fraction.nullable().describe('null where they never begin a turn together'),
  turns: z.array(fraction),
  period: fraction.describe('How long after that they meet again'),
  pulse: fraction,
  states: fraction,
  ended: z.int().nullable().describe('The first cycle that has ended before they meet, from 0'),
});

export const divisionBody = z.strictObject({ whole: exact, ratios: list, unit: exact.default('1') });
export const divisionResponse = z.object({ parts: z.array(z.object({ exact: fraction, rounded: fraction, error: fraction })) });

export const canonBody = z.strictObject({ length: exact, speeds: list, meet: exact.default('1') });
export const canonResponse = z.object({ voices: z.array(z.object({ speed: fraction, length: fraction, delay: fraction, end: fraction })) });

/** Every question of the open API: its address, what it says, what goes in and comes out, and an example that runs. */
export const OPEN_ROUTES = {
  transform: { path: '/api/transform', summary: 'A rhythm after a chain of transformations', body: transformBody, response: transformResponse, example: { rhythm: '3/8 1/8 1/4 (1/4)', steps: [{ kind: 'augment', factor: '3/2' }, { kind: 'retrograde', by: 'values' }], metre: '4/4' } },
  check: { path: '/api/check', summary: 'An answer beside its key: marks and named mistakes', body: checkBody, response: checkResponse, example: { subject: '3/8 1/8 1/4 (1/4)', steps: [{ kind: 'augment', factor: '2' }], answer: '3/4 1/4 1/2 (1/4)', metre: '4/4' } },
  find: { path: '/api/find', summary: 'What turns one rhythm into another', body: findBody, response: findResponse, example: { from: '3/8 1/8 1/4 1/4', to: '1/2 1/2 1/4 3/4' } },
  lengths: { path: '/api/proportions/lengths', summary: 'A run of lengths as ratios, and a claim about it', body: lengthsBody, response: lengthsResponse, example: { lengths: ['4', '6', '8', '12'], claim: '3/2' } },
  stretch: { path: '/api/proportions/stretch', summary: 'A length stretched: measures, beats, seconds, and how it can be written', body: stretchBody, response: stretchResponse, example: { measures: '8', metre: '4/4', tempo: { beat: '1/4', perMinute: '84' }, factor: '3/2' } },
  tempo: { path: '/api/proportions/tempo', summary: 'Tempos that follow from one another by equivalences', body: tempoBody, response: tempoResponse, example: { tempo: { beat: '1/4', perMinute: '84' }, pivots: [{ before: '3/8', after: '1/4' }] } },
  alignment: { path: '/api/proportions/alignment', summary: 'When cycles that begin together meet again', body: alignmentBody, response: alignmentResponse, example: { cycles: ['3/4', '5/8', '1'] } },
  division: { path: '/api/proportions/division', summary: 'A whole divided by ratios, rounded so that the sum is kept', body: divisionBody, response: divisionResponse, example: { whole: '89', ratios: ['55', '34'], unit: '1' } },
  canon: { path: '/api/proportions/canon', summary: 'When voices at given speeds must enter to end or meet together', body: canonBody, response: canonResponse, example: { length: '60', speeds: ['3', '4', '5'], meet: '1' } },
} as const;
export type OpenRoute = keyof typeof OPEN_ROUTES;
export type OpenBody<K extends OpenRoute> = z.output<(typeof OPEN_ROUTES)[K]['body']>;
export type OpenResponse<K extends OpenRoute> = z.output<(typeof OPEN_ROUTES)[K]['response']>;
export const isCalculator = (name: unknown): name is Exclude<OpenRoute, 'transform' | 'check' | 'find'> =>
  typeof name === 'string' && Object.hasOwn(OPEN_ROUTES, name) && !['transform', 'check', 'find'].includes(name);
