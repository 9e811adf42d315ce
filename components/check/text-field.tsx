'use client';

import { useId, useMemo } from 'react';
import type { Metre } from '@/engine';
import { Marked, faultOf } from '../study/rhythm-fault';
import { RhythmStaff } from '../study/rhythm-staff';

/**
 * Rhythm text with its staff, on a page that keeps no study.
 * @param props.lit - attack numbers that stand out on the staff
 */
export function TextField({ label, value, metre, hint, onChange }: { label: string; value: string; metre: Metre; hint?: string; onChange: (text: string) => void }) {
  const id = useId();
  const fault = useMemo(() => (value.trim() === '' ? null : faultOf(value)), [value]);
  const below = fault ? `${id}-fault` : hint ? `${id}-hint` : undefined;
  return (
    <div className="min-w-0">
      <label htmlFor={id} className="mb-1 block text-[15px] font-semibold">
        {label}
      </label>
      <textarea
        id={id}
        value={value}
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
          <Marked text={value} fault={fault} />
          {fault.message}
        </div>
      ) : (
        hint && (
          <p id={below} className="mt-1 text-[13px] text-soft">
            {hint}
          </p>
        )
      )}
      {fault === null && value.trim() !== '' && <RhythmStaff text={value} metre={metre} />}
    </div>
  );
}
