import 'server-only';
import {
  EngineError, applySteps, attacks, canonEntries, checkAnswer, checkLadder, divide, findTransformations, formatFraction as f, formatRhythm, ladder, measuresOf, meetingOf,
  nearestTransformation, parseMetre, parseRhythm, pivotFor, proportionName, roundParts, secondsOf, stretchedMetre, tempoChain, toFactor, toFraction, totalLength,
} from '@/engine';
import type { OpenBody, OpenResponse, OpenRoute } from '../schemas/open';

function metreOrNull(metre: string, factor: string): string | null {
  try {
    return stretchedMetre(metre, toFactor(factor));
  } catch (error) {
    if (error instanceof EngineError && error.code === 'invalid_metre') return null;
    throw error;
  }
}

/** The answers of the open API, all of them the engine's, lengths as text. Each throws EngineError where it refuses. */
export const OPEN_ANSWERS: { readonly [K in OpenRoute]: (body: OpenBody<K>) => OpenResponse<K> } = {
  transform({ rhythm, steps, metre }) {
    const result = applySteps(parseRhythm(rhythm), steps);
    const total = totalLength(result);
    return { rhythm: formatRhythm(result), total: f(total), attacks: attacks(result).map(f), ...(metre === undefined ? {} : { measures: f(measuresOf(total, metre)) }) };
  },
  check({ metre, ...input }) {
    const { expected, values, ...rest } = checkAnswer({ ...input, ...(metre === undefined ? {} : { metre }) });
    const told = values.map(({ expected: key, given, verdict }) => ({ ...(key ? { expected: formatRhythm([key]) } : {}), ...(given ? { given: formatRhythm([given]) } : {}), verdict }));
    return { ...rest, diagnoses: [...rest.diagnoses], spelling: [...rest.spelling], expected: formatRhythm(expected), values: told };
  },
  find({ from, to }) {
    const [a, b] = [parseRhythm(from), parseRhythm(to)];
    const found = findTransformations(a, b).map((one) => ({ ...one, factor: f(one.factor) }));
    if (found.length > 0) return { found, nearest: null };
    const { ratios, stretch } = nearestTransformation(a, b);
    return { found, nearest: { ratios: ratios.map((ratio) => ratio && f(ratio)), stretch: stretch && { ...stretch, factor: f(stretch.factor) } } };
  },
  lengths({ lengths, claim }) {
    const { total, toFirst, steps, equalSteps } = ladder(lengths);
    const checked = claim === undefined ? null : checkLadder(lengths, claim);
    return {
      total: f(total), toFirst: toFirst.map(f), equalSteps,
      steps: steps.map((ratio) => ({ ratio: f(ratio), name: proportionName(ratio)?.name ?? null })),
      claim: checked && { holds: checked.holds, step: checked.failure?.step ?? null, run: checked.run.map(f) },
    };
  },
  stretch({ measures, metre, tempo, factor }) {
    const stretched = toFraction(measures).mul(toFactor(factor));
    const { length, unit } = parseMetre(metre);
    const { before, after } = pivotFor(factor, tempo.beat);
    return {
      measures: f(stretched), beats: f(stretched.mul(length).mul(unit)), seconds: f(secondsOf(stretched.mul(length), tempo)), endsInto: f(stretched.sub(stretched.floor())),
      name: proportionName(factor)?.name ?? null,
      writing: { tempo: { before: f(before), after: f(after), perMinute: f(toFraction(tempo.perMinute).div(toFactor(factor))) }, metre: metreOrNull(metre, factor) },
    };
  },
  tempo: ({ tempo, pivots }) => ({ tempos: tempoChain(tempo, pivots).map(({ perMinute, factor, metronome, off }) => ({ perMinute: f(perMinute), factor: f(factor), metronome: f(metronome), off: f(off) })) }),
  alignment({ cycles }) {
    const { at, turns, period, pulse, states, ended } = meetingOf(cycles.map((cycle) => (typeof cycle === 'string' ? { length: cycle } : cycle)));
    return { meet: at && f(at), turns: turns.map(f), period: f(period), pulse: f(pulse), states: f(states), ended };
  },
  division: ({ whole, ratios, unit }) => ({ parts: roundParts(divide(whole, ratios), unit).map(({ exact, rounded, error }) => ({ exact: f(exact), rounded: f(rounded), error: f(error) })) }),
  canon: ({ length, speeds, meet }) => ({ voices: canonEntries(length, speeds, meet).map(({ speed, length: own, delay, end }) => ({ speed: f(speed), length: f(own), delay: f(delay), end: f(end) })) }),
};
