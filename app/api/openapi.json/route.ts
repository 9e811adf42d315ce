import { openApiDocument } from '@/lib/server/openapi';
import { withPublic } from '@/lib/server/with-access';

// GET /api/openapi.json: the open API in OpenAPI 3.1, made from its schemas
export const GET = withPublic('GET /api/openapi.json', async () => Response.json(openApiDocument()));
