import { shown, unreadable } from './refuse';

type Encoding = 'utf-8' | 'utf-16le' | 'utf-16be' | 'iso-8859-1';

const SAME: Readonly<Record<string, Encoding>> = {
  'utf-8': 'utf-8', utf8: 'utf-8', 'us-ascii': 'utf-8', ascii: 'utf-8',
  'iso-8859-1': 'iso-8859-1', 'iso_8859-1': 'iso-8859-1', latin1: 'iso-8859-1', 'latin-1': 'iso-8859-1',
};

/** By its first bytes, then by what it says of itself. @see W3C, XML 1.0, appendix F */
function encodingOf(bytes: Uint8Array): Encoding {
  const [a, b, c, d] = bytes;
  if ((a === 0xff && b === 0xfe && c === 0 && d === 0) || (a === 0 && b === 0 && c === 0xfe && d === 0xff)) return unreadable('This file is written in UTF-32, which is not read. Save it as UTF-8.');
  if ((a === 0xff && b === 0xfe) || (a === 0x3c && b === 0)) return 'utf-16le';
  if ((a === 0xfe && b === 0xff) || (a === 0 && b === 0x3c)) return 'utf-16be';
  const declaration = /^\s*<\?xml[^>]*?encoding\s*=\s*["']([^"']{1,60})["']/.exec(String.fromCharCode(...bytes.subarray(0, 200)));
  if (!declaration) return 'utf-8';
  const known = SAME[declaration[1]!.toLowerCase()];
  return known ?? unreadable(`This file says that it is written in “${shown(declaration[1]!)}”, and is not, or that encoding is not read. Save it as UTF-8.`);
}

/** The first byte that is no UTF-8. */
function firstFault(bytes: Uint8Array): number {
  for (let at = 0; at < bytes.length; ) {
    const byte = bytes[at]!;
    const length = byte < 0x80 ? 1 : byte >= 0xc2 && byte < 0xe0 ? 2 : byte >= 0xe0 && byte < 0xf0 ? 3 : byte >= 0xf0 && byte < 0xf5 ? 4 : 0;
    const rest = bytes.subarray(at + 1, at + length);
    if (length === 0 || rest.length < length - 1 || rest.some((next) => (next & 0xc0) !== 0x80)) return at;
    at += length;
  }
  return bytes.length;
}

const latin1 = (bytes: Uint8Array): string => {
  let text = '';
  for (let at = 0; at < bytes.length; at += 4_096) text += String.fromCharCode(...bytes.subarray(at, at + 4_096));
  return text;
};

/**
 * Text of bytes that come in pieces, exactly as they were written: UTF-8 and UTF-16 with or without a mark, ISO-8859-1 where it
 * is declared.
 * @throws EngineError `unreadable_music`, naming the encoding or the byte
 */
export async function* decoded(pieces: AsyncIterable<Uint8Array>): AsyncGenerator<string> {
  let encoding: Encoding | null = null;
  let decoder: TextDecoder | null = null;
  let start = new Uint8Array(0);
  let before = 0;
  const decode = (piece: Uint8Array, stream: boolean): string => {
    if (encoding === 'iso-8859-1') return latin1(piece);
    decoder ??= new TextDecoder(encoding ?? 'utf-8', { fatal: true });
    try {
      return decoder.decode(piece, { stream });
    } catch {
      return unreadable(
        encoding === 'utf-8'
          ? `This file is no text: byte ${before + firstFault(piece)} is no UTF-8. It is damaged, of another kind, or in an encoding that it does not name.`
          : `This file is damaged: its text, in UTF-16, cannot be read near byte ${before}.`,
      );
    }
  };
  for await (const piece of pieces) {
    let next: Uint8Array = piece;
    if (encoding === null) {
      // The declaration may be cut by the pieces: it is waited for.
      const joined = new Uint8Array(start.length + piece.length);
      joined.set(start);
      joined.set(piece, start.length);
      start = joined;
      if (start.length < 200) continue;
      encoding = encodingOf(start);
      next = start;
    }
    yield decode(next, true);
    before += next.length;
  }
  if (encoding === null) {
    encoding = encodingOf(start);
    yield decode(start, true);
    before += start.length;
  }
  yield decode(new Uint8Array(0), false);
}
