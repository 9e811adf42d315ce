import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  Fraction, type NotationMeasure, type NotationSymbol, type Rhythm, SpellingError,
  augment, parseMetre, spellLine, symbolLength, totalLength, writtenLength,
} from '@/engine';
import { metrePlan, mixedRhythm, plainRhythm, wildRhythm } from './arbitrary-line';
import { frozen } from '../rhythm/arbitrary-rhythm';
import { shorthand } from './shorthand';

type Plan = { at: Fraction; metre: string }[];
type Placed = { symbol: NotationSymbol; start: Fraction; end: Fraction };

const ZERO = new Fraction(0);
const sumOf = (lengths: Fraction[]): Fraction => lengths.reduce((a, b) => a.add(b), ZERO);

/** The spelling, or null where the line is refused; anything but a refusal fails. */
function tryLine(rhythm: Rhythm, plan: Plan): NotationMeasure[] | null {
  try {
    return spellLine(rhythm, plan);
  } catch (error) {
    if (error instanceof SpellingError) return null;
    throw error;
  }
}

function placed(measure: NotationMeasure): Placed[] {
  let at = ZERO;
  return measure.symbols.map((symbol) => {
    const start = at;
    at = at.add(symbolLength(symbol));
    return { symbol, start, end: at };
  });
}

/** The rhythm that a player reads: tied symbols added up, rests side by side taken together, the end's rests left out. */
function readBack(measures: readonly NotationMeasure[]): string[] {
  const read: { length: Fraction; rest: boolean }[] = [];
  let isTied = false;
  for (const symbol of measures.flatMap(({ symbols }) => symbols)) {
    const last = read.at(-1);
    expect(symbol.tiedFromBefore).toBe(isTied);
    if (last && (symbol.rest ? last.rest : isTied)) last.length = last.length.add(symbolLength(symbol));
    else read.push({ length: symbolLength(symbol), rest: symbol.rest });
    isTied = symbol.tiedOn;
  }
  expect(isTied).toBe(false);
  if (read.at(-1)?.rest) read.pop();
  return read.map(({ length, rest }) => `${rest ? 'r' : ''}${length.toFraction()}`);
}

function asHeard(rhythm: Rhythm): string[] {
  const heard: { length: Fraction; rest: boolean }[] = [];
  for (const { length, rest } of rhythm) {
    const last = heard.at(-1);
    if (last?.rest && rest) last.length = last.length.add(length);
    else heard.push({ length, rest });
  }
  if (heard.at(-1)?.rest) heard.pop();
  return heard.map(({ length, rest }) => `${rest ? 'r' : ''}${length.toFraction()}`);
}

function checkMeasures(measures: readonly NotationMeasure[], rhythm: Rhythm, plan: Plan): void {
  let at = ZERO;
  measures.forEach(({ start, metre, symbols }, index) => {
    expect(start.equals(at)).toBe(true);
    const { length } = parseMetre(metre);
    expect(sumOf(symbols.map(symbolLength)).equals(length)).toBe(true);
    const next = at.add(length);
    for (const change of plan) expect(change.at.compare(at) <= 0 || change.at.compare(next) >= 0 || change.at.compare(totalLength(rhythm)) > 0).toBe(true);
    at = next;
    if (index === measures.length - 1) expect(at.compare(totalLength(rhythm)) >= 0).toBe(true);
  });
}

function checkValues(measures: readonly NotationMeasure[], rhythm: Rhythm): void {
  const lengths = rhythm.map(() => ZERO);
  let last = 0;
  for (const symbol of measures.flatMap(({ symbols }) => symbols)) {
    if (symbol.value === null) {
      expect(symbol.rest).toBe(true);
      last = rhythm.length;
    } else {
      expect(symbol.value >= last && symbol.value <= last + 1).toBe(true);
      last = symbol.value;
      expect(symbol.rest).toBe(rhythm[last]!.rest);
      lengths[last] = lengths[last]!.add(symbolLength(symbol));
    }
    if (symbol.rest) expect([symbol.tiedFromBefore, symbol.tiedOn]).toEqual([false, false]);
  }
  rhythm.forEach(({ length }, index) => expect(lengths[index]!.equals(length)).toBe(true));
  expect(readBack(measures)).toEqual(asHeard(rhythm));
}

