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

  function spellPlain(tree: MetreNode, pieces: readonly Piece[], start: number, end: number): Draft[] {
    const inside = within(pieces, start, end, 0, 1);
    return draftsOf(tree, whole, inside.pieces, inside.first);
  }

  function spellBracket(bracket: Bracket, pieces: readonly Piece[]): Draft[] {
    const { start, end, actual, normal } = bracket;
    const written = whole * normal;
    const inside = within(pieces, start, end, start, actual);
    const drafts = draftsOf(bracketTree(bracket, whole, written / LIMITS.shortestSymbol), written, inside.pieces, inside.first);
    return drafts.map((draft, n) => {
      const mark = { actual, normal, ...(n === 0 ? { starts: true as const } : {}), ...(n === drafts.length - 1 ? { stops: true as const } : {}) };
      return { ...draft, symbol: { ...draft.symbol, tuplets: [mark] } };
    });
  }

  function finderFor(metre: string, weigh: (span: Bracket | MetreNode) => Weight): BracketFinder {
    const { groups, unit, kind } = parseMetre(metre);
    return bracketsOn(whole, (whole / unit) * (kind === 'simple' ? 1 : Math.min(...groups)), weigh);
  }

  function findBrackets(metre: string, tree: MetreNode, pieces: readonly Piece[], ends: readonly number[]): BracketPlan | null {
    const weigh = (span: Bracket | MetreNode): Weight => {
      const drafts = 'actual' in span ? spellBracket(span, pieces) : spellPlain(tree, pieces, span.start, span.end);
      const tied = drafts.filter(({ symbol, piece }, n) => !symbol.rest && (n === 0 ? pieces[piece]!.start < span.start : drafts[n - 1]!.piece === piece));
      return { symbols: drafts.length, ties: tied.length };
    };
    return finderFor(metre, weigh).find(tree, [0, ...ends]);
  }

  const isPlain = (ends: readonly number[]): boolean => ends.every((end) => end % least === 0);

  /** Whether some brackets do, whatever they look like. */
  const canBracket = (metre: string, ends: readonly number[]): boolean =>
    isPlain(ends) || finderFor(metre, () => NO_WEIGHT).find(trees.of(metre), [0, ...ends]) !== null;

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
    const drafts: Draft[] = [];
    let at = 0;
    for (const bracket of plan.brackets) {
      if (bracket.start > at) drafts.push(...spellPlain(tree, pieces, at, bracket.start));
      drafts.push(...spellBracket(bracket, pieces));
      at = bracket.end;
    }
    if (at < tree.end) drafts.push(...spellPlain(tree, pieces, at, tree.end));
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
