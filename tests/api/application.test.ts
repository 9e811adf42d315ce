import { describe, expect, it } from 'vitest';
import { ask } from '../helpers/api';

const everywhere = {
  'x-content-type-options': 'nosniff',
  'x-frame-options': 'DENY',
  'referrer-policy': 'strict-origin-when-cross-origin',
  'cross-origin-opener-policy': 'same-origin',
  'permissions-policy': 'camera=(), microphone=(), geolocation=(), payment=(), usb=()',
};

describe('the application', () => {
  it('says that it and its database answer', async () => {
    expect(await ask('/api/health')).toMatchObject({ status: 200, body: { ok: true } });
  });

  it.each(['/', '/api/health', '/api/studies/nothing'])('sends its security headers with %s, and no name of its maker', async (path) => {
    const { headers } = await ask(path);
    for (const [name, value] of Object.entries(everywhere)) expect([name, headers.get(name)]).toEqual([name, value]);
    expect(headers.get('x-powered-by')).toBeNull();
  });

  it('lets data load nothing', async () => {
    expect((await ask('/api/studies')).headers.get('content-security-policy')).toBe("default-src 'none'; frame-ancestors 'none'");
  });

  it('gives each page a policy with a nonce of its own, which every script of the page carries', async () => {
    const nonces = [];
    for (let i = 0; i < 2; i += 1) {
      const { headers, body } = await ask('/');
      const policy = headers.get('content-security-policy') ?? '';
      const nonce = /script-src 'self' 'nonce-([^']+)' 'strict-dynamic';/.exec(policy)?.[1];
      expect(policy).toContain("frame-ancestors 'none'");
      expect(policy).not.toContain('unsafe-eval');
      const scripts = String(body).match(/<script\b[^>]*>/g) ?? [];
      expect(scripts.length).toBeGreaterThan(0);
      for (const script of scripts) expect(script).toContain(`nonce="${nonce}"`);
      nonces.push(nonce);
    }
    expect(nonces[0]).not.toBe(nonces[1]);
  });
});
