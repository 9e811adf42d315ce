'use client';

import { type FormEvent, useId, useState } from 'react';
import { Button } from './button';

/** A text that is tried when it is sent: the answer is null, or a sentence that is shown under it and read out. */
export function TryField({
  label,
  initial,
  hint,
  action = 'Set',
  wide = false,
  onTry,
  onDone,
}: {
  label: string;
  initial: string;
  hint?: string;
  action?: string;
  wide?: boolean;
  onTry: (text: string) => string | null | Promise<string | null>;
  onDone: () => void;
}) {
  const [text, setText] = useState(initial);
  const [error, setError] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const id = useId();
  const settle = (answer: string | null) => {
    setError(answer);
    if (answer === null) onDone();
  };
  const send = (event: FormEvent) => {
    event.preventDefault();
    const answer = onTry(text);
    if (!(answer instanceof Promise)) return settle(answer);
    setBusy(true);
    void answer.then((late) => {
      setBusy(false);
      settle(late);
    });
  };
  return (
    <form onSubmit={send} className="block">
      <label htmlFor={id} className="mb-1 block text-[13px] text-soft">
        {label}
      </label>
      <span className="flex gap-2">
        <input
          id={id}
          value={text}
          autoComplete="off"
          spellCheck={false}
          aria-invalid={error !== null}
          aria-describedby={error ? `${id}-error` : hint ? `${id}-hint` : undefined}
          onChange={(event) => {
            setText(event.target.value);
            setError(null);
          }}
          className={`min-w-0 rounded border border-hair bg-paper px-2.5 py-1.5 aria-invalid:border-mark ${wide ? 'w-64' : 'w-40'}`}
        />
        <Button type="submit" className="px-3! py-1.5!" disabled={isBusy}>
          {action}
        </Button>
      </span>
      {error ? (
        <span id={`${id}-error`} role="alert" className="mt-2 block max-w-72 text-[13.5px] text-mark">
          {error}
        </span>
      ) : (
        hint && (
          <span id={`${id}-hint`} className="mt-2 block max-w-72 text-[13px] text-soft">
            {hint}
          </span>
        )
      )}
    </form>
  );
}
