'use client';

import { type InputHTMLAttributes, useId } from 'react';
import { useReady } from './use-ready';

/** A text field with its name above, and beneath it what is wrong, or else a hint. */
export function Field({ label, hint, error, className = '', ...input }: InputHTMLAttributes<HTMLInputElement> & { label: string; hint?: string | undefined; error?: string | undefined }) {
  const id = useId();
  const isReady = useReady();
  const below = error ? `${id}-error` : hint ? `${id}-hint` : undefined;
  return (
    <div className={className}>
      <label htmlFor={id}>{label}</label>
      <input
        id={id}
        readOnly={!isReady}
        aria-invalid={error !== undefined}
        aria-describedby={below}
        className="mt-1 block w-full rounded border border-hair bg-paper px-3 py-2 aria-invalid:border-mark"
        {...input}
      />
      {error ? (
        <p id={below} role="alert" className="mt-1.5 text-[13.5px] text-mark">
          {error}
        </p>
      ) : (
        hint && (
          <p id={below} className="mt-1.5 text-[13px] text-soft">
            {hint}
          </p>
        )
      )}
    </div>
  );
}
