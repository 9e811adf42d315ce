import { type Fraction, ZERO, formatFraction } from '../exact/fraction';
import { LIMITS } from '../limits';
import { type Metre, parseMetre } from './metre';
import { refuse } from './read-value';

/** What goes by: a length, or a bar line at its offset in the text. */
type Passing = Fraction | number;

/**
 * Checks each bar line of a rhythm text against the metre as values go by; without a metre it does nothing. What stands in a
 * repeat is checked each time round, for its bar lines may fall differently; lengths between two bar lines count as one, so
 * that a repeat costs no more than the measures it fills.
 */
export class Bars {
  private filled = ZERO;
  private number = 1;
  private repeated: Passing[] | null = null;
  private readonly full: Fraction | null;

  constructor(private readonly metre: Metre | undefined) {
    this.full = metre === undefined ? null : parseMetre(metre).length;
  }

  add(length: Fraction): void {
    if (this.full === null) return;
    this.filled = this.filled.add(length);
    if (this.repeated === null) return;
    const last = this.repeated.at(-1);
    if (last === undefined || typeof last === 'number') this.repeated.push(length);
    else this.repeated[this.repeated.length - 1] = last.add(length);
  }

  close(offset: number): void {
    if (this.full === null) return;
    this.repeated?.push(offset);
    if (!this.filled.equals(this.full)) this.wrong(this.full, offset);
    this.filled = ZERO;
    this.number += 1;
    if (this.number > LIMITS.measures) {
      refuse(`This rhythm has more than ${LIMITS.measures} measures. That is the limit.`, offset, 1, 'too_large');
    }
  }

  openRepeat(): void {
    if (this.full !== null) this.repeated = [];
  }

  /** @param count - how often in all; it has gone by once already */
  closeRepeat(count: number): void {
    const body = this.repeated;
    this.repeated = null;
    if (body === null) return;
    if (!body.some((passing) => typeof passing === 'number')) {
      for (const length of body as Fraction[]) this.add(length.mul(count - 1));
      return;
    }
    for (let time = 1; time < count; time += 1) {
      for (const passing of body) {
        if (typeof passing === 'number') this.close(passing);
        else this.add(passing);
      }
    }
  }

  /** The last measure may be short, never long. A text without bar lines is not measured. */
  end(offset: number): void {
    if (this.full !== null && this.number > 1 && this.filled.compare(this.full) > 0) this.wrong(this.full, offset);
  }

  private wrong(full: Fraction, offset: number): never {
    const word = this.filled.compare(full) < 0 ? 'short' : 'long';
    const by = formatFraction(this.filled.sub(full).abs());
    return refuse(
      `Measure ${this.number} lasts ${formatFraction(this.filled)}; in ${this.metre} it should last ${formatFraction(full)}. It is ${by} too ${word}.`,
      offset,
      1,
      'bar_not_full',
    );
  }
}
