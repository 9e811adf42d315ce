'use client';

import { useId, useMemo, useState } from 'react';
import { type Metre, parseRhythm } from '@/engine';
import { tidyRhythm } from '@/lib/client/typed-rhythm';
import { Marked, faultOf } from '../study/rhythm-fault';
import { RhythmStaff } from '../study/rhythm-staff';
import { TextButton } from '../ui/button';
import { useReady } from '../ui/use-ready';
import { FromFile } from './from-file';
import { StaffPad } from './staff-pad';

/**
 * Rhythm text with its staff, on a page that keeps no study; it can be written on the staff too. Both are one rhythm.
 * @param props.wrong - numbers of attacks that stand out on the staff
 */
export function TextField({ label, value, metre, hint, wrong, onChange }: { label: string; value: string; metre: Metre; hint?: string; wrong?: ReadonlySet<number>; onChange: (text: string) => void }) {
  const id = useId();
  const isReady = useReady();
  const [isOnStaff, setOnStaff] = useState(false);
  const read = tidyRhythm(value);
  const fault = useMemo(() => (read.trim() === '' ? null : faultOf(read)), [read]);
  const rhythm = useMemo(() => (fault ? null : read.trim() === '' ? [] : parseRhythm(read)), [read, fault]);
  const below = fault ? `${id}-fault` : hint ? `${id}-hint` : undefined;
  return (
    <div className="min-w-0">
      <label htmlFor={id} className="mb-1 block text-[15px] font-semibold">
        {label}
      </label>
      <textarea
        id={id}
        value={value}
        readOnly={!isReady}
        rows={Math.min(5, Math.max(1, Math.ceil(value.length / 90)))}
        spellCheck={false}
        autoComplete="off"
        autoCapitalize="off"
        aria-invalid={fault !== null}
        aria-describedby={below}
        onChange={(event) => onChange(event.target.value)}
        className="block w-full rounded border border-ink bg-paper px-3 py-2.5 font-mono text-[14.5px] leading-relaxed aria-invalid:border-mark"
      />
      {fault ? (
        <div id={below} role="alert" className="mt-1.5 text-[14px] text-mark">
          <Marked text={read} fault={fault} />
          {fault.message}
        </div>
      ) : (
        hint && (
          <p id={below} className="mt-1 text-[13px] text-soft">
            {hint}
          </p>
        )
      )}
      {rhythm !== null && !isOnStaff && value.trim() !== '' && <RhythmStaff text={read} metre={metre} wrong={wrong} />}
      {rhythm !== null && isOnStaff && <StaffPad name={label} rhythm={rhythm} metre={metre} onChange={onChange} />}
      <div className="mt-1 flex flex-wrap items-baseline gap-x-5 gap-y-1">
        {rhythm !== null && (
          <TextButton className="text-[13.5px]" aria-expanded={isOnStaff} aria-label={`${isOnStaff ? 'Leave the staff' : 'Write on the staff'}: ${label}`} onClick={() => setOnStaff(!isOnStaff)}>
            {isOnStaff ? 'Leave the staff' : 'Write on the staff'}
          </TextButton>
        )}
        <FromFile name={label} onRhythm={onChange} />
      </div>
    </div>
  );
}
