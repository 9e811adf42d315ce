'use client';

import { useState } from 'react';

/** A sentence under a control that says why a change was refused. */
export function Refusal({ text }: { text: string | null }) {
  return text === null ? null : (
    <span role="alert" className="mt-2 block max-w-72 text-[13.5px] text-mark">
      {text}
    </span>
  );
}

/** One of a few, as radio buttons: changes at once, stays open so that the effect can be compared. */
export function Choices<T extends string>({ name, value, options, onTry }: {
  name: string;
  value: T;
  options: readonly (readonly [T, string])[];
  onTry: (value: T) => string | null;
}) {
  const [error, setError] = useState<string | null>(null);
  return (
    <fieldset>
      <legend className="sr-only">{name}</legend>
      {options.map(([option, text]) => (
        <label key={option} className="flex cursor-pointer items-baseline gap-2.5 py-1">
          <input type="radio" name={name} checked={option === value} onChange={() => setError(onTry(option))} className="accent-ink" />
          {text}
        </label>
      ))}
      <Refusal text={error} />
    </fieldset>
  );
}
