/** Different remarks that are told of one line. */
const MOST = 24;

/** What was left out, supposed or found odd while reading, each kind once with the measures that it was found in. */
export class Odd {
  private readonly found = new Map<string, Set<string>>();
  private others = 0;

  /** @param what - a sentence without its full stop; @param measure - as it is printed */
  note(what: string, measure?: string): void {
    const measures = this.found.get(what) ?? new Set();
    if (this.found.size >= MOST && !this.found.has(what)) {
      this.others += 1;
      return;
    }
    this.found.set(what, measures);
    if (measure !== undefined) measures.add(measure);
  }

  sentences(): string[] {
    const told = [...this.found].map(([what, measures]) => (measures.size === 0 ? `${what}.` : `${what} (${whereWords([...measures])}).`));
    return this.others === 0 ? told : [...told, `Much else is odd in this file: ${this.others} more remarks are not shown.`];
  }
}

const NAMED = 6;

/** @example whereWords(['1', '4']) //=> 'measures 1 and 4' */
function whereWords(measures: readonly string[]): string {
  if (measures.length === 1) return `measure ${measures[0]}`;
  if (measures.length > NAMED) return `measures ${measures.slice(0, NAMED).join(', ')} and ${measures.length - NAMED} more`;
  return `measures ${measures.slice(0, -1).join(', ')} and ${measures.at(-1)}`;
}
