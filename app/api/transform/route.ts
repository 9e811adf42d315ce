import { answerOpen } from '@/lib/server/open-route';
import { withPublic } from '@/lib/server/with-access';

// POST /api/transform: a rhythm after a chain of transformations
export const POST = withPublic('POST /api/transform', async ({ body }) => answerOpen('transform', body));
