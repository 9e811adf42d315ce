'use client';

import { useRouter } from 'next/navigation';
import { useId, useRef, useState } from 'react';
import type { Study } from '@/engine';
import { MUSIC_TYPES } from '@/lib/client/music-file';
import { beginStudy } from '@/lib/client/new-study';
import { Button, TextButton } from '../ui/button';
import { DropBanner, FileChoice } from './file-choice';
import { FoundLines } from './found-lines';
import { useDrop } from './use-drop';
import { useReading } from './use-reading';

function PasteField({ onText }: { onText: (text: string) => void }) {
  const id = useId();
  const [text, setText] = useState('');
  return (
    <form
      className="mt-3 max-w-[640px]"
      onSubmit={(event) => {
        event.preventDefault();
        if (text.trim() !== '') onText(text);
      }}
    >
      <label htmlFor={id} className="mb-1 block text-[13px] text-soft">
        MusicXML or rhythm text
      </label>
      <textarea id={id} rows={4} value={text} spellCheck={false} autoComplete="off" onChange={(event) => setText(event.target.value)} className="block w-full rounded border border-hair bg-paper px-3 py-2 font-mono text-[13px]" />
      <Button type="submit" className="mt-2">
        Read it
      </Button>
    </form>
  );
}

/** Music from elsewhere: by drop, by file dialogue, by paste. One of its lines becomes a subject or a free line. */
export function BringInPanel() {
  const router = useRouter();
  const panel = useRef<HTMLElement>(null);
  const [isPasting, setPasting] = useState(false);
  const [done, setDone] = useState<string | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const onStudy = (study: Study) => {
    const id = beginStudy(study);
    if (id === null) setProblem('This browser does not let a study be kept: its storage is full or closed. Make room, or allow storage for this page, and try again.');
    else router.push(`/studies/${id}`);
  };
  const { reading, open, clear } = useReading(onStudy);
  const begin = (file: File) => {
    setDone(null);
    setProblem(null);
    setPasting(false);
    // What was dropped at the top of the page is answered here.
    panel.current?.scrollIntoView({ block: 'nearest' });
    open(file);
  };
  const isOver = useDrop(begin);
  return (
    <section ref={panel} aria-labelledby="bring-in-heading" className="mt-10 min-w-0 scroll-mb-32 scroll-mt-6">
      {isOver && <DropBanner text="Let go to bring it in" />}
      <h2 id="bring-in-heading" className="mb-1.5 text-[15px] font-semibold">
        Bring in music
      </h2>
      <p className="max-w-[80ch] text-[14px] text-soft">
        MusicXML, compressed MusicXML, MIDI or rhythm text: drop a file anywhere on this page,{' '}
        <FileChoice text="choose a file" accept={`${MUSIC_TYPES},.json,application/json`} className="text-ink" onFile={begin} /> or{' '}
        <TextButton className="text-ink" aria-expanded={isPasting} onClick={() => setPasting(!isPasting)}>
          paste text
        </TextButton>
        . A study’s own file (.json) opens as a new study.
      </p>
      {isPasting && <PasteField onText={(text) => begin(new File([text], 'Pasted text'))} />}
      <div role="status" className="text-[14px]">
        {reading.kind === 'reading' && <p className="mt-3">{`Reading ${reading.name}…`}</p>}
        {reading.kind === 'found' && <p className="mt-3">{reading.lines.length === 1 ? `${reading.name} holds one line.` : `${reading.name} holds ${reading.lines.length} lines.`}</p>}
        {done && <p className="mt-3">{done}</p>}
      </div>
      {reading.kind === 'reading' && (
        <TextButton className="mt-1 text-[14px]" onClick={clear}>
          Cancel
        </TextButton>
      )}
      {(problem ?? reading.kind === 'wrong') && (
        <p role="alert" className="mt-3 max-w-[80ch] text-[14px] text-mark [overflow-wrap:anywhere]">
          {problem ?? (reading.kind === 'wrong' ? `${reading.name}: ${reading.message}` : '')}
        </p>
      )}
      {reading.kind === 'found' && (
        <FoundLines
          key={reading.number}
          lines={reading.lines}
          onClose={clear}
          onDone={(sentence) => {
            clear();
            setDone(sentence);
          }}
        />
      )}
    </section>
  );
}
