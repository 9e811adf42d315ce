'use client';

import { type KeyboardEvent, type PointerEvent, useEffect, useMemo, useRef, useState } from 'react';
import {
  type ThreadReading,
  type ThreadRow,
  describeStatement,
  metreOf,
  parseMetre,
  placeWords,
  threadsOf,
} from '@/engine';
import { Segments } from '../ui/segments';
import { useStudy } from './context';
import { playersOf, tint } from './family';
import { type ThreadGeometry, TICK, hit, rowWords, rowY, threadsPath, tickX, ticksPaths } from './thread-geometry';
import { useWidth } from './use-width';

const READINGS = [
  ['in-time', 'In time'],
  ['from-one-start', 'From one start'],
  ['to-one-end', 'To one end'],
] as const satisfies readonly (readonly [ThreadReading, string])[];

/** Measure lines and numbers along the top: thinned until they stand apart. */
function Ruler({ geometry, measure, extent, height }: { geometry: ThreadGeometry; measure: number; extent: number; height: number }) {
  const count = Math.ceil(extent / measure - 1e-9);
  let step = 1;
  while (step * measure * geometry.scale < 26) step *= 2;
  const marks = Array.from({ length: Math.floor(count / step) + 1 }, (_, n) => n * step);
  return (
    <g aria-hidden>
      {marks.map((n) => (
        <g key={n}>
          <line x1={tickX(geometry, n * measure)} x2={tickX(geometry, n * measure)} y1={20} y2={height - 6} stroke="var(--hair)" />
          {n < count && (
            <text x={tickX(geometry, n * measure) + 3} y={13} fontSize={11.5} fill="var(--soft)">
              {n + 1}
            </text>
          )}
        </g>
      ))}
    </g>
  );
}

