import 'server-only';
import { getCurrentUser, type CurrentUser } from './current-user';
import { errorResponse } from './error-response';
import { requireSameOrigin } from './same-origin';

type Params = Record<string, string | string[] | undefined>;
export type PublicArgs = { req: Request; params: Params; user: CurrentUser | null };

/** A handler that anybody may call; `user` is who is signed in, if anybody is. Whatever it throws becomes an answer. */
export const withPublic =
  (handler: (args: PublicArgs) => Promise<Response>) =>
  async (req: Request, context: { params: Promise<Params> }): Promise<Response> => {
    try {
      requireSameOrigin(req);
      return await handler({ req, params: await context.params, user: await getCurrentUser() });
    } catch (error) {
      return errorResponse(error);
    }
  };
