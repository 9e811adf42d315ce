import { getDatabase } from '@/db/client';
import { withPublic } from '@/lib/server/with-public';

// GET /api/health: whether the application and its database answer
export const GET = withPublic(async () => {
  await getDatabase().execute('select 1');
  return Response.json({ ok: true }, { headers: { 'cache-control': 'no-store' } });
});
