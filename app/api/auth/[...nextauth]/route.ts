import NextAuth from 'next-auth';
import { getAuthOptions } from '@/lib/server/auth-options';

type Context = { params: Promise<{ nextauth: string[] }> };

const handler = (req: Request, context: Context): Promise<Response> => NextAuth(getAuthOptions())(req, context);

// GET, POST /api/auth/*: signing in and out, by the sign-in library, which checks its own token against other sites
export { handler as GET, handler as POST };
