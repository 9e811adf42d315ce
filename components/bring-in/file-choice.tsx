'use client';

import { type ChangeEvent, useRef } from 'react';
import { TextButton } from '../ui/button';

/** A word that opens the file dialogue. */
export function FileChoice({ text, accept, className = '', onFile }: { text: string; accept: string; className?: string; onFile: (file: File) => void }) {
  const input = useRef<HTMLInputElement>(null);
  const choose = (event: ChangeEvent<HTMLInputElement>) => {
    const file = event.target.files?.[0];
    // The same file, mended, can be chosen again.
    event.target.value = '';
    if (file) onFile(file);
  };
  return (
    <>
      <TextButton className={className} onClick={() => input.current?.click()}>
        {text}
      </TextButton>
      <input ref={input} type="file" hidden accept={accept} onChange={choose} />
    </>
  );
}

/** The banner while a file is held over the page. */
export const DropBanner = ({ text }: { text: string }) => (
  <p aria-hidden className="pointer-events-none fixed inset-x-0 top-0 z-50 border-b-2 border-ink bg-paper px-5 py-4 text-center text-[17px] font-semibold">
    {text}
  </p>
);
