'use client';

import { useEffect, useRef, useState } from 'react';
import { EngineError } from '@/engine';
import { download, type MadeFile, type Progress } from '@/lib/client/exports';
import { ApiError } from '@/lib/client/get-json';

export type Work =
  | { readonly kind: 'idle' }
  | { readonly kind: 'busy'; readonly what: string; readonly progress: Progress | null }
  | { readonly kind: 'done'; readonly name: string }
  | { readonly kind: 'cancelled'; readonly what: string }
  | { readonly kind: 'failed'; readonly what: string; readonly why: string };

/** Makes a file; may tell how far it is, and stops where it is given up. */
export type Make = (onProgress: (progress: Progress) => void, signal: AbortSignal) => Promise<MadeFile> | MadeFile;

const whyOf = (error: unknown): string =>
  error instanceof ApiError || error instanceof EngineError || (error instanceof Error && /^[A-Z“].*\.$/.test(error.message))
    ? error.message
    : 'Something went wrong while this was made. The study itself is safe; try again.';

/** One file at a time: made, handed over, or given up. */
export function useWork(): { work: Work; run: (what: string, make: Make) => void; cancel: () => void } {
  const [work, setWork] = useState<Work>({ kind: 'idle' });
  const control = useRef<AbortController | null>(null);
  useEffect(() => () => control.current?.abort(), []);

  const run = (what: string, make: Make) => {
    if (control.current) return;
    const own = new AbortController();
    control.current = own;
    setWork({ kind: 'busy', what, progress: null });
    const settle = (next: Work) => {
      control.current = null;
      setWork(next);
    };
    // The page shows that it has begun before the work takes the processor.
    setTimeout(() => {
      void (async () => {
        try {
          const file = await make((progress) => !own.signal.aborted && setWork({ kind: 'busy', what, progress }), own.signal);
          own.signal.throwIfAborted();
          download(file);
          settle({ kind: 'done', name: file.name });
        } catch (error) {
          settle(own.signal.aborted ? { kind: 'cancelled', what } : { kind: 'failed', what, why: whyOf(error) });
        }
      })();
    }, 0);
  };
  return { work, run, cancel: () => control.current?.abort() };
}

/** How a work stands, in words. */
export function workWords(work: Work): string {
  switch (work.kind) {
    case 'idle':
      return '';
    case 'busy':
      return work.progress?.total ? `${work.what}: ${work.progress.done} of ${work.progress.total}` : `${work.what}…`;
    case 'done':
      return `“${work.name}” is with your downloads.`;
    case 'cancelled':
      return `${work.what}: cancelled.`;
    case 'failed':
      return `${work.what}: ${work.why}`;
  }
}
