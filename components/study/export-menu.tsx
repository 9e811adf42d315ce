'use client';

import Link from 'next/link';
import { type ReactNode, useContext, useEffect, useRef, useState } from 'react';
import type { Study, ThreadReading } from '@/engine';
import { type MadeFile, print } from '@/lib/client/exports';
import { ApiError } from '@/lib/client/get-json';
import { midiWords, musicBlob } from '@/lib/client/music-in-thread';
import { fileName } from '@/lib/file-names';
import type { MusicKind } from '@/lib/music-files';
import type { ExportBody } from '@/lib/schemas/exports';
import { TextButton } from '../ui/button';
import { Token } from '../ui/token';
import { PaperContext, useStudy, useValueNames } from './context';
import { formPicture } from './pictures/form-picture';
import type { Measure, Picture } from './pictures/svg';
import { READING_WORDS, threadsPicture } from './pictures/threads-picture';
import { pageMeasure, toPng } from './pictures/to-png';
import { type PrintChoices, PrintChoicesFields } from './print-choices';
import { SoundGroup } from './sound-group';
import { type Make, useWork, type Work, workWords } from './use-work';

const READINGS: readonly ThreadReading[] = ['in-time', 'from-one-start', 'to-one-end'];
const textFile = (text: string, type: string, name: string): MadeFile => ({ blob: new Blob([text], { type }), name });

function Group({ heading, children }: { heading: string; children: ReactNode }) {
  return (
    <section className="border-t border-hair py-3 first-of-type:border-t-0 first-of-type:pt-0">
      <h3 className="mb-1.5 text-[15px] font-semibold">{heading}</h3>
      {children}
    </section>
  );
}

function Row({ name, children }: { name: string; children: ReactNode }) {
  return (
    <div className="flex flex-wrap items-baseline justify-between gap-x-4 py-0.5">
      <span className="min-w-0 [overflow-wrap:anywhere]">{name}</span>
      <span className="flex gap-x-4">{children}</span>
    </div>
  );
}

/** How the file that is being made stands, and the way to give it up. */
function Standing({ work, cancel }: { work: Work; cancel: () => void }) {
  const isFailed = work.kind === 'failed';
  const words = useRef<HTMLParagraphElement>(null);
  const giveUp = () => {
    // The button goes with the work: what had the focus keeps a place.
    words.current?.focus();
    cancel();
  };
  return (
    <div className={work.kind === 'idle' ? '' : 'sticky -top-4 z-10 -mx-5 -mt-4 mb-3 flex items-baseline justify-between gap-4 border-b border-ink bg-paper px-5 py-2.5'}>
      <p ref={words} tabIndex={-1} role={isFailed ? 'alert' : 'status'} className={`[overflow-wrap:anywhere] ${isFailed ? 'text-mark' : ''}`}>
        {workWords(work)}
      </p>
      {work.kind === 'busy' && <TextButton onClick={giveUp}>Cancel</TextButton>}
    </div>
  );
}

/** How exact a MIDI file of the study is; empty until that is known. */
function MidiExactness({ study }: { study: Study }) {
  const [said, setSaid] = useState('');
  useEffect(() => {
    const control = new AbortController();
    midiWords(study, control.signal).then(setSaid, () => undefined);
    return () => control.abort();
  }, [study]);
  return <p className="min-h-5 text-[13px] text-soft">{said}</p>;
}

