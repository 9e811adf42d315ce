'use client';

import { useId } from 'react';

/** One of a few, side by side: real radio buttons. */
export function Segments<T extends string>({
  label,
  value,
  options,
  onChange,
}: {
  label: string;
  value: T;
  options: readonly (readonly [value: T, label: string])[];
  onChange: (value: T) => void;
}) {
  const name = useId();
  return (
    <fieldset className="inline-flex rounded border border-hair text-[13.5px]">
      <legend className="sr-only">{label}</legend>
      {options.map(([option, text]) => (
        <label
          key={option}
          className={`relative cursor-pointer px-3 py-1.5 has-[:focus-visible]:outline-2 has-[:focus-visible]:outline-offset-2 has-[:focus-visible]:outline-ink ${
            option === value ? 'bg-ink text-paper' : 'text-soft hover:text-ink'
          }`}
        >
          <input
            type="radio"
            className="absolute inset-0 cursor-pointer opacity-0"
            name={name}
            value={option}
            checked={option === value}
            onChange={() => onChange(option)}
          />
          {text}
        </label>
      ))}
    </fieldset>
  );
}
