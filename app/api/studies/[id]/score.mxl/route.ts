import { studyFile } from '@/lib/server/exports/study-file';
import { withPublic } from '@/lib/server/with-access';

// GET /api/studies/[id]/score.mxl: the score as compressed MusicXML
export const GET = withPublic('GET /api/studies/[id]/score.mxl', (args) => studyFile(args, 'mxl'));
