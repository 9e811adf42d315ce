import { answerOpen } from '@/lib/server/open-route';
import { withPublic } from '@/lib/server/with-access';

// POST /api/check: an answer beside its key
export const POST = withPublic('POST /api/check', async ({ body }) => answerOpen('check', body));
