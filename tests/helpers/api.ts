import { setting } from './settings';

export type Answer = { status: number; body: unknown; headers: Headers };

/** Asks the running application over HTTP; redirects are not followed. The body is JSON where it can be, else text. */
export async function ask(path: string, init?: RequestInit): Promise<Answer> {
  const response = await fetch(new URL(path, setting('TEST_BASE_URL')), { redirect: 'manual', ...init });
  const text = await response.text();
  const isJson = response.headers.get('content-type')?.includes('application/json') ?? false;
  return { status: response.status, body: isJson ? JSON.parse(text) : text, headers: response.headers };
}

/** A reader with cookies of its own. */
export class Reader {
  private readonly cookies = new Map<string, string>();
  /** @param address - the address that the reader seems to come from */
  constructor(private readonly address: string) {}

  async ask(path: string, init?: RequestInit): Promise<Answer> {
    const cookie = [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ');
    const answer = await ask(path, { ...init, headers: { cookie, 'x-forwarded-for': this.address, ...init?.headers } });
    for (const line of answer.headers.getSetCookie()) {
      const [pair = ''] = line.split(';');
      const at = pair.indexOf('=');
      this.cookies.set(pair.slice(0, at), pair.slice(at + 1));
    }
    return answer;
  }

  /** Tries to sign in, as the sign-in page does. */
  async signIn(email: string, password: string): Promise<Answer> {
    const { csrfToken } = (await this.ask('/api/auth/csrf')).body as { csrfToken: string };
    const body = new URLSearchParams({ csrfToken, email, password, json: 'true' });
    return this.ask('/api/auth/callback/credentials', { method: 'POST', body });
  }
}
