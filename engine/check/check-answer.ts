import { RhythmTextError } from '../errors';
import { ZERO, type Fraction, formatFraction, sum } from '../exact/fraction';
import { findTransformations } from '../find/find-transformations';
import { type Metre, parseMetre } from '../rhythm/metre';
import { parseRhythm } from '../rhythm/parse';
import type { Rhythm, Value } from '../rhythm/types';
import { applySteps } from '../transform/steps';
import { type Pairing, align } from './align';
import { HABITS } from './habits';
import { heard, isSameRhythm } from './heard';
import { misreadings } from './misreadings';
import { spellingRemarks } from './spelling-remarks';
import { type CheckInput, type CheckedAnswer, type CheckedValue, type Diagnosis, MISTAKES, type Mistake, type MistakeAt } from './types';

const read = (rhythm: Rhythm | string): Rhythm => (typeof rhythm === 'string' ? parseRhythm(rhythm) : rhythm);
const valueText = ({ length, rest }: Value): string => (rest ? `a rest of ${formatFraction(length)}` : formatFraction(length));

/** Where each value of the key begins, and the end. */
function onsets(values: readonly Value[]): Fraction[] {
  const at = [ZERO];
  for (const { length } of values) at.push(at.at(-1)!.add(length));
  return at;
}

function placeOf(value: number, starts: readonly Fraction[], metre: Metre | undefined): MistakeAt {
  const start = starts[Math.min(value, starts.length - 1)]!;
  if (metre === undefined) return { value };
  const { length, unit } = parseMetre(metre);
  const measures = start.div(length).floor();
  return { value, measure: Number(measures.n), beat: formatFraction(start.sub(measures.mul(length)).mul(unit)) };
}

function placeWords({ value, measure, beat }: MistakeAt): string {
  if (measure === undefined || beat === undefined) return `value ${value + 1}`;
  return `measure ${measure + 1}, beat ${formatBeat(beat)}, value ${value + 1}`;
}

function formatBeat(beat: string): string {
  const [n = '0', d = '1'] = beat.split('/');
  const whole = BigInt(n) / BigInt(d);
  const rest = BigInt(n) % BigInt(d);
  return rest === 0n ? String(whole + 1n) : `${whole + 1n} ${rest}/${d}`;
}

/** Marks for each value of the key: one where it is right. What is too much costs one each, but never more than there is. */
function marksOf(pairings: readonly Pairing[], of: number): { got: number; of: number } {
  const lost = pairings.reduce((n, { kind }) => n + (kind === 'same' ? 0 : 1), 0);
  return { got: Math.max(0, of - lost), of };
}

function checkedValues(pairings: readonly Pairing[], key: readonly Value[], answer: readonly Value[]): CheckedValue[] {
  return pairings.flatMap((pairing): CheckedValue[] => {
    switch (pairing.kind) {
      case 'same':
        return [{ expected: key[pairing.key]!, given: answer[pairing.answer]!, verdict: 'right' }];
      case 'changed': {
        const [expected, given] = [key[pairing.key]!, answer[pairing.answer]!];
        return [{ expected, given, verdict: expected.rest === given.rest ? 'wrong-length' : 'wrong-kind' }];
      }
      case 'struck-again':
        return Array.from({ length: pairing.count }, (_, n): CheckedValue => {
          const given = answer[pairing.answer + n]!;
          return n === 0 ? { expected: key[pairing.key]!, given, verdict: 'wrong-length' } : { given, verdict: 'extra' };
        });
      case 'held-on':
        return Array.from({ length: pairing.count }, (_, n): CheckedValue => {
          const expected = key[pairing.key + n]!;
          return n === 0 ? { expected, given: answer[pairing.answer]!, verdict: 'wrong-length' } : { expected, verdict: 'missing' };
        });
      case 'missing':
        return [{ expected: key[pairing.key]!, verdict: 'missing' }];
      case 'extra':
        return [{ given: answer[pairing.answer]!, verdict: 'extra' }];
    }
  });
}

const LOCAL: Record<Exclude<Pairing['kind'], 'same'>, Mistake> = {
  changed: 'value-wrong', 'struck-again': 'struck-again', 'held-on': 'held-on', missing: 'value-missing', extra: 'value-added',
};

/** What is wrong in single places, told one by one. */
function localDiagnoses(pairings: readonly Pairing[], key: readonly Value[], answer: readonly Value[], place: (value: number) => MistakeAt): Diagnosis[] {
  let next = 0;
  return pairings.flatMap((pairing): Diagnosis[] => {
    const at = place('key' in pairing ? pairing.key : next);
    if ('key' in pairing) next = pairing.key + (pairing.kind === 'held-on' ? pairing.count : 1);
    if (pairing.kind === 'same') return [];
    const expected = 'key' in pairing ? key[pairing.key]! : undefined;
    const given = 'answer' in pairing ? answer[pairing.answer]! : undefined;
    const code = pairing.kind === 'changed' && expected!.rest !== given!.rest ? 'kind-wrong' : LOCAL[pairing.kind];
    const [wrong, habit] = HABITS[code];
    const detail = expected === undefined ? `${valueText(given!)} stands where nothing was expected` : given === undefined ? `${valueText(expected)} was expected` : `${valueText(expected)} was expected, ${valueText(given)} is given`;
    return [{ code, at, message: `${wrong}: ${placeWords(at)}, ${detail}. ${habit}` }];
  });
}

