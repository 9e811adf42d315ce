import type { PrintScore } from '@/engine';
import { breakBest } from './break';
import { type FrontBlock, frontBlocks, partHead } from './front-matter';
import type { VexFlow } from './notes';
import { type PageGeometry, type PageOptions, pageGeometry } from './page-options';
import { NAME_TEXT } from './page-text';
import { type WaitingSystem, layOutSystems } from './systems';
import { textWidth } from './text';
import { TURN_SECONDS, silenceAbout } from './turns';

export type PlacedOnPage = { readonly system: WaitingSystem; readonly x: number; readonly y: number };

/** A page that has everything but ink. */
export type Page = {
  readonly number: number;
  /** text and keys, from the top, each with its place */
  readonly front: readonly { readonly block: FrontBlock; readonly y: number }[];
  readonly systems: readonly PlacedOnPage[];
  /** whether the page must be turned while there is no time for it */
  readonly hurries: boolean;
};

export type Layout = {
  readonly geometry: PageGeometry;
  readonly pages: readonly Page[];
  /** drawing units that names of instruments take beside the staves; 0 in a part of one staff */
  readonly names: number;
  /** what a careful reader of the layout would want to be told */
  readonly remarks: readonly string[];
};

const GAP = 22;
/** Systems are moved apart by so much more at most to fill a page. */
const SPREAD = 46;
const NAMES_MOST = 150;

function namesWidth(vf: VexFlow, score: PrintScore): number {
  if (score.staves.length < 2) return 0;
  const widest = Math.max(...score.staves.map(({ instruments }) => textWidth(vf, instruments.map(({ name }) => name).join(', '), NAME_TEXT)));
  return Math.min(widest, NAMES_MOST) + (score.groups.some(({ length }) => length > 1) ? 22 : 12);
}

/** Text and keys put onto as many pages as they need. */
function placeBlocks(blocks: readonly FrontBlock[], { top, bottom }: PageGeometry): { block: FrontBlock; y: number }[][] {
  const pages: { block: FrontBlock; y: number }[][] = [[]];
  let y = top;
  for (const block of blocks) {
    if (y + block.height > bottom && pages.at(-1)!.length > 0) {
      pages.push([]);
      y = top;
    }
    pages.at(-1)!.push({ block, y });
    y += block.height;
  }
  return pages;
}

/**
 * Lays a print out in pages: the score behind its front matter; a part under its head, with its page turns where there is rest.
 * Right-hand pages have odd numbers, and are turned.
 */
export function layOutPages(vf: VexFlow, score: PrintScore, options: PageOptions): Layout {
  const geometry = pageGeometry(options);
  const isPart = score.part !== null;
  const names = namesWidth(vf, score);
  const room = geometry.right - geometry.left - names;
  const { systems, tooWide } = layOutSystems(vf, score, room, { gatherRests: isPart, hideSilent: !isPart || score.staves.length > 1 });
  const front = placeBlocks(isPart ? partHead(vf, score, geometry) : frontBlocks(vf, score, geometry), geometry);
  const before = isPart ? front.length - 1 : front.length;
  const head = isPart ? front.at(-1)! : [];
  const headEnd = head.length === 0 ? geometry.top : head.at(-1)!.y + head.at(-1)!.block.height;
  const turnAt = systems.map(({ columns }) => (isPart ? silenceAbout(score, columns[0]!.measure) : Infinity));

  // Which page a line of systems comes on depends on how many come before: the search is for each number of pages in turn.
  const heights = systems.map(({ rows }) => rows.height);
  const fits = (first: number, end: number, from: number): number => {
    let used = -GAP;
    for (let index = first; index < end; index += 1) used += heights[index]! + GAP;
    return geometry.bottom - from - used;
  };
  const starts = isPart ? breakForTurns(systems.length, (first, end) => fits(first, end, first === 0 ? headEnd : geometry.top), turnAt, before) : breakBest(systems.length, (first, end) => waste(fits(first, end, geometry.top), geometry, end === systems.length));
  const pages: Page[] = front.slice(0, before).map((placed, index) => ({ number: index + 1, front: placed, systems: [], hurries: false }));
  const remarks = tooWide.map((number) => `Measure ${number} needs more room than the page has: it is pressed together. Choose smaller staves or the long side of the paper.`);
  remarks.push(...score.failures.map(({ instrument, error }) => `${instrument.name} is not printed. ${error.message}`));
  if (systems.length === 0) pages.push({ number: pages.length + 1, front: head, systems: [], hurries: false });
  starts.forEach((first, n) => {
    const end = starts[n + 1] ?? systems.length;
    const from = n === 0 ? headEnd : geometry.top;
    const left = fits(first, end, from);
    if (left < 0) remarks.push(`A system of ${systems[first]!.rows.rows.length} staves is taller than the page: choose smaller staves or larger paper.`);
    const isLast = end === systems.length;
    const more = isLast ? Math.min(SPREAD / 2, Math.max(0, left) / (end - first)) : end - first > 1 ? Math.min(SPREAD, Math.max(0, left) / (end - first - 1)) : 0;
    let y = from;
    const placed = systems.slice(first, end).map((system): PlacedOnPage => {
      const at = y;
      y += system.rows.height + GAP + more;
      return { system, x: geometry.left + names, y: at };
    });
    const number = pages.length + 1;
    const hurries = isPart && !isLast && number % 2 === 1 && turnAt[end]! < TURN_SECONDS;
    if (hurries) remarks.push(`There is no rest of ${TURN_SECONDS} seconds for the turn after page ${number}.`);
    pages.push({ number, front: n === 0 ? head : [], systems: placed, hurries });
  });
  return { geometry, pages, names, remarks };
}

/** How bad it is to leave so much of a page empty. */
const waste = (left: number, { top, bottom }: PageGeometry, isLast: boolean): number => (left < 0 ? Infinity : isLast ? 0 : (left / (bottom - top)) ** 2);

/** A turn without rest is worse than any page left half empty. */
const NO_REST = 4;

/** Breaks systems into pages so that pages with odd numbers end in rest. */
function breakForTurns(count: number, left: (first: number, end: number) => number, turnAt: readonly number[], before: number): number[] {
  type Way = { cost: number; from: number; parity: number };
  // best[parity][end]: the cheapest way to have filled pages up to `end`, the last page's number being of that parity.
  const best: Way[][] = [[], []];
  const startParity = before % 2;
  best[startParity]![0] = { cost: 0, from: 0, parity: startParity };
  for (let end = 1; end <= count; end += 1) {
    for (let first = end - 1; first >= 0; first -= 1) {
      const room = left(first, end);
      if (room < 0 && end - first > 1) break;
      for (const parity of [0, 1]) {
        const way = best[1 - parity]![first];
        if (way === undefined) continue;
        const isLast = end === count;
        const empty = isLast ? 0 : Math.min(1, Math.max(0, room) / 2000) ** 2;
        const turn = parity === 1 && !isLast && turnAt[end]! < TURN_SECONDS ? NO_REST : 0;
        const cost = way.cost + empty + turn + 0.1;
        const known = best[parity]![end];
        if (known === undefined || cost < known.cost) best[parity]![end] = { cost, from: first, parity: 1 - parity };
      }
    }
  }
  const [even, odd] = [best[0]![count], best[1]![count]];
  let parity = odd === undefined || (even !== undefined && even.cost < odd.cost) ? 0 : 1;
  const starts: number[] = [];
  for (let end = count; end > 0; ) {
    const way = best[parity]![end]!;
    starts.unshift(way.from);
    end = way.from;
    parity = way.parity;
  }
  return starts;
}
