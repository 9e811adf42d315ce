import { partParams } from '@/lib/schemas/exports';
import { studyPrint } from '@/lib/server/exports/study-file';
import { withPublic } from '@/lib/server/with-access';

// GET /api/studies/[id]/parts/[file]: one player's part, by the player's id, as .pdf
export const GET = withPublic('GET /api/studies/[id]/parts/[file]', (args) => {
  const { player } = partParams.parse(args.params).file;
  return studyPrint(args, 'part', player);
});