/** Everything that can be taken along of the study as it stands on the page. */
export function ExportMenu() {
  const { editor, state, selection } = useStudy();
  const valueNames = useValueNames();
  const { work, run, cancel } = useWork();
  const paper = useContext(PaperContext);
  const [choices, setChoices] = useState<PrintChoices>({ paper, orientation: 'portrait', staff: undefined });
  const [reading, setReading] = useState<ThreadReading>('from-one-start');
  const { study } = state;
  const isBusy = work.kind === 'busy';
  const section = study.sections.find(({ id }) => id === selection.section)!;

  const printed = (what: ExportBody['what'], player?: string): Make => async (onProgress, signal) => {
    const { staff, ...page } = choices;
    const body = { what, ...(player !== undefined && { player }), ...page, ...(staff !== undefined && { staff }) };
    const isSaved = editor.version !== null && !state.isChanged;
    try {
      if (isSaved) return await print({ ...body, study: editor.id, version: editor.version ?? 1 }, onProgress, signal);
    } catch (error) {
      // Another window saved a newer version: what stands here is printed.
      if (!(error instanceof ApiError) || error.code !== 'version_conflict') throw error;
    }
    return print({ ...body, document: study }, onProgress, signal);
  };
  const drawn = (draw: (measure: Measure) => Picture, name: readonly string[], kind: 'svg' | 'png'): Make => async (_, signal) => {
    const made = draw(pageMeasure());
    if (kind === 'svg') return textFile(made.svg, 'image/svg+xml', fileName(name, 'svg'));
    return { blob: await toPng(made, signal), name: fileName(name, 'png') };
  };
  const formOf = (kind: 'svg' | 'png') => drawn((measure) => formPicture(state, measure), [study.title, 'form'], kind);
  const threadsOf = (kind: 'svg' | 'png') => drawn((measure) => threadsPicture(state, section.id, reading, measure, valueNames), [study.title, section.name, 'threads'], kind);
  const word = (text: string, what: string, make: Make) => (
    <TextButton aria-disabled={isBusy} className="aria-disabled:text-soft aria-disabled:no-underline" aria-label={what} onClick={() => run(what, make)}>
      {text}
    </TextButton>
  );
  const written = (kind: MusicKind, player?: { readonly id: string; readonly name: string }): Make => async (_, signal) => ({
    blob: await musicBlob(study, kind, player?.id, signal),
    name: fileName([study.title, player?.name ?? ''], kind),
  });
  const musicXml = (what: string, player?: { readonly id: string; readonly name: string }) => (
    <>
      {word('MusicXML', `${what} as MusicXML`, written('musicxml', player))}
      {word('compressed', `${what} as compressed MusicXML`, written('mxl', player))}
    </>
  );
  const json: Make = () => textFile(`${JSON.stringify(study, null, 2)}\n`, 'application/json', fileName([study.title], 'json'));

  const pair = (what: string, make: (kind: 'svg' | 'png') => Make) => (
    <>
      {word('SVG', `${what} as SVG`, make('svg'))}
      {word('PNG', `${what} as PNG`, make('png'))}
    </>
  );

  return (
    <Token text={isBusy ? workWords(work) : 'Export'} label="Export" look="button">
      {() => (
        <>
          <Standing work={work} cancel={cancel} />
          <Group heading="Score and parts">
            <PrintChoicesFields choices={choices} onChange={setChoices} />
            <Row name="Score">{word('PDF', 'Score as PDF', printed('score'))}</Row>
            {study.players.map(({ id, name }) => (
              <Row key={id} name={name}>
                {word('PDF', `Part of ${name} as PDF`, printed('part', id))}
              </Row>
            ))}
            {study.players.length > 0 && <Row name="All parts">{word('zip of PDFs', 'All parts as zip of PDFs', printed('parts'))}</Row>}
            {study.players.length === 0 && <p className="text-[13.5px] text-soft">Name players below, under Instruments, and each has a part.</p>}
            <p className="mt-1">
              <Link href={`/studies/${editor.id}/print`} prefetch={false} className="underline underline-offset-[3px]">
                Print from the browser
              </Link>
            </p>
          </Group>
          <Group heading="For notation programs">
            <Row name="Score">{musicXml('Score')}</Row>
            {study.players.map((player) => (
              <Row key={player.id} name={player.name}>
                {musicXml(`Part of ${player.name}`, player)}
              </Row>
            ))}
          </Group>
          <Group heading="MIDI">
            <Row name="Standard MIDI File">{word('MIDI', 'MIDI file', written('mid'))}</Row>
            <MidiExactness study={study} />
          </Group>
          <Group heading="Sound">
            <SoundGroup word={word} row={(name, content) => <Row name={name}>{content}</Row>} />
          </Group>
          <Group heading="Pictures">
            <Row name="Form">{pair('Form', formOf)}</Row>
            <Row name={`Threads of “${section.name}”`}>
              <select aria-label="How statements are laid out" value={reading} onChange={(event) => setReading(event.target.value as ThreadReading)} className="rounded border border-hair bg-paper px-1.5 text-[13.5px]">
                {READINGS.map((one) => (
                  <option key={one} value={one}>
                    {READING_WORDS[one]}
                  </option>
                ))}
              </select>
              {pair('Threads', threadsOf)}
            </Row>
          </Group>
          <Group heading="Table of statements">
            <Row name="Section, instrument, measures, times, factor, reading">{word('CSV', 'Statements as CSV', written('csv'))}</Row>
          </Group>
          <Group heading="The study itself">
            <Row name="Everything, to open again">{word('JSON', 'The study as JSON', json)}</Row>
          </Group>
        </>
      )}
    </Token>
  );
}
