import 'server-only';
import { AppError } from '../errors';
import { ACCESS, type Access, type Route, type SignedInRoute } from './access';
import { addressOf } from './address';
import { getCurrentUser, type CurrentUser } from './current-user';
import { errorResponse } from './error-response';
import { readBody, readBytes, requireJson, requireKind } from './read-body';
import { requireRate } from './rate-limit';
import { requireSameOrigin } from './same-origin';

type Params = Record<string, string | string[] | undefined>;
type Context = { params: Promise<Params> };
export type PublicArgs = {
  req: Request;
  /** the address's parts, unchecked */
  params: Params;
  /** what stands behind the question mark, unchecked */
  query: Record<string, string>;
  /** the JSON body, unchecked; the bytes of a file; undefined where the route takes neither */
  body: unknown;
  user: CurrentUser | null;
};
export type UserArgs = Omit<PublicArgs, 'user'> & { user: CurrentUser };

async function admit(req: Request, context: Context, access: Access): Promise<PublicArgs> {
  requireSameOrigin(req);
  const isChange = req.method !== 'GET' && req.method !== 'HEAD';
  if (access.file) requireKind(req, access.file.kinds);
  else if (isChange) requireJson(req);
  const user = await getCurrentUser();
  if (access.who !== 'anybody' && !user) throw new AppError('unauthorized', 'Sign in first.');
  if (Array.isArray(access.who) && user && !access.who.includes(user.role)) throw new AppError('forbidden', 'This is for administrators only.');
  if (access.rate) requireRate(access.rate, user?.id ?? addressOf(req.headers.get('x-forwarded-for')));
  const body = access.file ? await readBytes(req, access.file.most) : access.body === undefined ? undefined : await readBody(req, access.body);
  return { req, params: await context.params, query: Object.fromEntries(new URL(req.url).searchParams), body, user };
}

/** A handler that anybody may call; `user` is who is signed in, if anybody is. Whatever it throws becomes an answer. */
export const withPublic =
  (route: Route, handler: (args: PublicArgs) => Promise<Response>) =>
  async (req: Request, context: Context): Promise<Response> => {
    try {
      return await handler(await admit(req, context, ACCESS[route]));
    } catch (error) {
      return errorResponse(error);
    }
  };

/** A handler for those whom the table of access lets in: signed in, and of the right role. */
export const withUser = (route: SignedInRoute, handler: (args: UserArgs) => Promise<Response>) =>
  withPublic(route, async ({ user, ...args }) => {
    if (!user) throw new AppError('unauthorized', 'Sign in first.');
    return handler({ ...args, user });
  });
