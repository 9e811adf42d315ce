import { answerOpen } from '@/lib/server/open-route';
import { withPublic } from '@/lib/server/with-access';

// POST /api/find: what turns one rhythm into another
export const POST = withPublic('POST /api/find', async ({ body }) => answerOpen('find', body));
