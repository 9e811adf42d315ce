'use client';

import { type ChangeEvent, useId, useState } from 'react';
import { type Candidate, LIMITS, formatRhythm } from '@/engine';
import { MUSIC_TYPES, MusicFileError, readMusicFile } from '@/lib/client/music-file';
import { TextButton } from '../ui/button';

/** A rhythm from a file: MusicXML or MIDI, of which a line is chosen, or rhythm text. */
export function FromFile({ name, onRhythm }: { name: string; onRhythm: (text: string) => void }) {
  const id = useId();
  const [found, setFound] = useState<readonly Candidate[]>([]);
  const [said, setSaid] = useState<{ text: string; isWrong: boolean } | null>(null);
  const take = ({ name: of, rhythm, warnings }: Candidate) => {
    onRhythm(formatRhythm(rhythm));
    setSaid({ text: [`Taken: ${of}.`, ...warnings].join(' '), isWrong: false });
  };
  const open = async (event: ChangeEvent<HTMLInputElement>) => {
    const file = event.target.files?.[0];
    // The same file, mended, can be chosen again.
    event.target.value = '';
    if (!file) return;
    setFound([]);
    setSaid({ text: 'Reading…', isWrong: false });
    try {
      // No more than is read at most is fetched from the disk; one byte more tells that there is more.
      const bytes = new Uint8Array(await file.slice(0, LIMITS.musicBytes + 1).arrayBuffer());
      const candidates = await readMusicFile(file.name, bytes);
      if (candidates.length === 1) take(candidates[0]!);
      else {
        setFound(candidates);
        setSaid({ text: `${file.name} holds ${candidates.length} lines. Choose one.`, isWrong: false });
      }
    } catch (error) {
      if (!(error instanceof MusicFileError)) throw error;
      setSaid({ text: error.message, isWrong: true });
    }
  };
  return (
    <span className="text-[13.5px]">
      <label htmlFor={id} className="cursor-pointer underline decoration-1 underline-offset-[3px] hover:decoration-2 has-[+input:focus-visible]:outline-2">
        From a file
        <span className="sr-only">{`: ${name}`}</span>
      </label>
      <input id={id} type="file" accept={MUSIC_TYPES} onChange={(event) => void open(event)} className="ml-2 max-w-[220px] text-[13px] text-soft file:hidden" />
      <span role={said?.isWrong ? 'alert' : 'status'} className={said?.isWrong ? 'block text-mark' : 'block text-soft'}>
        {said?.text}
      </span>
      {found.length > 0 && (
        <ul role="list" className="mt-1 max-h-48 overflow-y-auto">
          {found.map((candidate) => (
            <li key={candidate.name} className="py-0.5">
              <TextButton onClick={() => take(candidate)}>{candidate.name}</TextButton>
              <code className="ml-3 font-mono text-[12.5px] text-soft">{formatRhythm(candidate.rhythm.slice(0, 8))}</code>
            </li>
          ))}
        </ul>
      )}
    </span>
  );
}
