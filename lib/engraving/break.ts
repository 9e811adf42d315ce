/**
 * Breaks a row of things into lines (or pages) so that the sum of what the lines cost is least.
 * @param count - how many things
 * @param cost - of a line from the first to before the last; infinite where they do not fit. One thing alone always fits.
 * @param mostInLine - no line holds more
 * @returns where each line begins
 */
export function breakBest(count: number, cost: (first: number, end: number) => number, mostInLine = Infinity): number[] {
  const best: number[] = [0];
  const from: number[] = [0];
  for (let end = 1; end <= count; end += 1) {
    best[end] = Infinity;
    from[end] = end - 1;
    for (let first = end - 1; first >= 0 && end - first <= mostInLine; first -= 1) {
      const own = cost(first, end);
      if (own === Infinity && end - first > 1) break;
      const whole = best[first]! + (own === Infinity ? 1e6 : own);
      if (whole < best[end]!) {
        best[end] = whole;
        from[end] = first;
      }
    }
  }
  const starts: number[] = [];
  for (let end = count; end > 0; end = from[end]!) starts.unshift(from[end]!);
  return starts;
}
