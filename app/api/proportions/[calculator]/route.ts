import { AppError } from '@/lib/errors';
import { isCalculator } from '@/lib/schemas/open';
import { answerOpen } from '@/lib/server/open-route';
import { withPublic } from '@/lib/server/with-access';

// POST /api/proportions/[calculator]: lengths, stretch, tempo, alignment, division, canon
export const POST = withPublic('POST /api/proportions/[calculator]', async ({ params, body }) => {
  if (!isCalculator(params.calculator)) throw new AppError('not_found', 'There is no such calculator: lengths, stretch, tempo, alignment, division and canon are.');
  return answerOpen(params.calculator, body);
});
