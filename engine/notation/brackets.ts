import type { MetreNode } from './tree';

/** A tuplet bracket over [start, end) of a measure: `actual` units in the time of `normal`. */
export type Bracket = {
  readonly start: number;
  readonly end: number;
  readonly actual: number;
  readonly normal: number;
  /** brackets within it, their positions from its start, multiplied by `actual` */
  readonly inner?: readonly Bracket[];
};

/**
 * Conventional ratios (check values 11.7: the next lower normal value): over a span that halves, 3:2, 5:4, 6:4, 7:4 and 9:8;
 * over three such, as in a compound beat, 2:3, 4:3, 5:3 and 7:6.
 */
const PLAIN: readonly (readonly [number, number])[] = [[3, 2], [5, 4], [6, 4], [7, 4], [9, 8]];
const COMPOUND: readonly (readonly [number, number])[] = [[2, 3], [4, 3], [5, 3], [7, 6]];
/** What halves a span of three: it can be written without a bracket too, with dots or ties. */
const HALVING = new Set([2, 4]);

const isPowerOfTwo = (n: number): boolean => n > 0 && Number.isInteger(Math.log2(n));

/**
 * What a choice of brackets costs; small is legible. Weights are a setting of ours: few symbols and ties, brackets of one
 * beat where they cut nothing, values that begin on a bracket's units.
 */
const COST = { symbol: 4, tie: 2, bracket: 2, underBeat: 1, nest: 8, perBeatThree: 4, perBeatOther: 5, acrossParts: 2, offUnit: 3, halfUnit: 2 } as const;

/** How many symbols a stretch needs, and how many ties lead to one of them. */
export type Weight = { readonly symbols: number; readonly ties: number };

export type BracketPlan = { readonly cost: number; readonly brackets: readonly Bracket[] };

export type BracketFinder = {
  /**
   * The cheapest set of brackets that puts every boundary on the grid of its bracket, or null.
   * @param edges - where values begin and end, sorted, measure's ends included
   */
  find(node: MetreNode, edges: readonly number[]): BracketPlan | null;
  /** The same with brackets within brackets, one level: for what nothing simpler can write. */
  findNested(node: MetreNode, edges: readonly number[]): BracketPlan | null;
};

/**
 * @param whole - integers of one whole note
 * @param beat - integers of one beat
 * @param weigh - what spelling a bracket, or a node without one, takes
 */
