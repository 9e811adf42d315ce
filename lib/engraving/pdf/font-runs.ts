import { MUSIC, OTHER_TEXT, TEXT, TEXT_BOLD } from './fonts';

/** Whether a face has a character, by its code point. */
export type Coverage = (face: string, codePoint: number) => boolean;

/** SMuFL keeps to the private use area of the basic plane (SMuFL 1.4, “Code points”). */
const isMusic = (codePoint: number): boolean => codePoint >= 0xe000 && codePoint <= 0xf8ff;

function faceOf(codePoint: number, isBold: boolean, before: string | undefined, has: Coverage): string {
  if (isMusic(codePoint)) return MUSIC;
  const faces = [isBold ? TEXT_BOLD : TEXT, TEXT, ...OTHER_TEXT];
  // A space or a mark goes on in the face that it stands in.
  if (before !== undefined && before !== MUSIC && /[\s\p{M}\p{P}]/u.test(String.fromCodePoint(codePoint)) && has(before, codePoint)) return before;
  return faces.find((face) => has(face, codePoint)) ?? faces[0]!;
}

/** What stands for a character that no face has: a gap would not be noticed. */
const UNKNOWN = '?';

/** A letter and its accents as the one character that faces have; musical symbols must not be composed. */
const composed = (text: string): string => text.replaceAll(/\p{L}\p{M}+/gu, (one) => one.normalize('NFC'));

/** A text in pieces that one face each can draw. */
export function fontRuns(text: string, isBold: boolean, has: Coverage): { readonly face: string; readonly text: string }[] {
  const runs: { face: string; text: string }[] = [];
  for (const asked of composed(text)) {
    const last = runs.at(-1);
    const wanted = faceOf(asked.codePointAt(0)!, isBold, last?.face, has);
    const isKnown = wanted === MUSIC || /\s/.test(asked) || has(wanted, asked.codePointAt(0)!);
    const character = isKnown ? asked : UNKNOWN;
    const face = isKnown ? wanted : faceOf(UNKNOWN.codePointAt(0)!, isBold, last?.face, has);
    if (last?.face === face) last.text += character;
    else runs.push({ face, text: character });
  }
  return runs;
}

const isElement = (node: Node): node is Element => node.nodeType === 1;

function inherited(element: Element, name: string): string | undefined {
  for (let at: Element | null = element; at !== null; at = at.parentElement) {
    const value = (at as SVGElement).style?.getPropertyValue(name) || at.getAttribute(name);
    if (value) return value;
  }
  return undefined;
}

const isHeavy = (weight: string | undefined): boolean => weight === 'bold' || weight === 'bolder' || Number(weight) >= 600;

/** Names one face for each piece of text in a drawing, in place of the lists of families that VexFlow sets. */
export function setFaces(svg: Element, has: Coverage): void {
  for (const text of svg.querySelectorAll('text, tspan')) {
    (text as SVGElement).style?.removeProperty('font-family');
    text.removeAttribute('font-family');
    const isBold = isHeavy(inherited(text, 'font-weight'));
    for (const node of [...text.childNodes]) {
      if (isElement(node)) continue;
      const runs = fontRuns(node.textContent ?? '', isBold, has);
      if (text.childNodes.length === 1 && runs.length < 2) {
        text.setAttribute('font-family', runs[0]?.face ?? TEXT);
        node.textContent = runs[0]?.text ?? '';
        continue;
      }
      node.replaceWith(
        ...runs.map(({ face, text: piece }) => {
          const span = text.ownerDocument.createElementNS('http://www.w3.org/2000/svg', 'tspan');
          span.setAttribute('font-family', face);
          span.textContent = piece;
          return span;
        }),
      );
    }
  }
}
