import { studyFile } from '@/lib/server/exports/study-file';
import { withPublic } from '@/lib/server/with-access';

// GET /api/studies/[id]/score.json: the study document, which can be opened again
export const GET = withPublic('GET /api/studies/[id]/score.json', (args) => studyFile(args, 'json'));