export function bracketsOn(whole: number, beat: number, weigh: (span: Bracket | MetreNode) => Weight): BracketFinder {
  const least = whole / 256;
  const isPlain = (edge: number): boolean => edge % least === 0;

  function fits({ start, end, actual, normal }: Bracket, edges: readonly number[]): boolean {
    return edges.every((edge) => edge <= start || edge >= end || ((edge - start) * actual * 256) % (whole * normal) === 0);
  }

  function ratiosFor(span: number): readonly (readonly [number, number])[] {
    // The span over a whole note in lowest terms: 1 or 3 over a power of two, or a power of two.
    for (const [factor, ratios] of [[1, PLAIN], [3, COMPOUND]] as const) {
      const over = (whole * factor) / span;
      const under = span / (whole * factor);
      if (isPowerOfTwo(over) || isPowerOfTwo(under)) return ratios.filter(([, normal]) => (span * 256) / normal >= whole);
    }
    return [];
  }

  const costOf = ({ symbols, ties }: Weight): number => COST.symbol * symbols + COST.tie * ties;

  function shapeCost({ start, end, actual }: Bracket, inner: readonly number[]): number {
    const span = end - start;
    const width = span < beat ? COST.underBeat : Math.floor(((span - beat) * (actual === 3 ? COST.perBeatThree : COST.perBeatOther)) / beat);
    const between = inner.map((edge) => {
      const units = (edge - start) * actual;
      if (units % span === 0) return 0;
      return (2 * units) % span === 0 ? COST.halfUnit : COST.offUnit;
    });
    return between.reduce((a: number, b) => a + b, COST.bracket + width);
  }

  /**
   * The brackets that each unit of a bracket needs of its own, positions multiplied by its figure; null where one unit cannot
   * be written.
   */
  function innerBrackets({ start, end, actual, normal }: Bracket, edges: readonly number[]): Bracket[] | null {
    const span = end - start;
    const written = whole * normal;
    const found: Bracket[] = [];
    for (let unit = 0; unit < actual; unit += 1) {
      const [from, to] = [unit * span, (unit + 1) * span];
      const inside = edges.map((edge) => (edge - start) * actual).filter((edge) => edge > from && edge < to);
      if (inside.every((edge) => (edge * 256) % written === 0)) continue;
      const ratio = PLAIN.find(([a, n]) => (span * 256) / n >= written && inside.every((edge) => ((edge - from) * a * 256) % (written * n) === 0));
      if (ratio === undefined) return null;
      found.push({ start: from, end: to, actual: ratio[0], normal: ratio[1] });
    }
    return found;
  }

  function overSpan(start: number, end: number, edges: readonly number[], isNested = false): BracketPlan | null {
    const span = end - start;
    const inner = edges.filter((edge) => edge > start && edge < end);
    let best: BracketPlan | null = null;
    for (const [actual, normal] of ratiosFor(span)) {
      const plain = { start, end, actual, normal };
      const within = isNested ? innerBrackets(plain, inner) : fits(plain, inner) ? [] : null;
      if (within === null) continue;
      const bracket = within.length === 0 ? plain : { ...plain, inner: within };
      // Two ways to write thirds: six units only where all six are attacked and nothing finer is.
      if (actual === 6 && !(inner.length === 5 && inner.every((edge) => ((edge - start) * actual) % span === 0))) continue;
      const cost = shapeCost(bracket, inner) + COST.nest * within.length + costOf(weigh(bracket));
      if (best === null || cost < best.cost) best = { cost, brackets: [bracket] };
    }
    return best;
  }

  /** Two neighbours of three or more under one bracket; not in sixths, which show their parts. */
  function overTwo(before: MetreNode, part: MetreNode, edges: readonly number[]): BracketPlan | null {
    if (edges.every((edge) => edge <= before.start || edge >= part.end || isPlain(edge))) return null;
    const plan = overSpan(before.start, part.end, edges);
    return plan === null || plan.brackets[0]!.actual === 6 ? null : { ...plan, cost: plan.cost + COST.acrossParts };
  }

  const cheaper = (a: BracketPlan | null, b: BracketPlan | null): BracketPlan | null => (a === null ? b : b === null || a.cost <= b.cost ? a : b);
  const together = (a: BracketPlan | null, b: BracketPlan | null): BracketPlan | null =>
    a === null || b === null ? null : { cost: a.cost + b.cost, brackets: [...a.brackets, ...b.brackets] };

  /** Whether beats of three units lie in a node: only they can be halved by a bracket. */
  const hasThrees = (node: MetreNode): boolean => (node.kind === 'units' ? node.dottedRest && node.parts.length === 3 : node.kind !== 'inner' && node.parts.some(hasThrees));

  /** A duplet or quadruplet where the beats of a compound metre are halved, if it is easier to read than dots and ties. */
  function halved(node: MetreNode, edges: readonly number[], plain: BracketPlan): BracketPlan {
    // A value that begins on a unit keeps the beat in three.
    if (node.parts.some(({ start }) => start > node.start && edges.includes(start))) return plain;
    const plan = overSpan(node.start, node.end, edges);
    return plan !== null && HALVING.has(plan.brackets[0]!.actual) && plan.cost < plain.cost ? plan : plain;
  }

  /** Values on the plain grid: without brackets, but for halved beats of a compound metre. */
  function plainPlan(node: MetreNode, edges: readonly number[], inner: readonly number[]): BracketPlan {
    const plain: BracketPlan = { cost: costOf(weigh(node)), brackets: [] };
    if (inner.length === 0 || !hasThrees(node)) return plain;
    if (node.kind === 'units') return halved(node, edges, plain);
    const parts = node.parts.map((part) => plainPlan(part, edges, inner.filter((edge) => edge > part.start && edge < part.end)));
    if (parts.every(({ brackets }) => brackets.length === 0)) return plain;
    return parts.reduce((a, b) => ({ cost: a.cost + b.cost, brackets: [...a.brackets, ...b.brackets] }));
  }

  function search(node: MetreNode, edges: readonly number[], isNested: boolean): BracketPlan | null {
    const find = (inside: MetreNode) => search(inside, edges, isNested);
    const inner = edges.filter((edge) => edge > node.start && edge < node.end);
    if (inner.every(isPlain)) return plainPlan(node, edges, inner);
    let best = overSpan(node.start, node.end, edges, isNested);
    if (node.parts.length > 0) {
      // Parts one by one, or two neighbours under one bracket.
      const plans: (BracketPlan | null)[] = [{ cost: 0, brackets: [] }];
      node.parts.forEach((part, index) => {
        let plan = together(plans[index]!, find(part));
        const before = node.parts[index - 1];
        if (before && node.parts.length > 2 && node.kind !== 'groups') plan = cheaper(plan, together(plans[index - 1]!, overTwo(before, part, edges)));
        plans.push(plan);
      });
      best = cheaper(best, plans.at(-1)!);
    }
    return best;
  }
  return { find: (node, edges) => search(node, edges, false), findNested: (node, edges) => search(node, edges, true) };
}
