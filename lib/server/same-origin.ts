import 'server-only';
import { AppError } from '../errors';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

function isSameHost(origin: string, host: string | null): boolean {
  const at = URL.canParse(origin) ? new URL(origin) : null;
  if (!at) return false;
  const own = process.env.NEXTAUTH_URL;
  return at.host === host || (own !== undefined && URL.canParse(own) && at.origin === new URL(own).origin);
}

/**
 * Refuses a changing request that another site has made in the reader's name. Browsers send `Sec-Fetch-Site`, and `Origin`
 * with every such request; a program that sends neither carries no reader's cookies.
 * @throws AppError `forbidden`
 * @see W3C, Fetch Metadata Request Headers; OWASP, Cross-Site Request Forgery Prevention Cheat Sheet
 */
export function requireSameOrigin(req: Request): void {
  if (SAFE.has(req.method)) return;
  const site = req.headers.get('sec-fetch-site');
  const origin = req.headers.get('origin');
  const fromOurs = site === null || site === 'same-origin' || site === 'none';
  if (fromOurs && (origin === null || isSameHost(origin, req.headers.get('host')))) return;
  throw new AppError('forbidden', 'This request came from another site and was not carried out.');
}