/** The threads of the chosen section. Each statement is a slider over its attacks: arrow keys go from attack to attack. */
export function ThreadsView() {
  const { state, selection, select, place } = useStudy();
  const { study, built, measures } = state;
  const [reading, setReading] = useState<ThreadReading>('from-one-start');
  const frame = useRef<HTMLDivElement>(null);
  const cursors = useRef<SVGGElement>(null);
  const width = useWidth(frame);
  const section = study.sections.find(({ id }) => id === selection.section)!;
  const statements = useMemo(() => built.statements.filter((s) => s.section === section.id), [built, section.id]);
  const threads = useMemo(() => threadsOf(statements, reading), [statements, reading]);
  const extent = Math.max(threads.extent.valueOf(), 1e-9);
  const isNarrow = width < 560;
  const left = isNarrow ? 2 : 118;
  const rows = threads.rows.length;
  const pitch = rows > 8 ? 64 : rows > 5 ? 78 : isNarrow ? 92 : 104;
  const geometry: ThreadGeometry = { left, scale: Math.max(width - left - 8, 10) / extent, top: isNarrow ? 56 : 46, pitch };
  const height = geometry.top + Math.max(rows - 1, 0) * pitch + TICK + 16;
  const measure = parseMetre(metreOf(study, section)).length.valueOf();
  const scale = geometry.scale;
  const top = geometry.top;

  useEffect(
    () =>
      place.watch((position) => {
        const group = cursors.current;
        if (!group) return;
        threads.rows.forEach(({ statement, start }, index) => {
          const mark = group.children[index] as SVGRectElement | undefined;
          if (!mark) return;
          const within = position === null ? -1 : position - statement.start.valueOf();
          const isIn = within >= 0 && within < statement.length.valueOf();
          mark.setAttribute('visibility', isIn ? 'visible' : 'hidden');
          if (isIn) mark.setAttribute('x', String(left + (start.valueOf() + within) * scale - 1.25));
        });
      }),
    [place, threads, scale, left],
  );

  const choose = (row: number, tick: number) => {
    const { statement, ticks } = threads.rows[row]!;
    const one = ticks[tick];
    if (one) select({ statement: statement.id, origin: one.origin });
  };

  const onPointer = (event: PointerEvent<SVGSVGElement>) => {
    const box = event.currentTarget.getBoundingClientRect();
    const found = hit(threads, geometry, event.clientX - box.left, event.clientY - box.top);
    if (found) choose(found.row, found.tick);
    else select({ origin: null });
  };

  const currentTick = ({ ticks }: ThreadRow) => ticks.findIndex(({ origin }) => origin !== null && origin === selection.origin);

  const onKeyDown = (event: KeyboardEvent, row: number) => {
    const current = currentTick(threads.rows[row]!);
    const last = threads.rows[row]!.ticks.length - 1;
    const to = { ArrowRight: Math.min(current + 1, last), ArrowLeft: Math.max(current - 1, 0), Home: 0, End: last }[event.key];
    if (to !== undefined) {
      event.preventDefault();
      choose(row, to);
      return;
    }
    const over = { ArrowDown: row + 1, ArrowUp: row - 1 }[event.key];
    if (over !== undefined && threads.rows[over]) {
      event.preventDefault();
      frame.current?.querySelectorAll<SVGGElement>('[role="slider"]')[over]?.focus();
    } else if (event.key === 'Escape') select({ origin: null });
  };

  return (
    <section aria-labelledby="threads-heading" className="min-w-0">
      <div className="mb-2 flex flex-wrap items-center gap-x-5 gap-y-2">
        <h2 id="threads-heading" className="text-[15px] font-semibold">
          Threads
        </h2>
        <Segments label="How statements are laid out" value={reading} options={READINGS} onChange={setReading} />
      </div>
      <div ref={frame} className="w-full">
        {width > 0 && (
          <svg width={width} height={height} onPointerDown={onPointer} className="block touch-manipulation select-none font-sans">
            <Ruler geometry={geometry} measure={measure} extent={extent} height={height} />
            <path aria-hidden d={threadsPath(threads, geometry, null)} fill="none" stroke="var(--ink)" strokeWidth={0.7} opacity={0.5} />
            {selection.origin !== null && (
              <path aria-hidden d={threadsPath(threads, geometry, selection.origin)} fill="none" stroke="var(--ink)" strokeWidth={2.4} />
            )}
            {threads.rows.map((row, index) => {
              const { statement } = row;
              const y = rowY(geometry, index);
              const x = tickX(geometry, row.start.valueOf());
              const end = x + statement.length.valueOf() * geometry.scale;
              const colour = tint(study, statement.instrument);
              const name = playersOf(study, statement);
              const current = currentTick(row);
              const tick = row.ticks[current];
              const isChosen = selection.statement === statement.id;
              const factor = rowWords(statement);
              const label = isNarrow ? { x: 2, y: y - 19 } : { x: 0, y: y + 1 };
              return (
                <g
                  key={statement.id}
                  role="slider"
                  tabIndex={0}
                  aria-label={describeStatement(state, statement)}
                  aria-orientation="horizontal"
                  aria-valuemin={1}
                  aria-valuemax={Math.max(row.ticks.length, 1)}
                  aria-valuenow={current + 1}
                  aria-valuetext={
                    tick ? `Attack ${current + 1} of ${row.ticks.length}, ${placeWords(measures, statement.start.add(tick.within))}` : 'no attack chosen'
                  }
                  onKeyDown={(event) => onKeyDown(event, index)}
                >
                  <text x={label.x} y={label.y} fontSize={14.5} fontWeight={isChosen ? 750 : 600} fill={colour}>
                    {name.toLowerCase()}
                    {isNarrow && (
                      <tspan dx={8} fontWeight={400} fill="var(--soft)">
                        {factor}
                      </tspan>
                    )}
                  </text>
                  {!isNarrow && (
                    <text x={0} y={y + 19} fontSize={14} fill="var(--soft)">
                      {factor}
                    </text>
                  )}
                  <rect x={x} y={y - (isChosen ? 2.5 : 1.5)} width={Math.max(end - x, 0)} height={isChosen ? 5 : 3} fill={colour} />
                  <line x1={end} x2={end} y1={y - TICK} y2={y + TICK} stroke={colour} />
                  {ticksPaths(row, geometry, index).map(([instrument, path]) => (
                    <path key={instrument ?? ''} d={path} stroke={instrument === null ? colour : tint(study, instrument)} strokeWidth={3.2} />
                  ))}
                  {tick && (
                    <rect
                      x={tickX(geometry, tick.at.valueOf()) - 4}
                      y={y - TICK - 3}
                      width={8}
                      height={2 * TICK + 6}
                      fill="var(--paper)"
                      stroke="var(--ink)"
                      strokeWidth={2.4}
                    />
                  )}
                </g>
              );
            })}
            <g ref={cursors} aria-hidden>
              {threads.rows.map(({ statement }, index) => (
                <rect key={statement.id} visibility="hidden" y={top + index * pitch - TICK - 5} width={2.5} height={2 * TICK + 10} fill="var(--ink)" />
              ))}
            </g>
          </svg>
        )}
      </div>
      <p className="mt-2 max-w-[70ch] text-[13px] text-soft">
        Every attack of the subject is tied to the same attack in the next statement. Threads that fan out are augmentation, that close in
        diminution, that cross retrograde, that wrap round rotation. Choose a tick or a thread to follow one attack.
      </p>
    </section>
  );
}
