import 'server-only';
import { AppError } from '../errors';
import { COUNTS_KEPT, RATES, type Rate, type RateName } from './limits';

type Count = { since: number; tries: number };

/** Counts tries by key, in this process's memory. `now` is in milliseconds. */
export class RateLimit {
  private readonly counts = new Map<string, Count>();

  constructor(private readonly rate: Rate) {}

  /** Counts one try; whether it may go ahead. */
  take(key: string, now: number): boolean {
    const before = this.counts.get(key);
    const count = before && now - before.since < this.rate.within ? before : { since: now, tries: 0 };
    count.tries += 1;
    this.counts.delete(key);
    this.counts.set(key, count);
    const oldest = this.counts.keys().next();
    if (this.counts.size > COUNTS_KEPT && !oldest.done) this.counts.delete(oldest.value);
    return count.tries <= this.rate.most;
  }

  /** Takes one try back. */
  giveBack(key: string): void {
    const count = this.counts.get(key);
    if (count) count.tries -= 1;
  }

  /** Forgets the tries of a key. */
  forget(key: string): void {
    this.counts.delete(key);
  }
}

// On the global object, so that handlers which are built apart count together.
const store = globalThis as typeof globalThis & { sesquiRates?: Map<RateName, RateLimit> };

/**
 * Counts one try of a named rate.
 * @param key - an account's id, or an address
 * @throws AppError `too_many`
 */
export function requireRate(name: RateName, key: string): void {
  store.sesquiRates ??= new Map();
  const limit = store.sesquiRates.get(name) ?? new RateLimit(RATES[name]);
  store.sesquiRates.set(name, limit);
  if (limit.take(key, Date.now())) return;
  const wait = RATES[name].within <= 60_000 ? 'a minute' : RATES[name].within < 60 * 60_000 ? 'a quarter of an hour' : 'an hour';
  throw new AppError('too_many', `This was tried too often. Wait ${wait} and try again; nothing is lost.`);
}
