import 'server-only';
import type { ExportOptions } from '@/db/schema';
import { STAFF_SIZES } from '../../engraving/page-options';

type Page = NonNullable<ExportOptions['page']>;
type Wanted = Omit<Page, 'staff'> & { readonly staff?: number | undefined };

/** A print with nothing left open: staves of a score are smaller than those of a part, unless somebody chose. */
export const exportOptions = (what: ExportOptions['what'], { paper, orientation, staff }: Wanted, player?: string): ExportOptions => ({
  what,
  as: 'pdf',
  ...(player !== undefined && { player }),
  page: { paper, orientation, staff: staff ?? (what === 'score' ? STAFF_SIZES.score : STAFF_SIZES.part) },
});

const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' });

/** What stands at the foot of each page, so that two printings can be told apart. */
export const stampOf = ({ version, madeAt }: { readonly version: number | null; readonly madeAt: Date }): string =>
  `${version === null ? 'Not saved' : `Version ${version}`}, ${day.format(madeAt)}`;
