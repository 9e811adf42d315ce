import { parseStudy } from '@/engine';
import { studyFile } from '@/lib/server/exports/study-file';
import { withPublic } from '@/lib/server/with-access';

// GET /api/studies/[id]/score.json: the study document, which can be opened again; the database keeps no order of keys, the schema has one
export const GET = withPublic('GET /api/studies/[id]/score.json', (args) =>
  studyFile(args, { kind: 'json', make: (study) => `${JSON.stringify(parseStudy(study), null, 2)}\n` }),
);
