import type { Study, Statement } from '@/engine';

/** Lanes for statements that sound at once: each takes the first lane that is free at its start, in the order of the score. */
export function lanesOf(study: Study, statements: readonly Statement[]): { lane: Map<string, number>; count: number } {
  const ends: number[] = [];
  const lane = new Map<string, number>();
  const order = new Map(study.instruments.map(({ id }, index) => [id, index]));
  const row = ({ instrument }: Statement) => order.get(instrument ?? '') ?? 0;
  for (const statement of [...statements].sort((a, b) => a.start.compare(b.start) || row(a) - row(b))) {
    const start = statement.start.valueOf();
    let free = ends.findIndex((end) => end <= start + 1e-9);
    if (free === -1) free = ends.length;
    ends[free] = start + statement.length.valueOf();
    lane.set(statement.id, free);
  }
  return { lane, count: Math.max(ends.length, 1) };
}

export type Bracket = { readonly from: string; readonly to: string; readonly level: number };

/** A bracket for each mirror and its source; one that spans others stands above them. */
export function bracketsOf(study: Study): { brackets: Bracket[]; levels: number } {
  const index = new Map(study.sections.map((section, n) => [section.id, n]));
  const spans = study.sections
    .flatMap((section) => (section.kind === 'mirror' && section.of !== section.id ? [{ from: section.of, to: section.id }] : []))
    .map(({ from, to }) => ({ from, to, a: Math.min(index.get(from)!, index.get(to)!), b: Math.max(index.get(from)!, index.get(to)!) }))
    .sort((x, y) => x.b - x.a - (y.b - y.a));
  const placed: { a: number; b: number; level: number }[] = [];
  const brackets = spans.map(({ from, to, a, b }) => {
    const below = placed.filter((other) => other.a <= b && other.b >= a).map((other) => other.level);
    const level = below.length === 0 ? 0 : Math.max(...below) + 1;
    placed.push({ a, b, level });
    return { from, to, level };
  });
  return { brackets, levels: Math.max(0, ...brackets.map(({ level }) => level + 1)) };
}
