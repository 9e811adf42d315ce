import 'server-only';
import { getServerSession } from 'next-auth';
import { getDatabase } from '@/db/client';
import { getUser, type UserRole } from '@/db/queries/users';
import { getAuthOptions } from './auth-options';

export type CurrentUser = { id: string; name: string | null; email: string; role: UserRole };

/**
 * Who is signed in, null for nobody. The account is read afresh, so that a changed role or a closed account counts at once;
 * without a session nothing is asked of the database.
 */
export async function getCurrentUser(): Promise<CurrentUser | null> {
  const session = await getServerSession(getAuthOptions());
  if (!session?.user.id) return null;
  return (await getUser(getDatabase(), session.user.id)) ?? null;
}
