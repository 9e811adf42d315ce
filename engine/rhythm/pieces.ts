/** One value, rest, repeat bracket or bar line, with its place in the text. */
export type Piece = {
  readonly kind: 'value' | 'rest' | 'open' | 'close' | 'bar';
  readonly text: string;
  readonly offset: number;
  /** whether it touches the value before it, without a space, bar line or bracket between */
  readonly touches: boolean;
};

const SPACE = /\s+/y;
/** A rest, with whatever touches it. */
const REST = /\([^()[\]]*\)[^\s|[\]]*/y;
const OPEN_REST = /\([^\s|()[\]]*/y;
/**
 * A value runs to white space or a bracket; `+`, also with a bar line after it, joins what follows to the same value. No two
 * parts of the pattern can take the same white space, so that it never looks at a character twice as the text grows.
 */
const VALUE = /[^\s|[\]()+]+(?:\s*\+(?:\s*\|)?\s*[^\s|[\]()+]+)*\+?/y;
const CLOSE = /\](?:\s*[x×][^\s|[\]()]*)?/y;

function match(pattern: RegExp, text: string, at: number): string | undefined {
  pattern.lastIndex = at;
  return pattern.exec(text)?.[0];
}

/** Cuts rhythm text into pieces, each read when it is asked for. */
export function* pieces(text: string): Generator<Piece> {
  let touches = false;
  for (let at = 0; at < text.length; ) {
    const space = match(SPACE, text, at);
    if (space !== undefined) {
      at += space.length;
      touches = false;
      continue;
    }
    const piece = readPiece(text, at, touches);
    yield piece;
    touches = piece.kind === 'value' || piece.kind === 'rest';
    at += piece.text.length;
  }
}

function readPiece(text: string, offset: number, touches: boolean): Piece {
  const char = text[offset]!;
  const of = (kind: Piece['kind'], piece: string): Piece => ({ kind, text: piece, offset, touches });
  if (char === '|') return of('bar', char);
  if (char === '[') return of('open', char);
  if (char === ']') return of('close', match(CLOSE, text, offset) ?? char);
  if (char === '(') return of('rest', match(REST, text, offset) ?? match(OPEN_REST, text, offset) ?? char);
  return of('value', match(VALUE, text, offset) ?? char);
}
