import { EngineError } from '../errors';
import { Fraction } from '../exact/fraction';
import type { Rhythm } from '../rhythm/types';
import { augment } from '../transform/augment';

const LARGEST_TERM = 16;
const WANTED = 4;
/** Long lines are tried at their beginning first, so that a factor that cannot do is found out quickly. */
const GLANCE = 64;

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

/**
 * Factors by which a rhythm that cannot be written could be stretched so that it can, each really tried.
 * @param canSpell - whether a stretched rhythm can be written
 */
export function nearestFactors(rhythm: Rhythm, canSpell: (stretched: Rhythm) => boolean): Fraction[] {
  const found: Fraction[] = [];
  const glance = rhythm.slice(0, GLANCE);
  const tries = (values: Rhythm, factor: Fraction): boolean => {
    try {
      return canSpell(augment(values, factor));
    } catch (error) {
      // Stretched, it passes another limit: not an offer.
      if (error instanceof EngineError) return false;
      throw error;
    }
  };
  for (const factor of candidates()) {
    if (tries(glance, factor) && (rhythm.length <= GLANCE || tries(rhythm, factor))) found.push(factor);
    if (found.length === WANTED) break;
  }
  return found;
}
