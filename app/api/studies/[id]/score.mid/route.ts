import { studyFile } from '@/lib/server/exports/study-file';
import { withPublic } from '@/lib/server/with-access';

// GET /api/studies/[id]/score.mid: a Standard MIDI File
export const GET = withPublic('GET /api/studies/[id]/score.mid', (args) => studyFile(args, 'mid'));
