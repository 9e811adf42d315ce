import { partParams } from '@/lib/schemas/exports';
import { studyFile, studyPrint } from '@/lib/server/exports/study-file';
import { withPublic } from '@/lib/server/with-access';

// GET /api/studies/[id]/parts/[file]: one player's part, by the player's id, as .pdf, .musicxml or .mxl
export const GET = withPublic('GET /api/studies/[id]/parts/[file]', (args) => {
  const { player, kind } = partParams.parse(args.params).file;
  return kind === 'pdf' ? studyPrint(args, 'part', player) : studyFile(args, kind, player);
});
