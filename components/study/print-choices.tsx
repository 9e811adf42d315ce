'use client';

import { STAFF_SIZES } from '@/lib/engraving/page-options';
import { Segments } from '../ui/segments';

export type PrintChoices = {
  readonly paper: 'a4' | 'letter';
  readonly orientation: 'portrait' | 'landscape';
  /** millimetres; undefined for the usual size of a score, and of a part */
  readonly staff: number | undefined;
};

const SIZES = Array.from({ length: (STAFF_SIZES.most - STAFF_SIZES.least) * 2 + 1 }, (_, n) => STAFF_SIZES.least + n / 2);

/** Paper, how it lies, and how tall staves are. */
export function PrintChoicesFields({ choices, onChange }: { choices: PrintChoices; onChange: (next: PrintChoices) => void }) {
  return (
    <div className="mb-2 flex flex-wrap items-center gap-x-4 gap-y-2">
      <Segments label="Paper" value={choices.paper} options={[['a4', 'A4'], ['letter', 'Letter']]} onChange={(paper) => onChange({ ...choices, paper })} />
      <Segments
        label="How the paper lies"
        value={choices.orientation}
        options={[['portrait', 'Portrait'], ['landscape', 'Landscape']]}
        onChange={(orientation) => onChange({ ...choices, orientation })}
      />
      <label className="flex items-center gap-2 text-[13.5px]">
        <span className="text-soft">Staff</span>
        <select
          value={choices.staff ?? ''}
          onChange={(event) => onChange({ ...choices, staff: event.target.value === '' ? undefined : Number(event.target.value) })}
          className="rounded border border-hair bg-paper px-2 py-1.5"
        >
          <option value="">usual</option>
          {SIZES.map((size) => (
            <option key={size} value={size}>
              {`${size} mm`}
            </option>
          ))}
        </select>
      </label>
    </div>
  );
}
