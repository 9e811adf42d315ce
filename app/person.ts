import { cache } from 'react';
import { getDatabase } from '@/db/client';
import { getAccount } from '@/db/queries/users';
import { getCurrentUser } from '@/lib/server/current-user';

/** Who is signed in, as pages show it; nobody where that cannot be found out. */
export const readPerson = cache(async () => {
  try {
    const user = await getCurrentUser();
    const account = user && (await getAccount(getDatabase(), user.id));
    return account ? { name: account.name || account.email, role: account.role, valueNames: account.valueNames, paperSize: account.paperSize } : null;
  } catch {
    return null;
  }
});
