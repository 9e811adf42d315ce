import 'server-only';
import { RATES } from './limits';
import { RateLimit } from './rate-limit';

/** Counts tries at signing in, in this process's memory. `now` is in milliseconds. */
export class SignInLimit {
  private readonly fromAddress = new RateLimit(RATES.signInFromAddress);
  private readonly fromAnywhere = new RateLimit(RATES.signInFromAnywhere);

  /** Counts one try; whether it may go ahead. It counts the same whether the account exists or not. */
  allow(address: string, email: string, now: number): boolean {
    const fromHere = this.fromAddress.take(`${address} ${email}`, now);
    const fromAnywhere = this.fromAnywhere.take(email, now);
    return fromHere && fromAnywhere;
  }

  /** Forgets the tries from one address, and this one of the account's, once the right password has been given. */
  succeed(address: string, email: string): void {
    this.fromAddress.forget(`${address} ${email}`);
    this.fromAnywhere.giveBack(email);
  }
}
