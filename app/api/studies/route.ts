import { getDatabase } from '@/db/client';
import { listDemoStudies } from '@/db/queries/studies';
import { studyListResponse } from '@/lib/schemas/studies';
import { jsonResponse } from '@/lib/server/json-response';
import { withPublic } from '@/lib/server/with-public';

// GET /api/studies: the demo studies, without their documents
export const GET = withPublic(async () => {
  const studies = await listDemoStudies(getDatabase());
  return jsonResponse(studyListResponse, { studies });
});
