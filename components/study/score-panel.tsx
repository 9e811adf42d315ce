'use client';

import { Fragment, type MouseEvent, useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { measureAt, metreOf, printScore, tempoMarkWords } from '@/engine';
import { ScoreLines } from '../score/score-lines';
import type { SystemDrawing } from '../score/draw';
import { foldOf } from '../score/fold';
import type { DrawnScore, SystemSpec } from '../score/spec';
import { subjectOf, useStudy, useValueNames } from './context';

/** The x of a position within a system, between the two drawn places about it. */
function xAt({ places }: SystemDrawing, position: number): number {
  const after = places.findIndex(([at]) => at > position);
  if (after <= 0) return (after === 0 ? places[0] : places.at(-1))?.[1] ?? 0;
  const [a, xa] = places[after - 1]!;
  const [b, xb] = places[after]!;
  return b === a ? xb : xa + ((xb - xa) * (position - a)) / (b - a);
}

/** How many letters stand over a measure besides its number. */
function saidOver({ measures }: DrawnScore, index: number, marks: ReadonlyMap<number, string>): (readonly [number, number])[] {
  const { letter, sections } = measures[index]!;
  const letters = (marks.get(index)?.length ?? 0) + (letter === null ? 0 : letter.length + 3) + sections.reduce((sum, { name }) => sum + name.length + 2, 0);
  return letters === 0 ? [] : [[index, letters]];
}

/** Measure numbers, rehearsal letters, and the name of a section where it begins. */
function Overlay({ spec, drawing, score, marks }: { spec: SystemSpec; drawing: SystemDrawing | null; score: DrawnScore; marks: ReadonlyMap<number, string> }) {
  if (!drawing) return null;
  return (
    <div aria-hidden className="pointer-events-none absolute inset-0">
      {spec.columns.map(({ measure: index }, column) => {
        const { number, letter, sections, times } = score.measures[index]!;
        const left = drawing.measureLefts[column] ?? 0;
        const right = drawing.measureLefts[column + 1] ?? drawing.width;
        return (
          <Fragment key={index}>
            <span className="absolute top-0 flex items-baseline gap-2 whitespace-nowrap" style={{ left: left + 2 }}>
              <span className="text-[11.5px] text-soft">{number}</span>
              {letter !== null && (
                <span data-testid="letter" className="border border-ink px-1 text-[12.5px] font-semibold leading-tight">
                  {letter}
                </span>
              )}
              {marks.has(index) && (
                <span data-testid="tempo-mark" className="text-[12.5px] italic">
                  {marks.get(index)}
                </span>
              )}
              {sections.length > 0 && <span className="text-[14px] font-semibold">{sections.map(({ name }) => name).join(' · ')}</span>}
            </span>
            {times !== undefined && (
              <span data-testid="times" className="absolute top-0 -translate-x-full whitespace-nowrap text-[13px] font-semibold" style={{ left: right - 2 }}>
                {`${times} times`}
              </span>
            )}
          </Fragment>
        );
      })}
    </div>
  );
}

/** The score: every instrument, in systems that fill the width, drawn near the screen only. */
export function ScorePanel({ onSeek }: { onSeek: (position: number) => void }) {
  const { state, selection, select, place } = useStudy();
  const { study, built, measures } = state;
  const [showSilent, setShowSilent] = useState(false);
  const scroller = useRef<HTMLDivElement>(null);
  const drawn = useRef(new Map<number, { spec: SystemSpec; drawing: SystemDrawing; host: HTMLDivElement }>());
  const score = useMemo(() => printScore(study, built), [study, built]);
  const valueNames = useValueNames();
  const marks = useMemo(() => new Map(score.measures.flatMap(({ index, tempo }) => (tempo === null ? [] : [[index, tempoMarkWords(tempo, valueNames)] as const]))), [score, valueNames]);
  const words = useMemo(() => new Map(score.printed.flatMap((index) => saidOver(score, index, marks))), [score, marks]);
  const fold = useMemo(() => foldOf(score), [score]);

  const section = study.sections.find(({ id }) => id === selection.section)!;
  const chosen = built.statements.find(({ id }) => id === selection.statement);
  const target = chosen ?? built.sections.find(({ id }) => id === section.id)!;
  const targetMeasure = measureAt(measures, target.start)?.index ?? 0;
  const targetPrinted = fold.printed(targetMeasure);
  const subject = subjectOf(state, selection);

  const light = useCallback(
    (host: HTMLElement) => {
      const same = new Set(built.statements.filter((s) => s.subject !== null && s.subject === subject).map(({ id }) => id));
      for (const note of host.querySelectorAll<SVGElement>('[data-origin]')) {
        const isLit = selection.origin !== null && note.dataset.origin === String(selection.origin) && same.has(note.dataset.statement ?? '');
        note.classList.toggle('lit', isLit);
      }
    },
    [built, subject, selection.origin],
  );

  useEffect(() => {
    if (scroller.current) light(scroller.current);
  }, [light]);

  useEffect(() => {
    const box = scroller.current;
    const system = [...(box?.querySelectorAll<HTMLElement>('[data-testid="system"]') ?? [])].findLast((one) => Number(one.dataset.first) <= targetPrinted);
    if (box && system) box.scrollTo({ top: system.offsetTop - box.offsetTop, behavior: 'smooth' });
  }, [targetPrinted]);

  useEffect(() => {
    let shown: HTMLElement | null = null;
    const shownMeasures = score.printed.map((index) => score.measures[index]!);
    return place.watch((heard) => {
      const box = scroller.current;
      if (!box) return;
      const position = heard === null ? null : fold.place(heard);
      for (const { spec, drawing, host } of drawn.current.values()) {
        const line = host.parentElement?.querySelector<HTMLElement>('[data-cursor]');
        if (!line) continue;
        const from = shownMeasures[spec.first]?.start.valueOf() ?? 0;
        const last = shownMeasures[spec.end - 1];
        const end = last ? last.start.valueOf() + last.length.valueOf() : 0;
        const isHere = position !== null && position >= from && position < end;
        line.hidden = !isHere;
        if (isHere) line.style.transform = `translateX(${xAt(drawing, position)}px)`;
      }
      if (position === null) return;
      const now = shownMeasures.findLastIndex((measure) => measure.start.valueOf() <= position);
      const system = [...box.querySelectorAll<HTMLElement>('[data-testid="system"]')].findLast((one) => Number(one.dataset.first) <= now);
      if (system && system !== shown) {
        if (shown !== null) box.scrollTo({ top: system.offsetTop - box.offsetTop });
        shown = system;
      }
    });
  }, [place, score, fold]);

  const onClick = (event: MouseEvent<HTMLDivElement>) => {
    const note = (event.target as Element).closest<SVGElement>('[data-statement]');
    const statement = built.statements.find(({ id }) => id === note?.dataset.statement);
    if (note && statement) {
      select({ section: statement.section, statement: statement.id, origin: note.dataset.origin === undefined ? null : Number(note.dataset.origin) });
      return;
    }
    const system = (event.target as Element).closest<HTMLElement>('[data-testid="system"]');
    const one = system && drawn.current.get(Number(system.dataset.first));
    if (!one) return;
    const x = event.clientX - one.host.getBoundingClientRect().left;
    const column = one.drawing.measureLefts.findLastIndex((left) => left <= x);
    const measure = score.measures[score.printed[one.spec.first + Math.max(column, 0)] ?? -1];
    if (measure) onSeek(measure.start.valueOf());
  };

  const where = chosen ? `${study.instruments.find(({ id }) => id === chosen.instrument)?.name ?? ''}, ${section.name}` : section.name;
  return (
    <section aria-labelledby="score-heading" className="mt-10 min-w-0">
      <div className="mb-2 flex flex-wrap items-baseline gap-x-5 gap-y-1">
        <h2 id="score-heading" className="text-[15px] font-semibold">
          Score
        </h2>
        <span className="text-[13px] text-soft">{`measure ${measures[targetMeasure]?.number ?? 1}, ${where}, ${metreOf(study, section)}`}</span>
        <label className="ml-auto flex cursor-pointer items-baseline gap-2 text-[13.5px]">
          <input type="checkbox" checked={showSilent} onChange={(event) => setShowSilent(event.target.checked)} className="accent-ink" />
          Show silent staves
        </label>
      </div>
      {score.refusals.map(({ section: id, message }) => (
        <p key={id} role="alert" className="mb-2 text-[14px] text-mark">
          {message}
        </p>
      ))}
      {score.failures.map(({ instrument, error }) => (
        <p key={instrument.id} role="alert" className="mb-2 text-[14px] text-mark">
          {`${instrument.name} cannot be written: ${error.message}`}
        </p>
      ))}
      <div
        ref={scroller}
        tabIndex={0}
        role="region"
        aria-label="Staves. The statements are described in words below."
        onClick={onClick}
        className="relative max-h-[78vh] overflow-y-auto overflow-x-hidden border-y border-hair py-3"
      >
        <ScoreLines
          score={score}
          hideSilent={!showSilent}
          words={words}
          scroller={scroller}
          onDrawn={(spec, drawing, host) => {
            if (drawing) drawn.current.set(spec.first, { spec, drawing, host });
            light(host);
            place.wake();
          }}
        >
          {(spec, drawing) => (
            <>
              <Overlay spec={spec} drawing={drawing} score={score} marks={marks} />
              <div data-cursor hidden className="pointer-events-none absolute left-0 w-[2px] bg-ink" style={{ top: 20, height: spec.rows.height - 24 }} />
            </>
          )}
        </ScoreLines>
      </div>
    </section>
  );
}
