import { LIMITS } from '../limits';
import { type Beamable, beamsOf } from './beams';
import { type Bracket, bracketsOn } from './brackets';
import { type Piece, type Splitter, splitterOn } from './split';
import { type MetreNode, innerNode, treesOn, unitNodes } from './tree';
import type { NotationSymbol, TupletMark } from './types';
import { writtenOn } from './written';

/** A symbol before it knows its line: which piece of the measure it spells, and whether it is that piece's first and last. */
export type SpelledSymbol = {
  readonly piece: number;
  readonly isFirst: boolean;
  readonly isLast: boolean;
  readonly symbol: Omit<NotationSymbol, 'tiedFromBefore' | 'tiedOn' | 'value'>;
};

/**
 * Spells one measure. `ends` are the ends of its pieces in ticks from its start, `rests` whether each is a rest.
 * @returns the symbols, or the index of the first piece that cannot be written
 */
export type MeasureSpeller = (metre: string, ends: readonly number[], rests: readonly boolean[]) => readonly SpelledSymbol[] | number;

type Draft = { readonly start: number; readonly piece: number; readonly base: NotationSymbol['base']; readonly dots: number; readonly rest: boolean; readonly tuplets: readonly TupletMark[] };

/** The tree of what a bracket holds: its units, in its own coordinates, where positions are multiplied by `actual`. */
function bracketTree({ start, end, actual, normal }: Bracket, whole: number): MetreNode {
  const span = end - start;
  const least = (whole * normal) / LIMITS.shortestSymbol;
  // Written units shorter than a quarter are beamed as one group, longer ones each for itself.
  const isShort = span * 4 < whole * normal;
  if (actual === 6 || actual === 9) {
    const size = actual === 6 ? 2 : 3;
    const thirds = Array.from({ length: 3 }, (_, n): MetreNode => {
      const at = n * size * span;
      return size === 2
        ? innerNode(at, at + 2 * span, least, !isShort)
        : { kind: 'units', start: at, end: at + 3 * span, parts: unitNodes(at, span, 3, least, false), dottedRest: true, beamed: !isShort };
    });
    return { kind: 'units', start: 0, end: actual * span, parts: thirds, dottedRest: false, beamed: isShort };
  }
  return { kind: 'units', start: 0, end: actual * span, parts: unitNodes(0, span, actual, least, !isShort), dottedRest: true, beamed: isShort };
}

/** The number of the beam group that a position falls in. */
function groupAt(node: MetreNode, position: number): number {
  const inside = node.beamed ? undefined : node.parts.find((part) => part.start <= position && position < part.end);
  return inside ? groupAt(inside, position) : node.start;
}

/** @param whole - ticks of one whole note, a multiple of 256; spelled measures are remembered by their pattern */
export function measureSpeller(whole: number): MeasureSpeller {
  const least = whole / LIMITS.shortestSymbol;
  const trees = treesOn(whole, least);
  const plain = splitterOn(writtenOn(whole));
  const inBracket = new Map<number, Splitter>();
  const splitterFor = (normal: number): Splitter => {
    let splitter = inBracket.get(normal);
    if (splitter === undefined) inBracket.set(normal, (splitter = splitterOn(writtenOn(whole * normal))));
    return splitter;
  };

  /** What lies in [start, end) of the pieces, cut at its edges. */
  function within(pieces: readonly Piece[], start: number, end: number): { piece: Piece; index: number }[] {
    return pieces.flatMap((piece, index) =>
      piece.end > start && piece.start < end ? [{ piece: { ...piece, start: Math.max(piece.start, start), end: Math.min(piece.end, end) }, index }] : [],
    );
  }

  function spellBracket(bracket: Bracket, pieces: readonly Piece[]): Draft[] {
    const { start, actual, normal } = bracket;
    const tree = bracketTree(bracket, whole);
    const scaled = within(pieces, start, bracket.end).map(({ piece, index }) => ({
      piece: { ...piece, start: (piece.start - start) * actual, end: (piece.end - start) * actual },
      index,
    }));
    const drafts = scaled.flatMap(({ piece, index }, n) =>
      splitterFor(normal)
        .split(tree, piece, scaled[n - 1]?.piece, scaled[n + 1]?.piece)
        .map((part) => ({ start: start + part.start / actual, piece: index, ...part.written, rest: piece.rest })),
    );
    return drafts.map((draft, n) => ({
      ...draft,
      tuplets: [{ actual, normal, ...(n === 0 ? { starts: true as const } : {}), ...(n === drafts.length - 1 ? { stops: true as const } : {}) }],
    }));
  }

  function spellPlain(tree: MetreNode, pieces: readonly Piece[], start: number, end: number): Draft[] {
    const inside = within(pieces, start, end);
    return inside.flatMap(({ piece, index }, n) =>
      plain.split(tree, piece, inside[n - 1]?.piece, inside[n + 1]?.piece).map((part) => ({ start: part.start, piece: index, ...part.written, rest: piece.rest, tuplets: [] })),
    );
  }

  function spell(metre: string, ends: readonly number[], rests: readonly boolean[]): readonly SpelledSymbol[] | number {
    const tree = trees.of(metre);
    const pieces = ends.map((end, index): Piece => ({ start: index === 0 ? 0 : ends[index - 1]!, end, rest: rests[index]! }));
    const odd = ends.findIndex((end) => end % least !== 0);
    let brackets: readonly Bracket[] = [];
    if (odd !== -1) {
      const plan = bracketsOn(whole, (bracket) => spellBracket(bracket, pieces).length).find(tree, [0, ...ends]);
      if (plan === null) return odd;
      brackets = plan.brackets;
    }
    const drafts: Draft[] = [];
    const inGroup: number[] = [];
    const add = (more: readonly Draft[], group: (draft: Draft) => number) => {
      for (const draft of more) {
        drafts.push(draft);
        inGroup.push(group(draft));
      }
    };
    let at = 0;
    for (const bracket of [...brackets, null]) {
      const to = bracket?.start ?? tree.end;
      if (to > at) add(spellPlain(tree, pieces, at, to), ({ start }) => groupAt(tree, start));
      if (bracket === null) break;
      const own = bracketTree(bracket, whole);
      add(spellBracket(bracket, pieces), ({ start }) => bracket.start + groupAt(own, (start - bracket.start) * bracket.actual) / bracket.actual);
      at = bracket.end;
    }
    return finish(drafts, inGroup);
  }

  function finish(drafts: readonly Draft[], groups: readonly number[]): SpelledSymbol[] {
    const symbols = drafts.map(({ base, dots, rest, tuplets }) => ({ base, dots, rest, tuplets, tiedFromBefore: false, tiedOn: false, value: null }));
    const beams = beamsOf(symbols.map((symbol, index): Beamable => ({ symbol, group: groups[index]! })));
    return drafts.map(({ piece, base, dots, rest, tuplets }, index) => ({
      piece,
      isFirst: drafts[index - 1]?.piece !== piece,
      isLast: drafts[index + 1]?.piece !== piece,
      symbol: { base, dots, rest, tuplets, beams: beams[index]! },
    }));
  }

  const known = new Map<string, readonly SpelledSymbol[] | number>();
  return (metre, ends, rests) => {
    const key = `${metre}:${ends.join()}:${rests.join()}`;
    let spelled = known.get(key);
    if (spelled === undefined) known.set(key, (spelled = spell(metre, ends, rests)));
    return spelled;
  };
}