/** A measure of the answer that its own bar lines do not fill. */
function barDiagnosis(answer: Rhythm | string, metre: Metre | undefined, at: MistakeAt): Diagnosis[] {
  if (typeof answer !== 'string' || metre === undefined) return [];
  try {
    parseRhythm(answer, { metre });
    return [];
  } catch (error) {
    if (!(error instanceof RhythmTextError) || error.code !== 'bar_not_full') throw error;
    const [wrong, habit] = HABITS['measure-does-not-add-up'];
    const number = Number(/^Measure (\d+)/.exec(error.message)?.[1] ?? 1);
    return [{ code: 'measure-does-not-add-up', at: { ...at, measure: number - 1, beat: '0' }, message: `${wrong}. ${error.message} ${habit}` }];
  }
}

const isPowerOfTwo = (factor: Fraction): boolean => [factor.n, factor.d].every((part) => (part & (part - 1n)) === 0n);

/** An answer that is the key stretched as a whole: by another factor, or written in another unit. */
function uniform(key: readonly Value[], answer: readonly Value[], steps: CheckInput['steps']): { code: Mistake; what: string }[] {
  const found = findTransformations(key, answer).find(({ retrograde, rotation }) => retrograde === false && rotation === 0);
  if (found === undefined || found.factor.equals(1)) return [];
  const what = `every value lasts ${formatFraction(found.factor)} of what was expected`;
  const stretches = steps.some(({ kind }) => kind === 'augment' || kind === 'diminish');
  return [...(stretches ? [{ code: 'wrong-factor' as const, what }] : []), ...(isPowerOfTwo(found.factor) || !stretches ? [{ code: 'other-unit' as const, what }] : [])];
}

const rank = (code: Mistake): number => MISTAKES.indexOf(code);

/**
 * Judges an answer by its time, not by its spelling: a tie and a dot are equal, and so are one rest and two side by side.
 *
 * The answer is laid beside the key with the fewest slips, so that one slip costs one mark and does not fail what follows. One
 * mark for each value of the key (side by side rests are one value); a value too many costs one.
 *
 * Diagnoses come in this order: an answer that one misreading explains wholly, in the order of `MISTAKES`; a measure that its
 * own bar lines do not fill; a misreading with a slip or two, where it explains the answer better than slips alone; then
 * single slips in order of time. Where two misreadings give the same rhythm, both are told.
 * @param input.answer - a rhythm, or rhythm text; bar lines in it are checked where a metre is given
 * @throws RhythmTextError where a text cannot be read; EngineError for a chain that cannot be applied
 */
export function checkAnswer({ subject, steps, answer, metre }: CheckInput): CheckedAnswer {
  const from = read(subject);
  const given = read(answer);
  const expected = applySteps(from, steps);
  const [key, own] = [heard(expected), heard(given)];
  const { pairings, cost } = align(key, own);
  const starts = onsets(key);
  const place = (value: number): MistakeAt => placeOf(value, starts, metre);
  const correct = cost === 0;
  const firstWrong = pairings.find(({ kind }) => kind !== 'same');
  const at = place(firstWrong === undefined ? 0 : 'key' in firstWrong ? firstWrong.key : Math.max(0, pairings.filter((pairing) => 'key' in pairing && pairings.indexOf(pairing) < pairings.indexOf(firstWrong)).length));
  const bars = barDiagnosis(answer, metre, at);
  const spelling = typeof answer === 'string' && metre !== undefined ? spellingRemarks(answer, metre) : [];
  const base = { correct, expected, spelling, marks: marksOf(pairings, key.length), values: checkedValues(pairings, key, own) };
  if (correct) return { ...base, diagnoses: bars };

  const whole = (code: Mistake, what: string, isNear: boolean): Diagnosis => {
    const [wrong, habit] = HABITS[code];
    const where = firstWrong !== undefined && 'key' in firstWrong ? `, where ${valueText(key[firstWrong.key]!)} was expected` : '';
    return { code, at, message: `${wrong}${isNear ? ', and something else is wrong too' : ''}: ${what}. It shows first at ${placeWords(at)}${where}. ${habit}` };
  };
  const tried = misreadings(from, steps).map((misreading) => ({ ...misreading, rhythm: heard(misreading.rhythm) })).filter(({ rhythm }) => !isSameRhythm(rhythm, key));
  const exact = tried.filter(({ rhythm }) => isSameRhythm(rhythm, own)).map(({ code, what }) => whole(code, what, false));
  exact.push(...uniform(key, own, steps).map(({ code, what }) => whole(code, what, false)));
  const sorted = unique(exact).sort((a, b) => rank(a.code) - rank(b.code));
  const near = sorted.length > 0 ? [] : nearMisreadings(tried, own, cost).map(({ code, what }) => whole(code, what, true));
  const slips = sorted.length > 0 ? [] : localDiagnoses(pairings, key, own, place);
  return { ...base, diagnoses: [...sorted, ...bars, ...near, ...slips] };
}

function unique(diagnoses: readonly Diagnosis[]): Diagnosis[] {
  return diagnoses.filter(({ code }, index) => diagnoses.findIndex((other) => other.code === code) === index);
}

/** Misreadings that leave a slip or two unexplained, where the slips alone would be at least twice as many. */
function nearMisreadings(tried: readonly { code: Mistake; what: string; rhythm: readonly Value[] }[], own: readonly Value[], cost: number): { code: Mistake; what: string }[] {
  const most = Math.min(25, Math.floor(cost / 2));
  if (most < 10 || sum(own.map(({ length }) => length)).n === 0n) return [];
  return tried
    .map((misreading) => ({ ...misreading, left: Math.abs(misreading.rhythm.length - own.length) > 2 ? Infinity : align(misreading.rhythm, own).cost }))
    .filter(({ left }) => left <= most)
    .sort((a, b) => a.left - b.left || rank(a.code) - rank(b.code))
    .slice(0, 2);
}
