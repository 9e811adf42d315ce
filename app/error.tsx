'use client';

import { Button } from '@/components/ui/button';

/** What is shown where a page breaks. What was changed is kept in the browser. */
export default function PageError({ reset }: { error: Error; reset: () => void }) {
  return (
    <main className="mx-auto max-w-[62ch] px-5 py-16 text-[17px] leading-relaxed">
      <h1 className="text-[34px] font-[560] leading-tight [font-stretch:112%]">This page broke</h1>
      <p className="mt-4">What you changed is kept in this browser. Open the page again; if it breaks again, undo the last change elsewhere or start anew.</p>
      <Button className="mt-5" onClick={reset}>
        Open it again
      </Button>
    </main>
  );
}
