import type { ReactNode } from 'react';

/** The heading of a page; `children` stand at its right. */
export function PageHeading({ text, children }: { text: string; children?: ReactNode }) {
  return (
    <div className="flex flex-wrap items-end justify-between gap-4">
      <h1 className="text-[40px] font-[560] leading-none tracking-[-0.02em] [font-stretch:112%]">{text}</h1>
      {children}
    </div>
  );
}
