import { Fraction, type Exact, gcd, toFraction } from '../exact/fraction';

const MULTIPLEX = ['', '', 'dupla', 'tripla', 'quadrupla', 'quintupla', 'sextupla', 'septupla', 'octupla', 'nonupla', 'decupla'] as const;
/** By the part that is over: half, third, quarter … */
const ONE_OVER = ['', '', 'altera', 'tertia', 'quarta', 'quinta', 'sexta', 'septima', 'octava', 'nona', 'decima'] as const;
const MANY_OVER = ['', '', '', 'tertias', 'quartas', 'quintas', 'sextas', 'septimas', 'octavas', 'nonas', 'decimas'] as const;
const PARTIENS = ['', '', 'bi', 'tri', 'quadri', 'quinti', 'sexti', 'septi', 'octi', 'noni'] as const;

/** The five genera of Gaffurius; each has its inverse, named with sub-. */
export type ProportionGenus = 'multiplex' | 'superparticular' | 'superpartient' | 'multiplex superparticular' | 'multiplex superpartient';
export type NamedProportion = { readonly name: string; readonly genus: ProportionGenus; readonly isInverse: boolean };

function named(n: number, d: number): Omit<NamedProportion, 'isInverse'> | null {
  const times = Math.floor(n / d);
  const over = n % d;
  if (times > 10 || d > 10) return null;
  if (d === 1) return { name: MULTIPLEX[times]!, genus: 'multiplex' };
  const part = over === 1 ? `sesqui${ONE_OVER[d]!}` : `super${PARTIENS[over]!}partiens ${MANY_OVER[d]!}`;
  if (times === 1) return { name: part, genus: over === 1 ? 'superparticular' : 'superpartient' };
  return { name: `${MULTIPLEX[times]!} ${part}`, genus: over === 1 ? 'multiplex superparticular' : 'multiplex superpartient' };
}

/**
 * The old name of a proportion, in lowest terms: 3:2 is sesquialtera, 2:3 subsesquialtera.
 * @param ratio - above 0
 * @returns null for 1:1, and where the terms are larger than are named here (wholes and parts up to ten)
 * @see Gaffurius, Practica musicae (1496), in the LilyPond music glossary; Stainer and Barrett, A Dictionary of Musical Terms
 */
export function proportionName(ratio: Exact): NamedProportion | null {
  const { n, d, s } = toFraction(ratio);
  if (s <= 0n || n === d || n > 110n || d > 110n) return null;
  const isInverse = n < d;
  const found = isInverse ? named(Number(d), Number(n)) : named(Number(n), Number(d));
  return found && { ...found, name: isInverse ? `sub${found.name}` : found.name, isInverse };
}

let byName: Map<string, Fraction> | null = null;

/** The proportion of a name, in any case; null where there is none. */
export function proportionOf(name: string): Fraction | null {
  if (byName === null) {
    byName = new Map();
    for (let d = 1; d <= 10; d += 1) {
      for (let n = d + 1; n <= 11 * d - 1; n += 1) {
        const found = gcd(BigInt(n), BigInt(d)) === 1n ? named(n, d) : null;
        if (found === null) continue;
        byName.set(found.name, new Fraction(n, d));
        byName.set(`sub${found.name}`, new Fraction(d, n));
      }
    }
  }
  return byName.get(name.trim().toLowerCase().replace(/\s+/g, ' ')) ?? null;
}
