import { getDatabase } from '@/db/client';
import { getVersion } from '@/db/queries/study-versions';
import { versionParams, versionResponse } from '@/lib/schemas/studies';
import { jsonResponse } from '@/lib/server/json-response';
import { noStudy } from '@/lib/server/study-answers';
import { withUser } from '@/lib/server/with-access';

// GET /api/studies/[id]/versions/[version]: one kept version, whole
export const GET = withUser('GET /api/studies/[id]/versions/[version]', async ({ params, user }) => {
  const { id, version: wanted } = versionParams.parse(params);
  const version = await getVersion(getDatabase(), { id, userId: user.id, version: wanted });
  if (!version) throw noStudy();
  return jsonResponse(versionResponse, { version });
});
