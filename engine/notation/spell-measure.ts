import { LIMITS } from '../limits';
import { parseMetre } from '../rhythm/metre';
import { bracketTree } from './bracket-tree';
import { beamsOf } from './beams';
import { type Bracket, type BracketFinder, type BracketPlan, type Weight, bracketsOn } from './brackets';
import { type Part, type Piece, type Splitter, splitterOn } from './split';
import { type MetreNode, treesOn } from './tree';
import type { NotationSymbol, TupletMark } from './types';
import { writtenOn } from './written';

/** A symbol before it knows its line: which piece of the measure it spells, and whether it is that piece's first and last. */
export type SpelledSymbol = {
  readonly piece: number;
  readonly isFirst: boolean;
  readonly isLast: boolean;
  readonly symbol: Omit<NotationSymbol, 'tiedFromBefore' | 'tiedOn' | 'value'>;
};

/** Spells single measures. `ends` are the ends of a measure's pieces in ticks from its start, `rests` whether each is a rest. */
export type MeasureSpeller = {
  /** @returns the symbols, or the index of the first piece whose end cannot be written */
  spell(metre: string, ends: readonly number[], rests: readonly boolean[]): readonly SpelledSymbol[] | number;
  canSpell(metre: string, ends: readonly number[]): boolean;
};

type Draft = {
  readonly piece: number;
  /** what `Beamable` says of place, and where the place is within its piece */
  readonly at: number;
  readonly whole: number;
  readonly group: number;
  readonly symbol: Pick<NotationSymbol, 'base' | 'dots' | 'rest' | 'tuplets'>;
};

const NO_TUPLETS: readonly TupletMark[] = [];
const NO_WEIGHT: Weight = { symbols: 0, ties: 0 };

/** The number of the beam group that a position falls in. */
function groupAt(node: MetreNode, position: number): number {
  const inside = node.beamed ? undefined : node.parts.find((part) => part.start <= position && position < part.end);
  return inside ? groupAt(inside, position) : node.start;
}

/** What lies in [start, end) of the pieces, cut at its edges, its positions shifted to the start and multiplied. */
function within(pieces: readonly Piece[], start: number, end: number, shift: number, times: number): { pieces: Piece[]; first: number } {
  const first = pieces.findIndex((piece) => piece.end > start);
  const inside: Piece[] = [];
  for (let index = first; index !== -1 && index < pieces.length && pieces[index]!.start < end; index += 1) {
    const piece = pieces[index]!;
    inside.push({ rest: piece.rest, start: (Math.max(piece.start, start) - shift) * times, end: (Math.min(piece.end, end) - shift) * times });
  }
  return { pieces: inside, first };
}

