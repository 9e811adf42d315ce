import 'server-only';
import { z } from 'zod';
import { errorResponse } from '../schemas/error';
import { OPEN_ROUTES } from '../schemas/open';

const json = (schema: object, example?: unknown) => ({ 'application/json': { schema, ...(example === undefined ? {} : { example }) } });
const schemaOf = (schema: z.ZodType, io: 'input' | 'output') => {
  const made: Record<string, unknown> = { ...z.toJSONSchema(schema, { io, target: 'draft-2020-12', unrepresentable: 'any' }) };
  // OpenAPI 3.1 says once for the whole document which dialect its schemas are in.
  delete made.$schema;
  return made;
};

/** The open API as an OpenAPI 3.1 document. */
export function openApiDocument(): object {
  const refusal = (description: string) => ({ description, content: json({ $ref: '#/components/schemas/Error' }) });
  const refusals = {
    400: refusal('The body is no JSON.'),
    403: refusal('The request comes from another site.'),
    413: refusal('The body is too large.'),
    415: refusal('The body is of another kind than JSON.'),
    422: refusal('Something in it is refused; `fields` says where.'),
    429: refusal('Asked too often: wait a minute.'),
  };
  const paths = Object.fromEntries(
    Object.entries(OPEN_ROUTES).map(([operationId, { path, summary, body, response, example }]) => [
      path,
      {
        post: {
          operationId,
          summary,
          requestBody: { required: true, content: json(schemaOf(body, 'input'), example) },
          responses: { 200: { description: summary, content: json(schemaOf(response, 'output')) }, ...refusals },
        },
      },
    ]),
  );
  return {
    openapi: '3.1.0',
    info: { title: 'Sesqui', version: '1', description: 'Exact fractions in, exact fractions out, all as text. Open to anybody, so many questions a minute.' },
    paths,
    components: { schemas: { Error: schemaOf(errorResponse, 'output') } },
  };
}
