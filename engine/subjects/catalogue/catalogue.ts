import { CLASSICAL } from './classical';
import { DECI_TALAS } from './deci-talas';
import { EUCLIDEAN } from './euclidean';
import { type CatalogueEntry, figures } from './figure';
import { MESSIAEN } from './messiaen';
import { OTHERS } from './others';
import { RESULTANTS } from './resultants';

const TABLE = 'Sharngadeva’s table, as in the data of L. Poeppel, decitala (MIT), corpora/Decitalas';

/** Published figures, each with its source. */
export const CATALOGUE: readonly CatalogueEntry[] = [
  ...EUCLIDEAN,
  ...figures(
    { family: 'deçî-tâla', unit: '1/16', source: TABLE },
    DECI_TALAS.map(([file, values]) => [file.replaceAll('_', ' '), values, `${TABLE}/${file}.xml`] as const),
  ),
  ...MESSIAEN,
  ...CLASSICAL,
  ...RESULTANTS,
  ...OTHERS,
];
