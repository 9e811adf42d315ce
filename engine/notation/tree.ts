import { type ParsedMetre, parseMetre } from '../rhythm/metre';

/**
 * How a node of the metre may be filled.
 * - `halves`: two halves whose middle must stay visible
 * - `pair`: two beats, or a group of two units
 * - `beats`: beats side by side, such as the three of 3/4
 * - `groups`: beat groups side by side, which must show
 * - `units`: units of one beat group or of a bracket
 * - `inner`: a beat or a part of one, divided in two
 */
export type NodeKind = 'halves' | 'pair' | 'beats' | 'groups' | 'units' | 'inner';

/** A span of a measure with its parts; positions are integers of the coordinate system that it was made in. */
export type MetreNode = {
  readonly kind: NodeKind;
  readonly start: number;
  readonly end: number;
  /** its parts, in order; empty where it is not divided any further */
  readonly parts: readonly MetreNode[];
  /** whether its silence may be one dotted rest */
  readonly dottedRest: boolean;
  /** whether symbols within it are beamed together */
  readonly beamed: boolean;
};

/** A beat or unit, halved until its parts are the shortest symbol. */
export function innerNode(start: number, end: number, least: number, beamed: boolean): MetreNode {
  const middle = (start + end) / 2;
  const isDivisible = Number.isInteger(middle) && middle - start >= least;
  const parts = isDivisible ? [innerNode(start, middle, least, false), innerNode(middle, end, least, false)] : [];
  return { kind: 'inner', start, end, parts, dottedRest: false, beamed };
}

const over = (kind: NodeKind, parts: readonly MetreNode[], options: { dottedRest?: boolean; beamed?: boolean } = {}): MetreNode => ({
  kind,
  start: parts[0]!.start,
  end: parts.at(-1)!.end,
  parts,
  dottedRest: options.dottedRest ?? false,
  beamed: options.beamed ?? false,
});

/** Units of equal length, side by side. */
export function unitNodes(start: number, unit: number, count: number, least: number, beamed: boolean): MetreNode[] {
  return Array.from({ length: count }, (_, n) => innerNode(start + n * unit, start + (n + 1) * unit, least, beamed));
}

function groupNode(start: number, unit: number, count: number, least: number, isShortUnit: boolean, isBeat: boolean): MetreNode {
  if (count === 1) return innerNode(start, start + unit, least, true);
  const units = unitNodes(start, unit, count, least, !isShortUnit);
  return over(count === 2 ? 'pair' : 'units', units, { beamed: isShortUnit, dottedRest: count === 3 && (isShortUnit || isBeat) });
}

/** The node of a whole measure. @param whole - integers of one whole note @param least - of the shortest symbol */
function build(metre: ParsedMetre, whole: number, least: number): MetreNode {
  const unit = whole / metre.unit;
  let at = 0;
  const groups = metre.groups.map((count) => {
    const node = groupNode(at, unit, count, least, metre.unit >= 8, metre.kind === 'compound');
    at += count * unit;
    return node;
  });
  if (groups.length === 1) return groups[0]!;
  const isCompound = metre.kind === 'compound';
  const kind = metre.kind === 'simple' ? 'beats' : 'groups';
  // The two eighths of 2/8 are beamed together, as in every metre of short units.
  if (groups.length === 2) return over(kind === 'beats' ? 'pair' : 'groups', groups, { beamed: metre.count === 2 && metre.unit >= 8 });
  if (groups.length === 4 && metre.kind !== 'additive') {
    const half = (a: MetreNode, b: MetreNode) => over(isCompound ? 'groups' : 'pair', [a, b], { dottedRest: isCompound });
    return over('halves', [half(groups[0]!, groups[1]!), half(groups[2]!, groups[3]!)]);
  }
  return over(kind, groups);
}

export type Trees = { of(metre: string): MetreNode };

/** The trees of metres on one grid, made once each. */
export function treesOn(whole: number, least: number): Trees {
  const made = new Map<string, MetreNode>();
  return {
    of(metre) {
      let node = made.get(metre);
      if (node === undefined) made.set(metre, (node = build(parseMetre(metre), whole, least)));
      return node;
    },
  };
}