/** @param whole - ticks of one whole note, a multiple of 256; spelled measures are remembered by their pattern */
export function measureSpeller(whole: number): MeasureSpeller {
  const least = whole / LIMITS.shortestSymbol;
  const trees = treesOn(whole, least);
  const splitters = new Map<number, Splitter>();
  /** The splitter where a written whole note counts so many integers. */
  const splitterFor = (written: number): Splitter => {
    let splitter = splitters.get(written);
    if (splitter === undefined) splitters.set(written, (splitter = splitterOn(writtenOn(written))));
    return splitter;
  };

  function draftsOf(tree: MetreNode, written: number, pieces: readonly Piece[], first: number): Draft[] {
    const { split } = splitterFor(written);
    const toDraft = (piece: number, rest: boolean, { start, written: { base, dots } }: Part): Draft => ({
      piece,
      at: start,
      whole: written,
      group: groupAt(tree, start),
      symbol: { base, dots, rest, tuplets: NO_TUPLETS },
    });
    return pieces.flatMap((piece, n) => split(tree, piece, pieces[n - 1], pieces[n + 1]).map((part) => toDraft(first + n, piece.rest, part)));
  }

  function spellPlain(tree: MetreNode, written: number, pieces: readonly Piece[], start: number, end: number): Draft[] {
    const inside = within(pieces, start, end, 0, 1);
    return draftsOf(tree, written, inside.pieces, inside.first);
  }

  /** What lies in a span, some of it under brackets. @param written - integers of one written whole note */
  function spellSpan(tree: MetreNode, written: number, pieces: readonly Piece[], brackets: readonly Bracket[], start: number, end: number): Draft[] {
    const drafts: Draft[] = [];
    let at = start;
    for (const bracket of brackets) {
      if (bracket.start > at) drafts.push(...spellPlain(tree, written, pieces, at, bracket.start));
      // Within another bracket, beams go by its units.
      const own = written === whole ? undefined : groupAt(tree, bracket.start);
      drafts.push(...spellBracket(bracket, written, pieces).map((draft) => (own === undefined ? draft : { ...draft, group: own })));
      at = bracket.end;
    }
    if (at < end) drafts.push(...spellPlain(tree, written, pieces, at, end));
    return drafts;
  }

  function spellBracket(bracket: Bracket, outside: number, pieces: readonly Piece[]): Draft[] {
    const { start, end, actual, normal, inner = [] } = bracket;
    const written = outside * normal;
    const inside = within(pieces, start, end, start, actual);
    const tree = bracketTree(bracket, outside, written / LIMITS.shortestSymbol);
    const drafts = spellSpan(tree, written, inside.pieces, inner, 0, (end - start) * actual);
    return drafts.map((draft, n) => {
      const mark = { actual, normal, ...(n === 0 ? { starts: true as const } : {}), ...(n === drafts.length - 1 ? { stops: true as const } : {}) };
      return { ...draft, piece: inside.first + draft.piece, symbol: { ...draft.symbol, tuplets: [mark, ...draft.symbol.tuplets] } };
    });
  }

  function finderFor(metre: string, weigh: (span: Bracket | MetreNode) => Weight): BracketFinder {
    const { groups, unit, kind } = parseMetre(metre);
    return bracketsOn(whole, (whole / unit) * (kind === 'simple' ? 1 : Math.min(...groups)), weigh);
  }

  function findBrackets(metre: string, tree: MetreNode, pieces: readonly Piece[], ends: readonly number[]): BracketPlan | null {
    const weigh = (span: Bracket | MetreNode): Weight => {
      const drafts = 'actual' in span ? spellBracket(span, whole, pieces) : spellPlain(tree, whole, pieces, span.start, span.end);
      const tied = drafts.filter(({ symbol, piece }, n) => !symbol.rest && (n === 0 ? pieces[piece]!.start < span.start : drafts[n - 1]!.piece === piece));
      return { symbols: drafts.length, ties: tied.length };
    };
    const finder = finderFor(metre, weigh);
    return finder.find(tree, [0, ...ends]) ?? finder.findNested(tree, [0, ...ends]);
  }

  const isPlain = (ends: readonly number[]): boolean => ends.every((end) => end % least === 0);

  /** Whether some brackets do, whatever they look like. */
  function canBracket(metre: string, ends: readonly number[]): boolean {
    if (isPlain(ends)) return true;
    const finder = finderFor(metre, () => NO_WEIGHT);
    const [tree, edges] = [trees.of(metre), [0, ...ends]];
    return finder.find(tree, edges) !== null || finder.findNested(tree, edges) !== null;
  }

  /** The first piece without whose end, and what follows it, the measure could be written. */
  function firstUnwritable(metre: string, ends: readonly number[], full: number): number {
    const count = ends.findIndex((_, index) => !canBracket(metre, [...ends.slice(0, index + 1), full]));
    return count === -1 ? ends.length - 1 : count;
  }

  function spell(metre: string, ends: readonly number[], rests: readonly boolean[]): readonly SpelledSymbol[] | number {
    const tree = trees.of(metre);
    const pieces = ends.map((end, index): Piece => ({ start: index === 0 ? 0 : ends[index - 1]!, end, rest: rests[index]! }));
    const plan = findBrackets(metre, tree, pieces, ends);
    if (plan === null) return firstUnwritable(metre, ends, tree.end);
    const drafts = spellSpan(tree, whole, pieces, plan.brackets, 0, tree.end);
    const beams = beamsOf(drafts);
    return drafts.map(({ piece, symbol }, index) => ({
      piece,
      isFirst: drafts[index - 1]?.piece !== piece,
      isLast: drafts[index + 1]?.piece !== piece,
      symbol: { ...symbol, beams: beams[index]! },
    }));
  }

  const known = new Map<string, readonly SpelledSymbol[] | number>();
  const answers = new Map<string, boolean>();
  return {
    spell(metre, ends, rests) {
      const key = `${metre}:${ends.join()}:${rests.join()}`;
      let spelled = known.get(key);
      if (spelled === undefined) known.set(key, (spelled = spell(metre, ends, rests)));
      return spelled;
    },
    canSpell(metre, ends) {
      if (isPlain(ends)) return true;
      const key = `${metre}:${ends.join()}`;
      let answer = answers.get(key);
      if (answer === undefined) answers.set(key, (answer = canBracket(metre, ends)));
      return answer;
    },
  };
}
