import NextAuth from 'next-auth';
import { getAuthOptions } from '@/lib/server/auth-options';
import { getCurrentUser } from '@/lib/server/current-user';
import { errorResponse } from '@/lib/server/error-response';
import { requireSameOrigin } from '@/lib/server/same-origin';

type Context = { params: Promise<{ nextauth: string[] }> };

const library = (req: Request, context: Context): Promise<Response> => NextAuth(getAuthOptions())(req, context);

// GET /api/auth/*: the sign-in library's; the session is told as the account is now, and not at all once it has ended
export async function GET(req: Request, context: Context): Promise<Response> {
  try {
    if ((await context.params).nextauth.join('/') !== 'session') return await library(req, context);
    const user = await getCurrentUser();
    if (!user) return Response.json({}, { headers: { 'cache-control': 'no-store' } });
    const answer = await library(req, context);
    const body = (await answer.json()) as object;
    const { id, name, email, role } = user;
    return Response.json({ ...body, user: { id, name, email, role } }, { headers: answer.headers });
  } catch (error) {
    return errorResponse(error);
  }
}

// POST /api/auth/*: signing in and out, by the sign-in library, which also checks its own token against other sites
export async function POST(req: Request, context: Context): Promise<Response> {
  try {
    requireSameOrigin(req);
    return await library(req, context);
  } catch (error) {
    return errorResponse(error);
  }
}
