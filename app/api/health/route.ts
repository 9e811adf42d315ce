import { getDatabase } from '@/db/client';
import { withPublic } from '@/lib/server/with-access';

// GET /api/health: whether the application and its database answer
export const GET = withPublic('GET /api/health', async () => {
  await getDatabase().execute('select 1');
  return Response.json({ ok: true }, { headers: { 'cache-control': 'no-store' } });
});
