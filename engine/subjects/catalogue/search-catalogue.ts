import { formatFraction } from '../../exact/fraction';
import { parseRhythm } from '../../rhythm/parse';
import { CATALOGUE } from './catalogue';
import { type CatalogueEntry, plain } from './figure';

export type CatalogueQuery = {
  /** beginnings of words that all stand in the name or family; accents and capitals do not matter */
  readonly words?: string;
  readonly attacks?: number;
  /** whether the order of values is the same both ways; one value over and over counts as such */
  readonly palindrome?: boolean;
};

type Facts = { readonly words: readonly string[]; readonly attacks: number; readonly palindrome: boolean };

const wordsOf = (text: string): string[] => plain(text).split(/[^\p{L}\p{N}]+/u).filter(Boolean);

function factsOf(entry: CatalogueEntry): Facts {
  const rhythm = parseRhythm(entry.rhythm);
  const values = rhythm.map((value) => `${formatFraction(value.length)}${value.rest ? ' rest' : ''}`);
  return {
    words: wordsOf(`${entry.name} ${entry.family}`),
    attacks: rhythm.filter((value) => !value.rest).length,
    palindrome: values.every((value, k) => value === values[values.length - 1 - k]),
  };
}

let known: readonly (readonly [CatalogueEntry, Facts])[] | null = null;

/**
 * The published figures that meet a query, in the order of the catalogue; all of them for an empty one.
 * @example searchCatalogue({ words: 'tresillo' }) // one figure: 3/8 3/8 1/4
 */
export function searchCatalogue(query: CatalogueQuery): CatalogueEntry[] {
  known ??= CATALOGUE.map((entry) => [entry, factsOf(entry)] as const);
  const words = wordsOf(query.words ?? '');
  return known
    .filter(
      ([, facts]) =>
        words.every((word) => facts.words.some((one) => one.startsWith(word))) &&
        (query.attacks === undefined || facts.attacks === query.attacks) &&
        (query.palindrome === undefined || facts.palindrome === query.palindrome),
    )
    .map(([entry]) => entry);
}
