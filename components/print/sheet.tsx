'use client';

import { useEffect, useRef } from 'react';
import type { PrintScore } from '@/engine';
import { drawPage } from '@/lib/engraving/draw-page';
import type { VexFlow } from '@/lib/engraving/notes';
import type { PageOptions } from '@/lib/engraving/page-options';
import type { Layout, Page } from '@/lib/engraving/pages';

/** One page of paper, drawn once. */
export function Sheet({ vexflow, score, layout, page, options, onDrawn }: { vexflow: VexFlow; score: PrintScore; layout: Layout; page: Page; options: PageOptions; onDrawn: () => void }) {
  const host = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const element = host.current;
    if (!element) return;
    element.replaceChildren();
    drawPage(vexflow, element, score, layout, page, options);
    element.querySelector('svg')?.setAttribute('aria-hidden', 'true');
    onDrawn();
  }, [vexflow, score, layout, page, options, onDrawn]);
  const { width, height } = layout.geometry.paper;
  return (
    <li aria-label={`Page ${page.number}`} className="sheet mx-auto mb-8 max-w-full border border-hair print:m-0 print:border-0" style={{ background: '#fff', color: '#000', width: `${width}pt`, aspectRatio: `${width} / ${height}` }}>
      <div ref={host} className="staff-drawing [&_svg]:h-auto [&_svg]:w-full" />
    </li>
  );
}
