import { studyFile } from '@/lib/server/exports/study-file';
import { withPublic } from '@/lib/server/with-access';

// GET /api/studies/[id]/score.musicxml: the score as MusicXML 4.0
export const GET = withPublic('GET /api/studies/[id]/score.musicxml', (args) => studyFile(args, 'musicxml'));
