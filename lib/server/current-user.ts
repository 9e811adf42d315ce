import 'server-only';
import { getServerSession } from 'next-auth';
import { getDatabase } from '@/db/client';
import { UUID } from '@/db/cursor';
import { getUser, type UserRole } from '@/db/queries/users';
import { getAuthOptions } from './auth-options';

export type CurrentUser = { id: string; name: string | null; email: string; role: UserRole; sessionEpoch: number };

/**
 * Who is signed in, null for nobody. The account is read afresh, so that a changed role, a closed account and sessions that
 * were ended count at once; without a session nothing is asked of the database.
 */
export async function getCurrentUser(): Promise<CurrentUser | null> {
  const session = await getServerSession(getAuthOptions());
  const id = session?.user?.id;
  if (!id || !UUID.test(id)) return null;
  const user = await getUser(getDatabase(), id);
  return user && user.sessionEpoch === session.epoch ? user : null;
}
