import { setting } from './settings';

export type Answer = { status: number; body: unknown; headers: Headers };

/**
 * Asks the running application over HTTP; redirects are not followed. The body is JSON where it can be, else text.
 * @param base - address of the application, where it is another than the tests' own
 */
export async function ask(path: string, init?: RequestInit, base = setting('TEST_BASE_URL')): Promise<Answer> {
  const response = await fetch(new URL(path, base), { redirect: 'manual', ...init });
  const text = await response.text();
  const isJson = response.headers.get('content-type')?.includes('application/json') ?? false;
  return { status: response.status, body: isJson ? JSON.parse(text) : text, headers: response.headers };
}

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/** An address for documentation that no other test of the run has used (RFC 5737, RFC 3849): rates are counted by address. */
export const newAddress = (): string => `2001:db8::${crypto.randomUUID().slice(0, 4)}:${crypto.randomUUID().slice(0, 4)}`;

/** A reader with cookies of its own. */
export class Reader {
  readonly cookies = new Map<string, string>();
  /** @param address - the address that the reader seems to come from */
  constructor(
    private readonly address: string = newAddress(),
    private readonly base?: string,
  ) {}

  async ask(path: string, init?: RequestInit): Promise<Answer> {
    const cookie = [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ');
    const answer = await ask(path, { ...init, headers: { cookie, 'x-forwarded-for': this.address, ...init?.headers } }, this.base);
    for (const line of answer.headers.getSetCookie()) {
      const [pair = ''] = line.split(';');
      const at = pair.indexOf('=');
      this.cookies.set(pair.slice(0, at), pair.slice(at + 1));
    }
    return answer;
  }

  /** Sends JSON; text is sent as it is. */
  async send(method: Method, path: string, body?: unknown, headers: Record<string, string> = {}): Promise<Answer> {
    const text = typeof body === 'string' ? body : JSON.stringify(body);
    return this.ask(path, { method, headers: { 'content-type': 'application/json', ...headers }, ...(body !== undefined && { body: text }) });
  }

  /** Tries to sign in, as the sign-in page does. */
  async signIn(email: string, password: string): Promise<Answer> {
    const { csrfToken } = (await this.ask('/api/auth/csrf')).body as { csrfToken: string };
    const body = new URLSearchParams({ csrfToken, email, password, json: 'true' });
    return this.ask('/api/auth/callback/credentials', { method: 'POST', body });
  }
}
