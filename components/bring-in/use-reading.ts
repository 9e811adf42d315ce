'use client';

import { useEffect, useRef, useState } from 'react';
import { type Candidate, LIMITS, type Study } from '@/engine';
import { MusicFileError, readMusicFile } from '@/lib/client/music-file';
import { isStudyFile, readStudyFile } from '@/lib/client/study-file';

export type Reading =
  | { readonly kind: 'none' }
  | { readonly kind: 'reading'; readonly name: string }
  | { readonly kind: 'found'; readonly name: string; readonly lines: readonly Candidate[]; readonly number: number }
  | { readonly kind: 'wrong'; readonly name: string; readonly message: string };

/**
 * Reads files, the last one asked for. A study's own document goes to `onStudy`.
 * @returns the state, and `open`, `cancel` and `clear`
 */
export function useReading(onStudy: (study: Study) => void) {
  const [reading, setReading] = useState<Reading>({ kind: 'none' });
  const current = useRef<AbortController | null>(null);
  const count = useRef(0);
  useEffect(() => () => current.current?.abort(), []);

  const open = async (file: File) => {
    current.current?.abort();
    const own = new AbortController();
    current.current = own;
    setReading({ kind: 'reading', name: file.name });
    try {
      // No more than is read at most is fetched from the disk; one byte more tells that there is more.
      const bytes = new Uint8Array(await file.slice(0, LIMITS.musicBytes + 1).arrayBuffer());
      if (own.signal.aborted) return;
      if (isStudyFile(bytes)) {
        const study = readStudyFile(bytes);
        setReading({ kind: 'none' });
        onStudy(study);
        return;
      }
      const lines = await readMusicFile(file.name, bytes, own.signal);
      count.current += 1;
      if (!own.signal.aborted) setReading({ kind: 'found', name: file.name, lines, number: count.current });
    } catch (error) {
      if (own.signal.aborted) return;
      if (!(error instanceof MusicFileError)) throw error;
      setReading({ kind: 'wrong', name: file.name, message: error.message });
    }
  };
  const clear = () => {
    current.current?.abort();
    setReading({ kind: 'none' });
  };
  return { reading, open: (file: File) => void open(file), clear };
}
