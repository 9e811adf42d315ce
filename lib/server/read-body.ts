import 'server-only';
import { AppError } from '../errors';

const kindOf = (req: Request): string => req.headers.get('content-type')?.split(';')[0]?.trim().toLowerCase() ?? '';

const tooLarge = (most: number) =>
  new AppError('too_large', `This is too large to be taken: ${most >= 1024 * 1024 ? `${most / 1024 / 1024} MB` : `${most / 1024} kB`} is the limit. Nothing was changed.`);

/**
 * Reads a body as it comes, no further than the limit; the rest of one that is larger is not kept.
 * @param most - bytes
 * @throws AppError `too_large`
 */
export async function readBytes(req: Request, most: number): Promise<Uint8Array> {
  if (Number(req.headers.get('content-length') ?? 0) > most) throw tooLarge(most);
  const pieces: Uint8Array[] = [];
  let size = 0;
  const reader = req.body?.getReader();
  for (let read = await reader?.read(); read && !read.done; read = await reader?.read()) {
    size += read.value.byteLength;
    if (size > most) throw tooLarge(most);
    pieces.push(read.value);
  }
  return Buffer.concat(pieces);
}

/**
 * Reads a JSON body.
 * @param most - bytes
 * @throws AppError `wrong_type`, `too_large`; SyntaxError where it is no JSON
 */
export async function readBody(req: Request, most: number): Promise<unknown> {
  requireJson(req);
  const bytes = await readBytes(req, most);
  try {
    return JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes));
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
  if (kindOf(req) !== 'application/json') throw new AppError('wrong_type', 'The request must be sent as JSON.');
}

/** As `requireJson`, for a file. @throws AppError `wrong_type` */
export function requireKind(req: Request, kinds: readonly string[]): void {
  if (!kinds.includes(kindOf(req))) throw new AppError('wrong_type', `The file must be sent as one of: ${kinds.join(', ')}.`);
}
