import 'server-only';
import { AppError } from '../errors';

const tooLarge = (most: number) =>
  new AppError('too_large', `This is too large to be taken: ${most >= 1024 * 1024 ? `${most / 1024 / 1024} MB` : `${most / 1024} kB`} is the limit. Nothing was changed.`);

/**
 * Reads a JSON body, no further than the limit; the rest of one that is larger is not kept.
 * @param most - bytes
 * @throws AppError `wrong_type`, `too_large`; SyntaxError where it is no JSON
 */
export async function readBody(req: Request, most: number): Promise<unknown> {
  requireJson(req);
  if (Number(req.headers.get('content-length') ?? 0) > most) throw tooLarge(most);
  const pieces: Uint8Array[] = [];
  let size = 0;
  const reader = req.body?.getReader();
  for (let read = await reader?.read(); read && !read.done; read = await reader?.read()) {
    size += read.value.byteLength;
    if (size > most) throw tooLarge(most);
    pieces.push(read.value);
  }
  try {
    return JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(pieces)));
  } catch (error) {
    if (error instanceof TypeError) throw new SyntaxError('The body is no UTF-8.');
    throw error;
  }
}

/**
 * A form of another site can send other kinds of bodies without asking first, but not JSON.
 * @throws AppError `wrong_type`
 */
export function requireJson(req: Request): void {
  const type = req.headers.get('content-type')?.split(';')[0]?.trim().toLowerCase();
  if (type !== 'application/json') throw new AppError('wrong_type', 'The request must be sent as JSON.');
}
