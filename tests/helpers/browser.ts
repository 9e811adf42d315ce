import { expect, test as base } from '@playwright/test';

/**
 * Playwright's `test`, whose page fails the test where the browser complains: an error on the page, an error in the console,
 * anything that the content security policy has refused, or a request that leaves this machine. `complaints` may be emptied
 * by a test that provokes one on purpose.
 */
export const test = base.extend<{ complaints: string[] }>({
  complaints: [
    async ({ page }, use) => {
      const complaints: string[] = [];
      page.on('pageerror', (error) => complaints.push(`page: ${error.message}`));
      page.on('console', (message) => {
        if (message.type() === 'error') complaints.push(`console: ${message.text()}`);
      });
      page.on('request', (request) => {
        const { hostname, protocol } = new URL(request.url());
        if (protocol.startsWith('http') && hostname !== '127.0.0.1') complaints.push(`request: ${request.url()}`);
      });
      await use(complaints);
      expect(complaints).toEqual([]);
    },
    { auto: true },
  ],
});

/** Forgets what the browser says of answers that refuse, which a test has asked for on purpose. */
export function forgetRefusals(complaints: string[]): void {
  const others = complaints.filter((line) => !/the server responded with a status of 4\d\d/.test(line));
  complaints.splice(0, complaints.length, ...others);
}

export { expect };
