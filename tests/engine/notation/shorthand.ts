import { type MetrePlan, type NotationMeasure, type NotationSymbol, parseRhythm, spellLine } from '@/engine';

/** Letters of the bases: breve, whole, half, quarter, eighth, sixteenth, 32nd, 64th, 128th, 256th. */
const LETTERS: Readonly<Record<NotationSymbol['base'], string>> = {
  '2': 'b', '1': 'w', '1/2': 'h', '1/4': 'q', '1/8': 'e', '1/16': 's', '1/32': 't', '1/64': 'x', '1/128': 'y', '1/256': 'z',
};

const BEAMS = { begin: '[', continue: '-', end: ']', 'forward hook': '>', 'backward hook': '<' } as const;

function letter(symbol: NotationSymbol): string {
  const name = LETTERS[symbol.base] + '.'.repeat(symbol.dots);
  return symbol.rest ? `(${name})` : name + (symbol.tiedOn ? '~' : '');
}

const inMeasure = (measure: NotationMeasure): string =>
  measure.symbols
    .map((symbol) => {
      const opens = symbol.tuplets.filter(({ starts }) => starts).map(({ actual, normal }) => `${actual}:${normal}{`).join('');
      return opens + letter(symbol) + symbol.tuplets.filter(({ stops }) => stops).map(() => '}').join('');
    })
    .join(' ');

/**
 * Measures as one line of text: letters for values, `.` a dot, `(q)` a rest, `~` a tie to the next symbol, `3:2{ … }` a
 * bracket, ` | ` a bar line.
 */
export const shorthand = (measures: readonly NotationMeasure[]): string => measures.map(inMeasure).join(' | ');

/** Beams, each level of a symbol one mark: `[` begin, `-` continue, `]` end, `>` and `<` hooks, `.` no beam. */
export const beamText = (measures: readonly NotationMeasure[]): string =>
  measures.map(({ symbols }) => symbols.map(({ beams }) => beams.map((mark) => BEAMS[mark]).join('') || '.').join(' ')).join(' | ');

export const spelled = (rhythm: string, metre: MetrePlan): string => shorthand(spellLine(parseRhythm(rhythm), metre));

export const beamed = (rhythm: string, metre: MetrePlan): string => beamText(spellLine(parseRhythm(rhythm), metre));
