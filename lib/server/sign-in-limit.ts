import 'server-only';

const WINDOW_MS = 15 * 60 * 1000;
/** tries from one address for one account, as the issue sets it */
const PER_ADDRESS = 10;
/** tries for one account from anywhere, since a sender can lie about its address; a setting of ours */
const PER_ACCOUNT = 50;
/** counts kept in memory at most; the oldest go first */
const KEPT = 20_000;

type Count = { since: number; tries: number };

/** Counts tries at signing in, in this process's memory. `now` is in milliseconds. */
export class SignInLimit {
  private readonly counts = new Map<string, Count>();

  private take(key: string, limit: number, now: number): boolean {
    const before = this.counts.get(key);
    const count = before && now - before.since < WINDOW_MS ? before : { since: now, tries: 0 };
    count.tries += 1;
    this.counts.delete(key);
    this.counts.set(key, count);
    const oldest = this.counts.keys().next();
    if (this.counts.size > KEPT && !oldest.done) this.counts.delete(oldest.value);
    return count.tries <= limit;
  }

  /** Counts one try; whether it may go ahead. It counts the same whether the account exists or not. */
  allow(address: string, email: string, now: number): boolean {
    const fromHere = this.take(`${address} ${email}`, PER_ADDRESS, now);
    const fromAnywhere = this.take(email, PER_ACCOUNT, now);
    return fromHere && fromAnywhere;
  }

  /** Forgets the tries from one address, and this one of the account's, once the right password has been given. */
  succeed(address: string, email: string): void {
    this.counts.delete(`${address} ${email}`);
    const account = this.counts.get(email);
    if (account) account.tries -= 1;
  }
}
