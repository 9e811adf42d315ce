import { scryptSync } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { hashPassword, verifyPassword } from '@/db/password';

describe('passwords', () => {
  it('are kept as scrypt with N = 2^17, r = 8, p = 1 (OWASP, Password Storage Cheat Sheet), each with a salt of its own', async () => {
    const [a, b] = [await hashPassword('tow path and osier'), await hashPassword('tow path and osier')];
    expect(a).not.toBe(b);
    const [scheme, logN, r, p, salt, key] = a.split('$');
    expect([scheme, logN, r, p]).toEqual(['scrypt', '17', '8', '1']);
    const again = scryptSync('tow path and osier', Buffer.from(salt!, 'base64'), 32, { N: 131_072, r: 8, p: 1, maxmem: 256 * 1024 * 1024 });
    expect(again.toString('base64')).toBe(key);
  });

  it('are told apart, however they are composed', async () => {
    const hash = await hashPassword('caf\u00e9 at the weir');
    expect(await verifyPassword('cafe\u0301 at the weir', hash)).toBe(true);
    expect(await verifyPassword('cafe at the weir', hash)).toBe(false);
    expect(await verifyPassword('', hash)).toBe(false);
  });

  it.each([null, undefined, '', 'scrypt$17$8$1$$', 'plain', 'bcrypt$10$8$1$aa$bb'])('do not pass against the hash %j', async (hash) => {
    expect(await verifyPassword('', hash)).toBe(false);
  });

  it('take their turn: six at once all answer', async () => {
    const hash = await hashPassword('six at the gate');
    const answers = await Promise.all(['six at the gate', 'a', 'six at the gate', 'b', 'c', 'six at the gate'].map((word) => verifyPassword(word, hash)));
    expect(answers).toEqual([true, false, true, false, false, true]);
  });

  it('take as long where there is no account', async () => {
    const hash = await hashPassword('known to the keeper');
    const time = async (kept: string | null) => {
      const started = performance.now();
      await verifyPassword('something else', kept);
      return performance.now() - started;
    };
    // The quickest of several, in turn: what else the machine does only ever makes one slower.
    let [known, unknown] = [Infinity, Infinity];
    for (let i = 0; i < 4; i += 1) {
      known = Math.min(known, await time(hash));
      unknown = Math.min(unknown, await time(null));
    }
    expect(unknown / known).toBeGreaterThan(0.5);
    expect(unknown / known).toBeLessThan(2);
  });
});
