'use client';

import { useId, useMemo } from 'react';
import type { Metre } from '@/engine';
import { Marked, faultOf } from './rhythm-fault';
import { RhythmStaff } from './rhythm-staff';
import { useStudy } from './context';

/**
 * Rhythm text with its staff, drawn as one types. A text that cannot be read stays in the field, is marked at its place,
 * and changes nothing else until it can.
 */
export function RhythmField({
  field,
  label,
  value,
  metre,
  instrument,
  onTry,
}: {
  /** key under which an unfinished text is kept */
  field: string;
  label: string;
  value: string;
  metre: Metre;
  /** for the staff: an instrument of several sounds gets a line for each */
  instrument?: string;
  /** @returns null, or why the study refuses the text */
  onTry: (text: string) => string | null;
}) {
  const { editor, state } = useStudy();
  const id = useId();
  const text = state.texts[field] ?? value;
  const fault = useMemo(() => faultOf(text, metre), [text, metre]);
  const refused = state.texts[`${field}.refused`];
  const shown = text === value ? null : (fault ?? (refused ? { message: refused, offset: 0, length: 0 } : null));

  const change = (next: string) => {
    if (faultOf(next, metre) !== null) {
      editor.type(`${field}.refused`, null);
      editor.type(field, next);
      return;
    }
    const answer = onTry(next);
    editor.type(`${field}.refused`, answer);
    editor.type(field, answer === null ? null : next);
  };

  return (
    <div>
      <label htmlFor={id} className="mb-1 block text-[13px] text-soft">
        {label}
      </label>
      <textarea
        id={id}
        value={text}
        rows={Math.min(6, Math.max(2, Math.ceil(text.length / 52)))}
        spellCheck={false}
        autoComplete="off"
        autoCapitalize="off"
        aria-invalid={shown !== null}
        aria-describedby={shown ? `${id}-fault` : undefined}
        onChange={(event) => change(event.target.value)}
        className="block w-full rounded border border-hair bg-paper px-3 py-2 font-mono text-[14px] leading-relaxed aria-invalid:border-mark"
      />
      {shown && (
        <div id={`${id}-fault`} role="alert" className="mt-2 text-[14px] text-mark">
          {shown.length > 0 && <Marked text={text} fault={shown} />}
          {shown.message}
          <span className="text-soft"> The study stays as it was until this can be read.</span>
        </div>
      )}
      <RhythmStaff text={fault === null ? text : value} metre={metre} sounds={state.study.instruments.find((one) => one.id === instrument)?.sounds} />
    </div>
  );
}
