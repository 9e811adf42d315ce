import { type Fraction, ZERO } from '../../exact/fraction';
import { type Dynamic, readDynamics } from '../../print/dynamics';

/** MIDI velocities of dynamic marks: evenly spaced about mf = 72 (a default of ours, no source; the standard fixes none). */
const LEVELS: Readonly<Record<string, number>> = { n: 1, ppppp: 6, pppp: 14, ppp: 26, pp: 38, p: 50, mp: 61, mf: 72, f: 88, ff: 104, fff: 116, ffff: 124, fffff: 127 };
const STRUCK: Readonly<Record<string, number>> = { sf: 104, sfz: 108, sffz: 118, fz: 104, sfp: 104, sfpp: 104, fp: 92, rf: 96, rfz: 100 };
export const PLAIN_LEVEL = 72;
/** What a hairpin adds or takes where no level says where it leads. */
const HAIRPIN = 20;

const levelOf = (text: string): number => {
  const mark = readDynamics(text)?.levels[0] ?? null;
  return mark === null ? PLAIN_LEVEL : (LEVELS[mark] ?? STRUCK[mark] ?? PLAIN_LEVEL);
};

/** How loud an attack is, from 1 to 127, by the dynamics that hold where it is. */
export function loudnessAt(dynamics: readonly Dynamic[], position: Fraction): number {
  let level = PLAIN_LEVEL;
  for (const [index, one] of dynamics.entries()) {
    if (one.kind === 'level') {
      if (one.at.compare(position) > 0) break;
      level = levelOf(one.text);
      continue;
    }
    if (one.from.compare(position) > 0) break;
    const next = dynamics[index + 1];
    const target = next?.kind === 'level' && next.at.equals(one.to) ? levelOf(next.text) : level + (one.direction === 'louder' ? HAIRPIN : -HAIRPIN);
    const length = one.to.sub(one.from);
    const share = length.equals(ZERO) || one.to.compare(position) <= 0 ? 1 : position.sub(one.from).div(length).valueOf();
    level += (target - level) * share;
  }
  return Math.max(1, Math.min(127, Math.round(level)));
}
