import type { Person } from '@/components/site-header';
import { getCurrentUser } from '@/lib/server/current-user';

/** Who is signed in, as the header shows it; nobody where that cannot be found out. */
export async function readPerson(): Promise<Person> {
  const user = await getCurrentUser().catch(() => null);
  return user ? { name: user.name ?? user.email, role: user.role } : null;
}
