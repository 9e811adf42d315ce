import type { UserRole } from '@/db/queries/users';
import type { DefaultSession } from 'next-auth';

declare module 'next-auth' {
  interface Session {
    user: DefaultSession['user'] & { id: string; role: UserRole };
    /** compared with the account's number: another one has ended */
    epoch: number;
  }
  interface User {
    role: UserRole;
    epoch: number;
  }
}

declare module 'next-auth/jwt' {
  interface JWT {
    id: string;
    role: UserRole;
    epoch: number;
  }
}
