import 'server-only';
import { AppError } from '../errors';
import type { CurrentUser } from './current-user';
import { withPublic, type PublicArgs } from './with-public';

export type UserArgs = Omit<PublicArgs, 'user'> & { user: CurrentUser };

/** A handler for signed-in readers only: anybody else gets `unauthorized`. */
export const withUser = (handler: (args: UserArgs) => Promise<Response>) =>
  withPublic(async ({ user, ...args }) => {
    if (!user) throw new AppError('unauthorized', 'Sign in first.');
    return handler({ ...args, user });
  });
