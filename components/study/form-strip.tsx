'use client';

import { type KeyboardEvent, useEffect, useRef } from 'react';
import { clockOf, describeStatement, formatClock, measureAt, measureNumber, metreOf, sectionSentence } from '@/engine';
import { useStudy } from './context';
import { instrumentsOf, textureOf, tintStyle } from './family';
import { bracketsOf, lanesOf } from './form-layout';

const LEVEL = 16;

function Brackets({ percent }: { percent: (position: number) => number }) {
  const { state } = useStudy();
  const { brackets, levels } = bracketsOf(state.study);
  const middle = (id: string) => {
    const section = state.built.sections.find((one) => one.id === id)!;
    return percent(section.start.valueOf() + section.length.valueOf() / 2);
  };
  const height = levels * LEVEL + 10;
  const hasAxis = state.built.palindrome.form.holds && state.study.sections.length > 1;
  return (
    <div aria-hidden className="relative" style={{ height }}>
      {brackets.map(({ from, to, level }) => {
        const [a, b] = [middle(from), middle(to)].sort((x, y) => x - y) as [number, number];
        const top = height - (level + 1) * LEVEL - 2;
        return (
          <div
            key={to}
            className="absolute border-x border-t border-soft before:absolute before:-left-[2px] before:bottom-0 before:h-2 before:w-[3px] before:bg-soft after:absolute after:-right-[2px] after:bottom-0 after:h-2 after:w-[3px] after:bg-soft"
            style={{ left: `${a}%`, width: `${b - a}%`, top, bottom: 0 }}
          />
        );
      })}
      {hasAxis && (
        <>
          <div className="absolute left-1/2 top-0 w-[1.5px] -translate-x-1/2 bg-ink" style={{ bottom: 6 }} />
          <span className="absolute left-1/2 bg-paper px-1.5 text-[12.5px] leading-none text-soft" style={{ top: height - levels * LEVEL + 3, marginLeft: 3 }}>
            axis
          </span>
        </>
      )}
    </div>
  );
}

/** The whole form, to scale in time. Arrow keys go from one section or statement to the next; Enter chooses. */
export function FormStrip() {
  const { state, selection, select, place } = useStudy();
  const { study, built, measures } = state;
  const clock = clockOf(study, built);
  const root = useRef<HTMLDivElement>(null);
  const cursor = useRef<HTMLDivElement>(null);
  const total = Math.max(built.totalLength.valueOf(), 1e-9);
  const percent = (position: number) => (100 * position) / total;

  useEffect(
    () =>
      place.watch((position) => {
        const line = cursor.current;
        if (!line) return;
        line.hidden = position === null;
        if (position !== null) line.style.left = `${(100 * position) / total}%`;
      }),
    [place, total],
  );

  const onKeyDown = (event: KeyboardEvent) => {
    const step = { ArrowRight: 1, ArrowDown: 1, ArrowLeft: -1, ArrowUp: -1 }[event.key];
    if (step === undefined) return;
    const stops = [...(root.current?.querySelectorAll<HTMLElement>('[data-stop]') ?? [])];
    const next = stops[stops.indexOf(document.activeElement as HTMLElement) + step];
    if (next) {
      event.preventDefault();
      next.focus();
    }
  };

  return (
    <section aria-label="Form" className="mt-6">
      <Brackets percent={percent} />
      <div ref={root} onKeyDown={onKeyDown} className="relative border-r border-ink">
        <ol className="relative flex" role="list">
          {study.sections.map((section, index) => {
            const placed = built.sections[index]!;
            const own = built.statements.filter((s) => s.section === section.id);
            const { lane, count } = lanesOf(study, own);
            const laneHeight = count === 1 ? 28 : Math.max(9, Math.floor(42 / count));
            const isChosen = selection.section === section.id;
            const first = measureAt(measures, placed.start);
            const start = placed.start.valueOf();
            const length = Math.max(placed.length.valueOf(), 1e-9);
            return (
              <li
                key={section.id}
                className="grows @container relative min-w-0 shrink-0 border-l border-ink"
                style={{ width: `${percent(placed.length.valueOf())}%` }}
              >
                <button
                  type="button"
                  data-stop
                  tabIndex={isChosen ? 0 : -1}
                  aria-current={isChosen && selection.statement === null ? 'true' : undefined}
                  aria-label={`${section.name}. ${sectionSentence(study, section).map(({ text }) => text).join('')}`}
                  onClick={() => select({ section: section.id, statement: null, scroll: true })}
                  className={`block h-8 w-full truncate pl-[7px] text-left text-[14.5px] leading-8 hover:bg-wash ${
                    isChosen ? 'font-[750]' : 'font-semibold'
                  }`}
                >
                  <span className={isChosen ? 'border-b-[3px] border-ink pb-px' : ''}>{section.name}</span>
                </button>
                <div className="relative mb-1" style={{ height: count * laneHeight }}>
                  {own.map((statement) => {
                    const left = (100 * (statement.start.valueOf() - start)) / length;
                    const width = (100 * statement.length.valueOf()) / length;
                    const isOn = selection.statement === statement.id;
                    return (
                      <button
                        key={statement.id}
                        type="button"
                        data-stop
                        tabIndex={-1}
                        aria-pressed={isOn}
                        aria-label={describeStatement(state, statement)}
                        title={describeStatement(state, statement)}
                        onClick={() => select({ section: section.id, statement: statement.id, scroll: true })}
                        className={`grows @container absolute overflow-hidden ${
                          isOn ? 'z-10 outline-[2.5px] outline-ink outline-offset-[1.5px]' : ''
                        }`}
                        style={{
                          left: `calc(${left}% + 2px)`,
                          width: `calc(${width}% - 3px)`,
                          top: lane.get(statement.id)! * laneHeight,
                          height: laneHeight - (count === 1 ? 0 : 2),
                        }}
                      >
                        {instrumentsOf(statement).map((instrument, part, all) => (
                          <span
                            key={part}
                            className={`absolute inset-x-0 ${textureOf(study, instrument)}`}
                            style={{ ...tintStyle(study, instrument), top: `${(100 * part) / all.length}%`, height: `${100 / all.length}%` }}
                          />
                        ))}
                        {count === 1 && (
                          <span className="absolute left-1.5 top-1/2 hidden -translate-y-1/2 rounded-[1px] bg-paper px-[5px] text-[12.5px] font-[650] leading-4 text-ink @min-[34px]:block">
                            {measureNumber(statement.length, metreOf(study, section))}
                          </span>
                        )}
                      </button>
                    );
                  })}
                </div>
                <div className="flex h-5 gap-4 overflow-hidden whitespace-nowrap pl-[7px] text-[12.5px] text-soft">
                  <span>{first?.number}</span>
                  <span className="hidden @min-[74px]:inline">{formatClock(clock.secondsAt(placed.start))}</span>
                </div>
              </li>
            );
          })}
        </ol>
        <div ref={cursor} hidden className="pointer-events-none absolute bottom-4 top-6 z-20 w-[2.5px] -translate-x-1/2 bg-ink outline-1 outline-paper" />
      </div>
    </section>
  );
}
