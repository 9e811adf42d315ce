import 'server-only';
import { FILE_TYPES, type FileKind } from '../../file-types';

/**
 * How a file is to be kept and called: a plain name for old readers, and the whole name besides.
 * @see RFC 6266, Content-Disposition in HTTP; RFC 8187, UTF-8'' in parameters
 */
export function disposition(name: string): string {
  const plain = name.normalize('NFKD').replaceAll(/\p{M}/gu, '').replaceAll(/[^\x20-\x7e]/g, '_').replaceAll(/["\\%]/g, '_');
  const whole = encodeURIComponent(name).replaceAll(/['()*]/g, (one) => `%${one.charCodeAt(0).toString(16).toUpperCase()}`);
  return `attachment; filename="${plain}"; filename*=UTF-8''${whole}`;
}

/** RFC 9110, 13.1.2: any of the tags, compared without regard to their weakness; `*` is whatever there is. */
export function isFresh(req: Request, tag: string): boolean {
  const asked = req.headers.get('if-none-match');
  if (asked === null) return false;
  return asked.trim() === '*' || asked.split(',').some((one) => one.trim().replace(/^W\//, '') === tag);
}

export type FileOf = {
  readonly kind: FileKind;
  readonly name: string;
  /** from `keyOf`: the same for the same bytes */
  readonly key: string;
  /** whether anybody may be given it, so that a cache between may keep it too */
  readonly isPublic: boolean;
};

const headersOf = ({ kind, name, key, isPublic }: FileOf): Record<string, string> => ({
  'content-type': FILE_TYPES[kind],
  'content-disposition': disposition(name),
  etag: `"${key.slice(0, 32)}"`,
  'cache-control': isPublic ? 'public, max-age=0, must-revalidate' : 'private, no-cache',
});

/**
 * The answer with a file: 304 where the asker has it already, and then, or where only the head is asked for, it is not made.
 * @param make - makes the file, or another answer in its place
 * @throws whatever `make` throws
 */
export async function fileResponse(req: Request, file: FileOf, make: () => Promise<Uint8Array | string | Response> | Uint8Array | string): Promise<Response> {
  const headers = headersOf(file);
  if (isFresh(req, headers.etag!)) return new Response(null, { status: 304, headers });
  if (req.method === 'HEAD') return new Response(null, { headers });
  const made = await make();
  if (made instanceof Response) return made;
  const body = typeof made === 'string' ? new TextEncoder().encode(made) : made;
  return new Response(new Uint8Array(body), { headers: { ...headers, 'content-length': String(body.byteLength) } });
}
