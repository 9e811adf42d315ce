'use client';

import { type MouseEvent, useState } from 'react';
import { Fraction, type Metre, type Rhythm, formatFraction, formatRhythm, valueName } from '@/engine';
import { type Stamp, holdOn, insertAt, removeAt, replaceAt } from '@/lib/client/staff-edits';
import { RhythmStaff } from '../study/rhythm-staff';
import { Segments } from '../ui/segments';
import { TextButton } from '../ui/button';

const BASES = ['1', '1/2', '1/4', '1/8', '1/16', '1/32'] as const;
type Base = (typeof BASES)[number];
const TUPLETS = [['1', 'plain'], ['3', 'of three'], ['5', 'of five'], ['7', 'of seven']] as const;
type TupletText = (typeof TUPLETS)[number][0];

/** Entry on the staff: a value is chosen and put in at the place that stands out; a note that is pressed becomes that place. */
export function StaffPad({ name, rhythm, metre, onChange }: { name: string; rhythm: Rhythm; metre: Metre; onChange: (text: string) => void }) {
  const [base, setBase] = useState<Base>('1/4');
  const [tuplet, setTuplet] = useState<TupletText>('1');
  const [isDotted, setDotted] = useState(false);
  const [isRest, setRest] = useState(false);
  const [place, setPlace] = useState<number | null>(null);
  // After the last value until a place is chosen.
  const at = Math.min(place ?? rhythm.length, rhythm.length);
  const stamp: Stamp = { base: new Fraction(base), isDotted, tuplet: Number(tuplet) as Stamp['tuplet'], isRest };
  const put = (next: Rhythm | null, nextPlace: number) => {
    if (next === null) return;
    onChange(next.length === 0 ? '' : formatRhythm(next));
    setPlace(nextPlace >= next.length ? null : nextPlace);
  };
  const onPress = (event: MouseEvent) => {
    const note = (event.target as Element).closest<SVGElement>('[data-origin]');
    if (!note) return;
    let attack = -1;
    const index = rhythm.findIndex(({ rest }) => !rest && (attack += 1) === Number(note.dataset.origin));
    if (index !== -1) setPlace(index);
  };
  const here = rhythm[at];
  const words = here === undefined ? `After the last of ${rhythm.length} values.` : `At value ${at + 1} of ${rhythm.length}: ${here.rest ? 'a rest of ' : ''}${formatFraction(here.length)}.`;
  return (
    <fieldset className="mt-3 border-l border-hair pl-4">
      <legend className="text-[13px] text-soft">{`${name}, on the staff`}</legend>
      <div onClick={onPress} className="cursor-pointer">
        {rhythm.length > 0 && <RhythmStaff text={formatRhythm(rhythm)} metre={metre} />}
      </div>
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2 text-[14px]">
        <Segments label="Value" value={base} options={BASES.map((one) => [one, valueName(new Fraction(one))] as const)} onChange={setBase} />
        <Segments label="Division" value={tuplet} options={TUPLETS} onChange={setTuplet} />
        <label className="flex cursor-pointer items-baseline gap-2">
          <input type="checkbox" checked={isDotted} onChange={(event) => setDotted(event.target.checked)} className="accent-ink" />
          dotted
        </label>
        <label className="flex cursor-pointer items-baseline gap-2">
          <input type="checkbox" checked={isRest} onChange={(event) => setRest(event.target.checked)} className="accent-ink" />
          rest
        </label>
      </div>
      <div className="mt-2.5 flex flex-wrap items-baseline gap-x-5 gap-y-1.5 text-[14px]">
        <TextButton onClick={() => put(insertAt(rhythm, at, stamp), at + 1)}>Put in</TextButton>
        <TextButton disabled={here === undefined} onClick={() => put(replaceAt(rhythm, at, stamp), at + 1)}>
          Put in its place
        </TextButton>
        <TextButton disabled={holdOn(rhythm, at, stamp) === null} onClick={() => put(holdOn(rhythm, at, stamp), at)}>
          Tie to the one before
        </TextButton>
        <TextButton disabled={rhythm.length === 0} onClick={() => put(removeAt(rhythm, here === undefined ? at - 1 : at), here === undefined ? at - 1 : at)}>
          Take away
        </TextButton>
        <TextButton disabled={at === 0} onClick={() => setPlace(at - 1)}>
          One back
        </TextButton>
        <TextButton disabled={here === undefined} onClick={() => setPlace(at + 1 >= rhythm.length ? null : at + 1)}>
          One on
        </TextButton>
        <span role="status" className="text-soft">
          {words}
        </span>
      </div>
    </fieldset>
  );
}
