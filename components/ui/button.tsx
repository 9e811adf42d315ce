import type { ButtonHTMLAttributes } from 'react';

const BASE = 'rounded border border-ink px-4 py-2 font-[550] leading-tight disabled:border-hair disabled:text-soft';
const KINDS = { plain: 'hover:bg-wash', strong: 'bg-ink text-paper hover:opacity-85' };

export type ButtonKind = keyof typeof KINDS;
export const buttonClass = (kind: ButtonKind = 'plain'): string => `${BASE} ${KINDS[kind]}`;

export function Button({ kind = 'plain', className = '', ...rest }: ButtonHTMLAttributes<HTMLButtonElement> & { kind?: ButtonKind }) {
  return <button type="button" className={`${buttonClass(kind)} ${className}`} {...rest} />;
}

/** A word that acts: underlined, no box. */
export function TextButton({ className = '', ...rest }: ButtonHTMLAttributes<HTMLButtonElement>) {
  return (
    <button
      type="button"
      className={`underline decoration-1 underline-offset-[3px] hover:decoration-2 disabled:text-soft disabled:no-underline ${className}`}
      {...rest}
    />
  );
}
