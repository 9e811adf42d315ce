'use client';

import { useEffect, useMemo, useRef } from 'react';
import { EngineError, type Metre, parseRhythm, printRhythm } from '@/engine';
import { ScoreLines } from '../score/score-lines';
import type { DrawnScore } from '../score/spec';

type Spelled = { readonly score: DrawnScore } | { readonly error: string } | null;

function spell(text: string, metre: Metre, sounds: number | undefined): Spelled {
  try {
    return { score: printRhythm(parseRhythm(text), metre, { sounds }) };
  } catch (error) {
    if (error instanceof EngineError) return { error: error.message };
    throw error;
  }
}

/** Lets notes stand out by the number of their attack. */
function light(host: HTMLElement, lit: ReadonlySet<number>): void {
  for (const note of host.querySelectorAll<SVGElement>('[data-origin]')) note.classList.toggle('wrong', lit.has(Number(note.dataset.origin)));
}

const NONE: ReadonlySet<number> = new Set();

/**
 * A rhythm text as one staff. Nothing is drawn where it cannot be read; where it cannot be written, the reason is.
 * @param props.wrong - numbers of attacks that stand out as wrong
 */
export function RhythmStaff({ text, metre, sounds, wrong = NONE }: { text: string; metre: Metre; sounds?: number | undefined; wrong?: ReadonlySet<number> | undefined }) {
  const spelled = useMemo(() => spell(text, metre, sounds), [text, metre, sounds]);
  const frame = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (frame.current) light(frame.current, wrong);
  }, [wrong, spelled]);
  if (spelled === null) return null;
  if ('error' in spelled) return <p className="mt-2 text-[14px] text-mark">{spelled.error}</p>;
  return (
    <div ref={frame} className="mt-1" data-testid="rhythm-staff">
      <ScoreLines score={spelled.score} names={false} onDrawn={(_, __, host) => light(host, wrong)} />
    </div>
  );
}