/** How long a symbol lasts inside its bracket of this depth: what stands deeper counts, what stands outside does not. */
const lengthWithin = (symbol: NotationSymbol, depth: number): Fraction =>
  symbol.tuplets.slice(depth + 1).reduce((length, { actual, normal }) => length.mul(normal).div(actual), writtenLength(symbol));

function checkDepth(symbols: readonly NotationSymbol[], depth: number): void {
  let open: { actual: number; normal: number; written: Fraction } | null = null;
  for (const symbol of symbols) {
    const mark = symbol.tuplets[depth];
    if (mark === undefined) {
      expect(open).toBeNull();
      continue;
    }
    if (mark.starts) {
      expect(open).toBeNull();
      open = { actual: mark.actual, normal: mark.normal, written: ZERO };
    }
    if (open === null) throw new Error('a symbol stands in a bracket that was not opened');
    expect([mark.actual, mark.normal]).toEqual([open.actual, open.normal]);
    open.written = open.written.add(lengthWithin(symbol, depth));
    // A bracket inside ends before the one outside does.
    if (depth > 0 && symbol.tuplets[depth - 1]!.stops) expect(mark.stops).toBe(true);
    if (mark.stops) {
      // `actual` units of one written value: a power of two.
      const unit = open.written.div(open.actual);
      expect([unit.n, unit.d]).toContain(1n);
      expect(Number.isInteger(Math.log2(Number(unit.n * unit.d)))).toBe(true);
      open = null;
    }
  }
  expect(open).toBeNull();
}

function checkBrackets({ symbols }: NotationMeasure): void {
  for (const { tuplets } of symbols) expect(tuplets.length).toBeLessThanOrEqual(2);
  checkDepth(symbols, 0);
  checkDepth(symbols, 1);
}

/** Where beat groups begin, and the end. */
function boundaries(metre: string): Fraction[] {
  const { groups, unit } = parseMetre(metre);
  return groups.reduce<Fraction[]>((edges, count) => [...edges, edges.at(-1)!.add(new Fraction(count, unit))], [ZERO]);
}

function checkGroups(measure: NotationMeasure): void {
  const edges = boundaries(measure.metre);
  const { kind, groups, unit } = parseMetre(measure.metre);
  const isEdge = (at: Fraction): boolean => edges.some((edge) => edge.equals(at));
  const symbols = placed(measure);
  symbols.forEach(({ symbol, start, end }, index) => {
    if (symbol.tuplets.length > 0) return;
    const crossed = edges.filter((edge) => edge.compare(start) > 0 && edge.compare(end) < 0);
    if (crossed.length === 0) return;
    const halves = groups.length === 4 && kind !== 'additive';
    if (symbol.rest) {
      // Two beats of silence only as a half of the measure, or all of it.
      const isHalf = isEdge(start) && isEdge(end) && end.sub(start).mul(2).equals(edges.at(-1)!) && halves;
      expect(isHalf || (start.equals(0) && end.equals(edges.at(-1)!))).toBe(true);
      return;
    }
    const before = symbols[index - 1];
    const after = symbols[index + 1];
    const isWhole = isEdge(start) && isEdge(end);
    const isDotted = kind === 'simple' && isEdge(start) && symbol.dots > 0;
    const isSyncopation =
      kind === 'simple' && crossed.length === 1 && before !== undefined && after !== undefined &&
      isEdge(before.start) && isEdge(after.end) && before.end.sub(before.start).mul(2).equals(end.sub(start)) && after.end.sub(after.start).mul(2).equals(end.sub(start));
    expect(isWhole || isDotted || isSyncopation).toBe(true);
    if (halves && kind === 'simple' && crossed.some((edge) => edge.equals(edges[2]!))) {
      const text = `${symbol.base}${'.'.repeat(symbol.dots)}`;
      const beat = new Fraction(1, unit);
      if (text === beat.mul(2).toFraction()) {
        expect(before?.end.sub(before.start).equals(beat) && after?.end.sub(after.start).equals(beat)).toBe(true);
        expect(symbol.tiedFromBefore || symbol.tiedOn).toBe(false);
      } else expect([beat.mul(4).toFraction(), `${beat.mul(2).toFraction()}.`]).toContain(text);
    }
  });
}

