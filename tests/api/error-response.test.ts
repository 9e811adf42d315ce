import { describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { EngineError } from '@/engine';
import { AppError, ERROR_STATUS, type ErrorCode } from '@/lib/errors';
import { errorResponse } from '@/lib/server/error-response';
import { jsonResponse } from '@/lib/server/json-response';

const read = async (error: unknown) => {
  const response = errorResponse(error);
  return { status: response.status, body: await response.json() };
};
const zodError = (schema: z.ZodType, value: unknown) => schema.safeParse(value).error;

describe('errorResponse', () => {
  it.each(Object.entries(ERROR_STATUS))('answers an AppError %s with %i', async (code, status) => {
    expect(await read(new AppError(code as ErrorCode, 'A sentence.', { title: 'Too long.' }))).toEqual({
      status,
      body: { error: { code, message: 'A sentence.', fields: { title: 'Too long.' } } },
    });
  });

  it('answers what the engine refuses with 422, its code and its place', async () => {
    const refused = new EngineError('invalid_factor', 'A factor is above 0.', { path: 'sections.0.process.factors.2' });
    expect(await read(refused)).toEqual({
      status: 422,
      body: { error: { code: 'invalid_factor', message: 'A factor is above 0.', fields: { 'sections.0.process.factors.2': 'A factor is above 0.' } } },
    });
  });

  it('answers what a schema refuses with 422 and a sentence for each field', async () => {
    const schema = z.object({ title: z.string('A title is text.'), count: z.int('A count is whole.') });
    expect(await read(zodError(schema, { title: 1, count: 0.5 }))).toEqual({
      status: 422,
      body: { error: { code: 'invalid', message: 'A title is text.', fields: { title: 'A title is text.', count: 'A count is whole.' } } },
    });
  });

  it('answers a body that is no JSON with 400', async () => {
    const error = await new Response('{').json().catch((caught: unknown) => caught);
    expect(await read(error)).toEqual({
      status: 400,
      body: { error: { code: 'unreadable', message: 'The request could not be read: it is not JSON.' } },
    });
  });

  it('logs anything else and tells nothing of it; a database that is away is told as such', async () => {
    const log = vi.spyOn(process.stderr, 'write').mockReturnValue(true);
    expect(await read(new Error('password=hunter'))).toEqual({
      status: 500,
      body: { error: { code: 'internal', message: 'Something went wrong on our side. Try again in a moment.' } },
    });
    expect(log.mock.calls.flat().join('')).toContain('password=hunter');
    const away = new Error('Failed query', { cause: Object.assign(new Error('connect'), { code: 'ECONNREFUSED' }) });
    expect(await read(away)).toEqual({
      status: 503,
      body: { error: { code: 'unavailable', message: 'The database does not answer. Try again in a moment; nothing is lost.' } },
    });
    log.mockRestore();
  });

  it.each([
    ['timeout exceeded when trying to connect', 503],
    ['Connection terminated unexpectedly', 503],
    ['Client has encountered a connection error and is not queryable', 503],
    ['Client was closed and is not queryable', 503],
    ['invalid input syntax for type uuid', 500],
  ])('tells a database that has gone from a fault of ours: %s', async (message, status) => {
    const log = vi.spyOn(process.stderr, 'write').mockReturnValue(true);
    expect((await read(new Error('Failed query: rollback', { cause: new Error(message) }))).status).toBe(status);
    log.mockRestore();
  });
});

describe('jsonResponse', () => {
  it('sends what the schema names and nothing else', async () => {
    const row = { id: 'a', passwordHash: 'secret' };
    expect(await jsonResponse(z.object({ id: z.string() }), row).json()).toEqual({ id: 'a' });
  });

  it('calls a value that does not fit a fault of ours', () => {
    const row = JSON.parse('{"id":1}') as { id: string };
    expect(() => jsonResponse(z.object({ id: z.string() }), row)).toThrow('An answer does not fit its schema.');
  });
});
