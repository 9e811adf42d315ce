'use client';

import { type ReactNode, type RefObject, useEffect, useMemo, useRef, useState } from 'react';
import { SYSTEM_MARK } from '@/lib/client/study-editor';
import { type SystemDrawing, drawOnScreen, loadVexFlow } from './draw';
import { signatureOf } from './layout';
import type { DrawnScore, SystemSpec } from './spec';

/** CSS pixels between systems. */
const GAP = 18;

const nameOf = ({ staves }: DrawnScore, staff: number): string => staves[staff]!.instruments.map(({ name }) => name).join(', ');

/** Whether an element is within a screen or so of being seen. */
function useNear(host: RefObject<HTMLElement | null>, scroller: RefObject<HTMLElement | null> | undefined): boolean {
  const [isNear, setNear] = useState(false);
  useEffect(() => {
    const element = host.current;
    if (!element) return;
    const observer = new IntersectionObserver(([entry]) => setNear(entry?.isIntersecting ?? false), {
      root: scroller?.current ?? null,
      rootMargin: '500px 0px',
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, [host, scroller]);
  return isNear;
}

/**
 * One system. It keeps its height always and is drawn only while it is near the screen; a new drawing is made only when
 * what it shows has changed.
 */
export function System({
  score,
  spec,
  labels,
  names,
  scroller,
  onDrawn,
  children,
}: {
  score: DrawnScore;
  spec: SystemSpec;
  /** width of the column of names, 0 where they stand above the staves */
  labels: number;
  names: boolean;
  scroller?: RefObject<HTMLElement | null>;
  onDrawn?: (drawing: SystemDrawing | null, host: HTMLDivElement) => void;
  children?: (drawing: SystemDrawing | null) => ReactNode;
}) {
  const root = useRef<HTMLDivElement>(null);
  const host = useRef<HTMLDivElement>(null);
  const isNear = useNear(root, scroller);
  // Changes exactly when the drawing must.
  const signature = useMemo(() => (isNear ? signatureOf(spec, score) : ''), [isNear, spec, score]);
  const [drawing, setDrawing] = useState<SystemDrawing | null>(null);
  const latest = useRef({ score, spec, onDrawn });
  useEffect(() => {
    latest.current = { score, spec, onDrawn };
  });

  useEffect(() => {
    const element = host.current;
    if (!element || !isNear) return;
    let isCurrent = true;
    void loadVexFlow().then((vexflow) => {
      if (!isCurrent) return;
      const made = drawOnScreen(vexflow, element, latest.current.score, latest.current.spec);
      setDrawing(made);
      latest.current.onDrawn?.(made, element);
      performance.mark(SYSTEM_MARK);
    });
    return () => {
      isCurrent = false;
    };
  }, [isNear, signature]);

  useEffect(() => {
    const element = host.current;
    if (isNear || !element) return;
    element.replaceChildren();
  }, [isNear]);

  return (
    <div ref={root} className="relative" style={{ height: spec.rows.height + GAP, paddingLeft: labels }} data-testid="system" data-first={spec.first}>
      {labels > 0 &&
        spec.rows.rows.map(({ staff, middle }) => (
          <span
            key={staff}
            className="absolute left-0 -translate-y-1/2 truncate pr-2 text-[13px] font-semibold leading-tight"
            style={{ top: middle, width: labels }}
          >
            {nameOf(score, staff)}
          </span>
        ))}
      <div className="relative">
        {names &&
          labels === 0 &&
          spec.rows.rows.map(({ staff, bottom }) => (
            <span key={staff} className="absolute left-1 text-[11.5px] leading-none text-soft" style={{ top: bottom + 3 }}>
              {nameOf(score, staff)}
            </span>
          ))}
        <div ref={host} className="staff-drawing" />
        {children?.(drawing)}
      </div>
    </div>
  );
}