function checkBeams(measure: NotationMeasure): void {
  const edges = boundaries(measure.metre);
  const groupOf = (at: Fraction): number => edges.findLastIndex((edge) => edge.compare(at) <= 0);
  const symbols = placed(measure);
  const open: boolean[] = [];
  symbols.forEach(({ symbol, start }, index) => {
    const { beams, rest, base } = symbol;
    if (beams.length === 0) {
      expect(open.some(Boolean)).toBe(false);
      return;
    }
    expect(rest).toBe(false);
    expect(beams.length).toBe(Math.round(-Math.log2(Number(new Fraction(base)))) - 2);
    expect(['begin', 'continue', 'end']).toContain(beams[0]);
    beams.forEach((mark, level) => {
      expect(open[level] ?? false).toBe(mark === 'continue' || mark === 'end');
      open[level] = mark === 'begin' || mark === 'continue';
    });
    for (let level = beams.length; level < open.length; level += 1) expect(open[level]).toBe(false);
    const joined = beams[0] === 'continue' || beams[0] === 'end' ? symbols[index - 1]! : undefined;
    if (joined === undefined) return;
    expect(symbol.tuplets[0]?.starts ?? false).toBe(false);
    expect(joined.symbol.tuplets[0]?.stops ?? false).toBe(false);
    const isWholeMeasure = parseMetre(measure.metre).count === 2 && parseMetre(measure.metre).unit >= 8;
    if (symbol.tuplets.length === 0 && !isWholeMeasure) expect(groupOf(joined.start)).toBe(groupOf(start));
  });
  expect(open.some(Boolean)).toBe(false);
}

function checkAll(rhythm: Rhythm, plan: Plan, measures: readonly NotationMeasure[]): void {
  checkMeasures(measures, rhythm, plan);
  checkValues(measures, rhythm);
  for (const measure of measures) {
    checkBrackets(measure);
    checkGroups(measure);
    checkBeams(measure);
  }
}

const RUNS = Number(process.env.SPELLING_RUNS ?? 250);

describe('laws of spelling', () => {
  it('plain values: always written; measures, ties, values, groups and beams hold', () => {
    fc.assert(
      fc.property(plainRhythm, metrePlan, (rhythm, plan) => {
        checkAll(rhythm, plan, spellLine(frozen(rhythm), plan));
      }),
      { numRuns: RUNS },
    );
  });

  it('tuplets among plain values: the same wherever they are written, and most are', () => {
    let written = 0;
    let refused = 0;
    fc.assert(
      fc.property(mixedRhythm, metrePlan, (rhythm, plan) => {
        const measures = tryLine(frozen(rhythm), plan);
        if (measures === null) refused += 1;
        else {
          written += 1;
          checkAll(rhythm, plan, measures);
        }
      }),
      { numRuns: RUNS },
    );
    expect(written).toBeGreaterThan(refused);
  });

  it('any fractions: written by the laws, or refused with factors that can be written', () => {
    fc.assert(
      fc.property(wildRhythm, metrePlan, (rhythm, plan) => {
        try {
          checkAll(rhythm, plan, spellLine(frozen(rhythm), plan));
        } catch (error) {
          if (!(error instanceof SpellingError)) throw error;
          expect(error.value).toBeGreaterThanOrEqual(0);
          expect(error.value).toBeLessThan(rhythm.length);
          const far = error.nearest.map((factor) => (factor.compare(1) < 0 ? factor.inverse() : factor));
          far.forEach((factor, index) => expect(index === 0 || far[index - 1]!.compare(factor) <= 0).toBe(true));
          for (const factor of error.nearest) checkAll(augment(rhythm, factor), plan, spellLine(augment(rhythm, factor), plan));
          // What stands before the value at fault can be written.
          expect(tryLine(rhythm.slice(0, error.value), plan)).not.toBeNull();
          expect(tryLine(rhythm.slice(0, error.value + 1), plan)).toBeNull();
        }
      }),
      { numRuns: Math.ceil(RUNS / 2) },
    );
  });

  it('the same line twice is the same spelling', () => {
    fc.assert(
      fc.property(mixedRhythm, metrePlan, (rhythm, plan) => {
        const once = tryLine(rhythm, plan);
        const twice = tryLine(rhythm, [...plan].reverse());
        expect(once === null ? null : shorthand(once)).toBe(twice === null ? null : shorthand(twice));
      }),
      { numRuns: RUNS },
    );
  });
});
