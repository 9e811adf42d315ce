import { LIMITS } from '../limits';
import { shown } from './refuse';

/** Gives every candidate a name of its own: the same one again gets its number. */
export class Names {
  private readonly taken = new Set<string>();

  unlike(wanted: string): string {
    const name = shown(wanted, LIMITS.name - 8);
    for (let n = 1; ; n += 1) {
      const tried = n === 1 ? name : `${name} (${n})`;
      if (this.taken.has(tried)) continue;
      this.taken.add(tried);
      return tried;
    }
  }
}
