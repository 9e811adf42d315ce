import { EngineError } from '../errors';
import { Fraction } from '../exact/fraction';
import type { Rhythm } from '../rhythm/types';
import { augment } from '../transform/augment';
import { canWrite } from './can-write';
import { type CountedLine, stretchLine } from './pieces';
import type { Change } from './plan';

const LARGEST_TERM = 16;
const WANTED = 4;
/** Measures that are tried first, from the value at fault on, so that a factor that cannot do is found out quickly. */
const GLANCE = 2;

const gcdOf = (a: number, b: number): number => (b === 0 ? a : gcdOf(b, a % b));

/** Factors of small terms from 1/2 to 2, the nearest to 1 first, as their ratio to 1 or its inverse. */
function candidates(): Fraction[] {
  const factors: Fraction[] = [];
  for (let d = 1; d <= LARGEST_TERM; d += 1) {
    for (let n = 1; n <= LARGEST_TERM; n += 1) {
      if (gcdOf(n, d) === 1 && n !== d && 2 * n >= d && n <= 2 * d) factors.push(new Fraction(n, d));
    }
  }
  const far = (factor: Fraction): Fraction => (factor.compare(1) < 0 ? factor.inverse() : factor);
  return factors.sort((a, b) => far(a).compare(far(b)) || a.compare(b));
}

function firstThat(isGood: (factor: Fraction) => boolean): Fraction[] {
  const found: Fraction[] = [];
  for (const factor of candidates()) {
    try {
      if (isGood(factor)) found.push(factor);
    } catch (error) {
      // Stretched, it passes another limit: not an offer.
      if (!(error instanceof EngineError)) throw error;
    }
    if (found.length === WANTED) break;
  }
  return found;
}

/**
 * Factors by which a rhythm that cannot be written could be stretched so that it can, each really tried.
 * @param canSpell - whether a stretched rhythm can be written; what it refuses with an `EngineError` is not offered
 */
export const nearestFactors = (rhythm: Rhythm, canSpell: (stretched: Rhythm) => boolean): Fraction[] =>
  firstThat((factor) => canSpell(augment(rhythm, factor)));

/**
 * The same for a whole line, counted once.
 * @param value - the value at fault
 */
export const nearestForLine = (line: CountedLine, changes: readonly Change[], value: number): Fraction[] =>
  firstThat((factor) => {
    const stretched = stretchLine(line, factor);
    return stretched !== null && canWrite(stretched, changes, value, GLANCE) && canWrite(stretched, changes);
  });
