import { studyFile } from '@/lib/server/exports/study-file';
import { withPublic } from '@/lib/server/with-access';

// GET /api/studies/[id]/statements.csv: every statement and line as a table
export const GET = withPublic('GET /api/studies/[id]/statements.csv', (args) => studyFile(args, 'csv'));
