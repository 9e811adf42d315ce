import { describe, expect, it } from 'vitest';
import { EngineError, LIMITS, countPatterns } from '@/engine';

/** By turning and reversing every pattern, and dropping doubles. */
function counted(pulses: number, attacks: number) {
  const all = Array.from({ length: 2 ** pulses }, (_, bits) => bits.toString(2).padStart(pulses, '0')).filter((box) => box.replaceAll('0', '').length === attacks);
  const turns = (box: string) => Array.from({ length: pulses }, (_, k) => box.slice(k) + box.slice(0, k));
  const reversed = (box: string) => [...box].reverse().join('');
  const least = (boxes: string[]) => boxes.sort()[0]!;
  return {
    patterns: BigInt(all.length),
    necklaces: BigInt(new Set(all.map((box) => least(turns(box)))).size),
    bracelets: BigInt(new Set(all.map((box) => least([...turns(box), ...turns(reversed(box))]))).size),
  };
}

describe('countPatterns', () => {
  it('agrees with patterns turned, reversed and compared, for every number of attacks in up to 11 pulses', () => {
    for (let pulses = 1; pulses <= 11; pulses += 1) {
      for (let attacks = 0; attacks <= pulses; attacks += 1) expect(countPatterns(pulses, attacks), `${attacks} in ${pulses}`).toEqual(counted(pulses, attacks));
    }
  });

  it('reaches the limit of pulses', () => {
    const { patterns, necklaces, bracelets } = countPatterns(LIMITS.pulses);
    expect(patterns).toBe(2n ** BigInt(LIMITS.pulses));
    // Nearly every pattern has all its turns, and no mirror.
    expect(patterns / necklaces).toBe(BigInt(LIMITS.pulses) - 1n);
    expect(necklaces < 2n * bracelets).toBe(true);
  });

  it.each([[0, undefined], [LIMITS.pulses + 1, undefined], [1.5, undefined], [8, -1], [8, 9], [8, 0.5]])('refuses %s pulses and %s attacks', (pulses, attacks) => {
    expect(() => countPatterns(pulses, attacks)).toThrow(EngineError);
  });
});
