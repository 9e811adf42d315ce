'use client';

import { type ReactNode, useRef } from 'react';
import type { Fraction, Value } from '@/engine';
import { type ThreadGeometry, rowY, threadPath, tickX } from '../study/thread-geometry';
import { useWidth } from '../study/use-width';

/** A rhythm drawn to scale: sounding values as lines with a tick where they begin, rests dotted. */
export type DrawnRow = {
  readonly label: string;
  readonly values: readonly Value[];
  /** indexes of values that stand out */
  readonly wrong?: ReadonlySet<number>;
  readonly isQuiet?: boolean;
};

/** From value `from` of a row to value `to` of the next. */
export type DrawnThread = { readonly row: number; readonly from: number; readonly to: number; readonly isWrong?: boolean };

const startsOf = (values: readonly Value[]): number[] => {
  let at = 0;
  return values.map(({ length }) => {
    const start = at;
    at += length.valueOf();
    return start;
  });
};

const totalOf = (values: readonly Value[]): number => values.reduce((sum, { length }) => sum + length.valueOf(), 0);

/** Rows one under the other with threads between; measures are numbered along the top where a metre is given. */
export function Rows({ rows, threads, measure, label }: { rows: readonly DrawnRow[]; threads: readonly DrawnThread[]; measure?: Fraction; label: string }): ReactNode {
  const frame = useRef<HTMLDivElement>(null);
  const width = useWidth(frame, 560);
  const isNarrow = width < 560;
  const extent = Math.max(...rows.map(({ values }) => totalOf(values)), 1e-9);
  const left = isNarrow ? 2 : 118;
  const geometry: ThreadGeometry = { left, scale: Math.max(width - left - 10, 10) / extent, top: isNarrow ? 62 : 44, pitch: isNarrow ? 92 : 104 };
  const starts = rows.map(({ values }) => startsOf(values));
  const height = geometry.top + (rows.length - 1) * geometry.pitch + 30;
  const bar = measure?.valueOf() ?? 0;
  const marks = bar > 0 ? Array.from({ length: Math.ceil(extent / bar - 1e-9) }, (_, index) => index).filter((index) => bar * geometry.scale >= 26 || index % Math.ceil(26 / (bar * geometry.scale)) === 0) : [];
  return (
    <div ref={frame} className="overflow-hidden">
      <svg width={width} height={height} role="img" aria-label={label} className="block font-sans">
        {marks.map((index) => (
          <text key={index} x={tickX(geometry, index * bar) + 2} y={13} fontSize={12} fill="var(--soft)">
            {index + 1}
          </text>
        ))}
        {threads.map(({ row, from, to, isWrong }) => (
          <path
            key={`${row}-${from}-${to}`}
            d={threadPath(geometry, row, tickX(geometry, starts[row]![from]!) + 1.5, tickX(geometry, starts[row + 1]![to]!) + 1.5)}
            fill="none"
            stroke={isWrong ? 'var(--mark)' : 'var(--ink)'}
            strokeWidth={isWrong ? 2 : 0.8}
            opacity={isWrong ? 1 : 0.5}
          />
        ))}
        {rows.map(({ label: name, values, wrong, isQuiet }, index) => {
          const y = rowY(geometry, index);
          const colour = isQuiet ? 'var(--soft)' : 'var(--ink)';
          const end = tickX(geometry, totalOf(values));
          return (
            <g key={index}>
              <text x={isNarrow ? 2 : 0} y={isNarrow ? y - 18 : y + 5} fontSize={14.5} fontWeight={600} fill={colour}>
                {name}
              </text>
              {values.map(({ length, rest }, n) => {
                const x = tickX(geometry, starts[index]![n]!);
                const to = x + length.valueOf() * geometry.scale;
                const own = wrong?.has(n) ? 'var(--mark)' : colour;
                return (
                  <g key={n} stroke={own}>
                    <line x1={x} x2={to} y1={y} y2={y} strokeWidth={rest ? 2 : 3} strokeDasharray={rest ? '3 5' : undefined} />
                    {!rest && <line x1={x + 1.5} x2={x + 1.5} y1={y - 12} y2={y + 12} strokeWidth={3} />}
                  </g>
                );
              })}
              <line x1={end} x2={end} y1={y - 12} y2={y + 12} stroke={colour} />
            </g>
          );
        })}
      </svg>
    </div>
  );
}
