import { formatFraction, toFraction } from '../../exact/fraction';

export type CatalogueFamily =
  | 'clapping pattern'
  | 'classical foot'
  | 'classical metre'
  | 'deçî-tâla'
  | 'Euclidean rhythm'
  | 'Fibonacci rhythm'
  | 'Messiaen’s augmentations'
  | 'proportion canon'
  | 'rhythm of Messiaen'
  | 'resultant'
  | 'talea'
  | 'tiling canon';

/** A published figure. */
export type CatalogueEntry = {
  readonly id: string;
  readonly name: string;
  readonly family: CatalogueFamily;
  /** what 1 of the source is here, in whole notes */
  readonly unit: string;
  /** rhythm text, in whole notes */
  readonly rhythm: string;
  /** where it is printed; “from memory” and “recomputed” where it was not seen in print */
  readonly source: string;
};

/** Without accents and in small letters, so that it is found however it is typed. */
export const plain = (text: string): string =>
  text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase();

const slug = (text: string): string => plain(text).replace(/[^a-z0-9]+/g, '-').replace(/^-|-$/g, '');

/** Values counted in units, rests in brackets, as rhythm text. */
const inWholes = (values: string, unit: string): string =>
  values
    .split(' ')
    .map((value) => value.replace(/[^()]+/, (count) => formatFraction(toFraction(count).mul(toFraction(unit)))))
    .join(' ');

type Common = Pick<CatalogueEntry, 'family' | 'unit' | 'source'>;
export type Row = readonly [name: string, values: string, source?: string];

/** Figures of one family; a row may have a source of its own. */
export const figures = ({ family, unit, source }: Common, rows: readonly Row[]): CatalogueEntry[] =>
  rows.map(([name, values, own]) => ({
    id: `${slug(family)}-${slug(name)}`,
    name,
    family,
    unit,
    rhythm: inWholes(values, unit),
    source: own ?? source,
  }));
