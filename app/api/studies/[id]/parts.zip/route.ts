import { studyPrint } from '@/lib/server/exports/study-file';
import { withPublic } from '@/lib/server/with-access';

// GET /api/studies/[id]/parts.zip: every player's part in print; 202 as for score.pdf
export const GET = withPublic('GET /api/studies/[id]/parts.zip', (args) => studyPrint(args, 'parts'));
