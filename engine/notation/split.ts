import type { MetreNode } from './tree';
import type { Written } from './written';

/** A value, or what of it lies in one measure or bracket; integers of its coordinate system. */
export type Piece = { readonly start: number; readonly end: number; readonly rest: boolean };

/** A symbol that spells part of a piece. */
export type Part = { readonly start: number; readonly end: number; readonly written: Written };

export type Splitter = {
  /** @param before - the piece before @param after - the piece after: syncopations depend on both */
  split(node: MetreNode, piece: Piece, before: Piece | undefined, after: Piece | undefined): Part[];
};

/**
 * Writes a piece as one symbol where it starts on a beat group and fills whole groups, where it lies in one beat and is
 * simple there, or where it is one of the standard syncopations (quarter, half, quarter in 4/4; eighth, quarter, eighth;
 * the same inside a beat); else ties it so that the metre's groups show.
 *
 * @see Berklee Online, "Imaginary bar lines": the middle of 4/4 stays visible (check values 11.1)
 * @see C. A. Harris, How to Write Music (1917), 17–18: compound time by beats (11.2); a dotted half in 6/8 is later practice
 * @see check values 11.3, 11.4: rests by beats, dotted only in compound time
 */
export function splitterOn(written: (length: number) => Written | undefined): Splitter {
  const isSyncopation = (node: MetreNode, piece: Piece, before?: Piece, after?: Piece): boolean => {
    const quarter = (node.end - node.start) / 4;
    return (
      piece.start === node.start + quarter &&
      piece.end === node.end - quarter &&
      before?.end === piece.start &&
      before.start === node.start &&
      after?.start === piece.end &&
      after.end === node.end
    );
  };

  /** Whether a note that lies across parts of the node may be one symbol. */
  function isOne(node: MetreNode, piece: Piece, dots: number, before?: Piece, after?: Piece): boolean {
    const { start, end } = piece;
    const fromStart = start === node.start;
    const toEnd = end === node.end;
    if (fromStart && toEnd) return node.kind !== 'groups' || dots < 2;
    const onParts = node.parts.some((part) => part.start === start) && node.parts.some((part) => part.end === end);
    switch (node.kind) {
      case 'halves': {
        // A dotted half on beat 1 or 2 of 4/4; in compound metres the groups of the other half must show.
        const quarter = (node.end - node.start) / 4;
        const isThreeBeats = end - start === 3 * quarter && (fromStart || toEnd);
        return node.parts[0]!.kind === 'pair' && (isThreeBeats || isSyncopation(node, piece, before, after));
      }
      case 'pair':
        return fromStart || isSyncopation(node, piece, before, after);
      case 'beats':
      case 'units': {
        if (onParts) return true;
        if (dots > 0 && node.parts.some((part) => part.start === start)) return true;
        return node.parts.slice(1).some((part, n) => isSyncopation({ ...node, start: node.parts[n]!.start, end: part.end }, piece, before, after));
      }
      case 'groups':
        return onParts && dots < 2;
      case 'inner':
        return fromStart || toEnd || isCentred(node, piece);
    }
  }
  const isCentred = (node: MetreNode, { start, end }: Piece): boolean => {
    const quarter = (node.end - node.start) / 4;
    return start === node.start + quarter && end === node.end - quarter;
  };

  function isOneRest(node: MetreNode, { start, end }: Piece, dots: number): boolean {
    if (start === node.start && end === node.end) return dots === 0 || (dots === 1 && node.dottedRest);
    // In a compound beat the first two units are one rest, the last two are not. Five or seven units of a bracket have no
    // beats among them: their rests are as few as can be.
    if (node.kind !== 'units' || dots > 0 || !node.parts.some((part) => part.end === end)) return false;
    if (node.dottedRest && node.parts.length > 3) return node.parts.some((part) => part.start === start);
    return start === node.start && (node.dottedRest || node.parts.length > 3);
  }

  function split(node: MetreNode, piece: Piece, before?: Piece, after?: Piece): Part[] {
    const inside = node.parts.find((part) => part.start <= piece.start && piece.end <= part.end);
    if (inside && !(piece.start === node.start && piece.end === node.end)) return split(inside, piece, before, after);
    const one = written(piece.end - piece.start);
    if (one && (node.parts.length === 0 || (piece.rest ? isOneRest(node, piece, one.dots) : isOne(node, piece, one.dots, before, after)))) {
      return [{ start: piece.start, end: piece.end, written: one }];
    }
    return cut(node, piece).flatMap((part) =>
      // What is cut is tied, so its neighbours no longer make a syncopation of it.
      split(node, part),
    );
  }

  /** Cuts a piece that cannot be one symbol: a part before the first boundary, whole parts, a part after the last. */
  function cut(node: MetreNode, piece: Piece): Piece[] {
    const at = (start: number, end: number): Piece => ({ start, end, rest: piece.rest });
    const edges = node.parts.map((part) => part.start).filter((edge) => edge > piece.start && edge < piece.end);
    const first = edges[0];
    const last = edges.at(-1);
    if (first === undefined || last === undefined) throw new RangeError('A value shorter than the shortest symbol cannot be cut.');
    const startsOnPart = node.parts.some((part) => part.start === piece.start);
    const endsOnPart = node.parts.some((part) => part.end === piece.end);
    if (!startsOnPart) return [at(piece.start, first), at(first, piece.end)];
    if (!endsOnPart) return [at(piece.start, last), at(last, piece.end)];
    // Whole parts that are not one symbol: the most that is, then the rest.
    for (const edge of [...edges].reverse()) {
      const one = written(edge - piece.start);
      if (one && (piece.rest ? isOneRest(node, at(piece.start, edge), one.dots) : true)) return [at(piece.start, edge), at(edge, piece.end)];
    }
    return [at(piece.start, first), at(first, piece.end)];
  }

  return { split };
}
