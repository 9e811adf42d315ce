import { EngineError, type Fraction, proportionOf, toFraction } from '@/engine';

/** Fractions that are one character. */
export const VULGAR: Readonly<Record<string, string>> = {
  '½': '1/2', '⅓': '1/3', '⅔': '2/3', '¼': '1/4', '¾': '3/4', '⅕': '1/5', '⅖': '2/5', '⅗': '3/5', '⅘': '4/5', '⅙': '1/6', '⅚': '5/6', '⅐': '1/7', '⅛': '1/8', '⅜': '3/8', '⅝': '5/8', '⅞': '7/8', '⅑': '1/9', '⅒': '1/10',
};
/** Words that people write after a number, and that say nothing more here. */
const UNITS = /(?:\b(?:measures?|bars?|beats?|times|whole notes?|bpm)\b|×)\.?/giu;

/** What people type or paste for a number, as the engine reads it: 7½, 1,5, 3 : 2, 150 %. */
function tidy(text: string): string {
  return text
    .replace(/[\u00a0\u2000-\u200b\u202f]/g, ' ')
    .replace(/[½⅓⅔¼¾⅕⅖⅗⅘⅙⅚⅐⅛⅜⅝⅞⅑⅒]/g, (sign) => ` ${VULGAR[sign]!}`)
    .replace(/[⁄∕÷:]/g, '/')
    .replace(UNITS, ' ')
    .replace(/\s*\/\s*/g, '/')
    .replace(/\s+%/g, '%')
    .replace(/\s+/g, ' ')
    .trim();
}

const HINT = 'Write a number such as 3, 3/2, 1 1/2, 1.5 or 150%.';

/** One number, or the old name of a proportion: sesquialtera is 3/2. @throws EngineError with a sentence that says what to type */
export function readNumber(text: string): Fraction {
  const tidied = tidy(text);
  if (tidied === '') throw new EngineError('invalid_fraction', `Nothing is written here. ${HINT}`);
  const named = proportionOf(tidied);
  if (named) return named;
  // A comma is a decimal point where it stands alone between digits.
  const decimal = tidied.replace(/^([+\-−]?\d+),(\d+)(%?)$/, '$1.$2$3');
  try {
    return toFraction(decimal);
  } catch (error) {
    if (!(error instanceof EngineError) || /divides by zero|too large/.test(error.message)) throw error;
    throw new EngineError('invalid_fraction', `“${text.trim().slice(0, 40)}” is no number. ${HINT}`);
  }
}

/**
 * The items of a list as people type it: apart by semicolons, line ends or tabs, or by commas and “and” where there are none of
 * these: then a comma is no decimal point. What is pasted from a spreadsheet comes in lines and tabs.
 */
export function splitList(text: string): string[] {
  const spread = text.trim().replace(/\s+and\s+/gi, ', ');
  const hasStrong = /[;\n\t]/.test(spread);
  const separated = spread.split(hasStrong ? /[;\n\t]+/ : /,\s*/);
  // Numbers with spaces alone between them, none of which is a mixed number.
  const isSpaced = separated.length === 1 && !/(?:^|[^\d/.])\d+\s+\d+\s*\//.test(spread) && /^[\d.,/%\s-]+$/.test(spread) && /\d\s+[\d.]/.test(spread);
  return (isSpaced ? spread.split(/\s+(?![/%])(?<!\/\s*)/) : separated).map((part) => part.trim()).filter((part) => part !== '');
}

/** Several numbers. @throws EngineError with a sentence that says what to type */
export function readNumbers(text: string): Fraction[] {
  const given = splitList(text);
  if (given.length === 0) throw new EngineError('invalid_fraction', 'Nothing is written here. Write numbers with commas between, such as 4, 6, 9.');
  return given.map(readNumber);
}
