import { VULGAR } from './typed-number';

/**
 * Rhythm text as people type or paste it, as the engine reads it: ½ for 1/2, commas, semicolons, tabs or line ends between
 * values, a typographer's fraction line, spaces about it. What is right already stays as it is.
 */
export function tidyRhythm(text: string): string {
  return text
    .replace(/[\u00a0\u2000-\u200b\u202f]/g, ' ')
    .replace(/[½⅓⅔¼¾⅕⅖⅗⅘⅙⅚⅐⅛⅜⅝⅞⅑⅒]/g, (sign) => VULGAR[sign]!)
    .replace(/[⁄∕]/g, '/')
    .replace(/(\d)\s*\/\s*(?=\d)/g, '$1/')
    .replace(/(\d),(?=\d)/g, '$1.')
    .replace(/[,;](?=\s|$)/g, ' ')
    .replace(/;/g, ' ');
}
