'use client';

import { type ReactNode, type RefObject, useEffect, useRef, useState } from 'react';
import { SYSTEM_MARK } from '@/lib/client/study-editor';
import { type SystemDrawing, drawSystem, loadVexFlow } from './draw';
import { SYSTEM_TOP } from './layout';
import type { DrawnScore, SystemSpec } from './spec';

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
  signature,
  labels,
  names,
  scroller,
  onDrawn,
  children,
}: {
  score: DrawnScore;
  spec: SystemSpec;
  /** changes exactly when the drawing must */
  signature: string;
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
      const made = drawSystem(vexflow, element, latest.current.score, latest.current.spec);
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
    <div ref={root} className="relative" style={{ height: spec.height, paddingLeft: labels }} data-testid="system" data-first={spec.first}>
      {labels > 0 &&
        spec.staves.map((staff, row) => (
          <span
            key={staff.id}
            className="absolute left-0 truncate pr-2 text-[13px] font-semibold leading-tight"
            style={{ top: SYSTEM_TOP + row * spec.pitch + 30, width: labels }}
          >
            {staff.name}
          </span>
        ))}
      <div className="relative">
        {names &&
          labels === 0 &&
          spec.staves.map((staff, row) => (
            <span key={staff.id} className="absolute left-1 text-[11.5px] leading-none text-soft" style={{ top: SYSTEM_TOP + row * spec.pitch + 62 }}>
              {staff.name}
            </span>
          ))}
        <div ref={host} className="staff-drawing" />
        {children?.(drawing)}
      </div>
    </div>
  );
}
