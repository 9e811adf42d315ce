import { studyPrint } from '@/lib/server/exports/study-file';
import { withPublic } from '@/lib/server/with-access';

// GET /api/studies/[id]/score.pdf: the score in print; 202 with an address to wait at where it takes more than a few seconds
export const GET = withPublic('GET /api/studies/[id]/score.pdf', (args) => studyPrint(args, 'score'));
