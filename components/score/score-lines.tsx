'use client';

import { type ReactNode, type RefObject, useMemo, useRef } from 'react';
import { useWidth } from '../study/use-width';
import type { SystemDrawing } from './draw';
import { STAFF_PITCH, breakSystems, signatureOf } from './layout';
import type { DrawnScore, SystemSpec } from './spec';
import { System } from './system';

/** Music broken into systems that fill the width it is given. */
export function ScoreLines({
  score,
  hideSilent = false,
  names = true,
  scroller,
  onDrawn,
  children,
}: {
  score: DrawnScore;
  hideSilent?: boolean;
  names?: boolean;
  /** the element that scrolls, where it is not the page */
  scroller?: RefObject<HTMLElement | null>;
  onDrawn?: (spec: SystemSpec, drawing: SystemDrawing | null, host: HTMLDivElement) => void;
  /** what stands over a system, e.g. measure numbers */
  children?: (spec: SystemSpec, drawing: SystemDrawing | null) => ReactNode;
}) {
  const frame = useRef<HTMLDivElement>(null);
  const width = useWidth(frame);
  const labels = !names || width < 720 ? 0 : 108;
  const systems = useMemo(
    () => (width === 0 ? [] : breakSystems(score, width - labels - 2, { hideSilent, pitch: names && labels === 0 ? STAFF_PITCH.beneath : STAFF_PITCH.beside })),
    [score, width, labels, hideSilent, names],
  );
  return (
    <div ref={frame}>
      {systems.map((spec) => (
        <System
          key={spec.first}
          score={score}
          spec={spec}
          signature={signatureOf(spec, score)}
          labels={labels}
          names={names}
          {...(scroller ? { scroller } : {})}
          {...(onDrawn ? { onDrawn: (drawing, host) => onDrawn(spec, drawing, host) } : {})}
        >
          {children ? (drawing) => children(spec, drawing) : undefined}
        </System>
      ))}
    </div>
  );
}
