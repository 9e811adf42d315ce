import type { PrintScore } from '@/engine';
import type { Column } from '@/lib/engraving/columns';
import type { SystemRows } from '@/lib/engraving/system-rows';

/** What the screen draws: all that is printed. */
export type DrawnScore = PrintScore;

/** One line of the page: so many measures of so many staves. */
export type SystemSpec = {
  /** place of its first measure among those that are printed */
  readonly first: number;
  /** one past the last */
  readonly end: number;
  readonly columns: readonly Column[];
  /** CSS pixels, one for each measure, the opening of the system included in the first */
  readonly widths: readonly number[];
  readonly rows: SystemRows;
};
