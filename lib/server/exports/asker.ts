import 'server-only';
import { createHash, randomBytes } from 'node:crypto';
import type { Asker } from '@/db/queries/export-jobs';
import { EXPORT_TOKEN } from '../../schemas/exports';
import type { CurrentUser } from '../current-user';

const TOKEN = /^[\w-]{43}$/;
const hashOf = (token: string): string => createHash('sha256').update(token).digest('hex');

/** Who asks for prints: the account, or a guest by the token that the browser keeps; only its hash is kept here. */
export function askerOf(req: Request, user: CurrentUser | null): Asker {
  const token = req.headers.get(EXPORT_TOKEN) ?? '';
  return { userId: user?.id ?? null, tokenHash: TOKEN.test(token) ? hashOf(token) : null };
}

/** The one who a new print is to belong to, with a new token for a guest who has shown none. */
export function ownerOf(req: Request, user: CurrentUser | null): { readonly asker: Asker; readonly token?: string } {
  if (user) return { asker: { userId: user.id, tokenHash: null } };
  const asker = askerOf(req, null);
  if (asker.tokenHash !== null) return { asker };
  const token = randomBytes(32).toString('base64url');
  return { asker: { userId: null, tokenHash: hashOf(token) }, token };
}
