'use client';

import { type ReactNode, type RefObject, useRef } from 'react';
import { useWidth } from '../study/use-width';
import type { SystemDrawing } from './draw';
import type { DrawnScore, SystemSpec } from './spec';
import { System } from './system';
import { useSystems } from './use-systems';

const NONE: ReadonlyMap<number, number> = new Map();

/** Music broken into systems that fill the width it is given. */
export function ScoreLines({
  score,
  hideSilent = false,
  names = true,
  words = NONE,
  scroller,
  onDrawn,
  children,
}: {
  score: DrawnScore;
  hideSilent?: boolean;
  names?: boolean;
  /** how many letters are said over a measure, by its index */
  words?: ReadonlyMap<number, number>;
  /** the element that scrolls, where it is not the page */
  scroller?: RefObject<HTMLElement | null>;
  onDrawn?: (spec: SystemSpec, drawing: SystemDrawing | null, host: HTMLDivElement) => void;
  /** what stands over a system, e.g. measure numbers */
  children?: (spec: SystemSpec, drawing: SystemDrawing | null) => ReactNode;
}) {
  const frame = useRef<HTMLDivElement>(null);
  const width = useWidth(frame);
  const labels = !names || width < 720 ? 0 : 108;
  const systems = useSystems(score, width === 0 ? 0 : width - labels - 2, { hideSilent, namesBeneath: names && labels === 0, words });
  return (
    <div ref={frame}>
      {systems.map((spec) => (
        <System
          key={spec.first}
          score={score}
          spec={spec}
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
