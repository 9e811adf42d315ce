'use client';

import { useRef } from 'react';
import { useWidth } from '../study/use-width';

export type Bar = {
  /** from the left edge, in any unit */
  readonly start?: number;
  readonly length: number;
  readonly label: string;
  /** where ticks stand, from the start of the bar */
  readonly ticks: readonly number[];
  readonly isWrong?: boolean;
  readonly isQuiet?: boolean;
  /** where it would end if it held */
  readonly wanted?: number;
};

const PITCH = 38;
const MOST_TICKS = 400;

/** Lengths to scale, one under the other, each with its ticks and its number. `meets` draws a line through all. */
export function Bars({ bars, label, meets }: { bars: readonly Bar[]; label: string; meets?: number }) {
  const frame = useRef<HTMLDivElement>(null);
  const width = useWidth(frame, 520);
  const extent = Math.max(...bars.map(({ start = 0, length, wanted = 0 }) => Math.max(start + length, wanted)), meets ?? 0, 1e-9);
  const scale = Math.max(width - 92, 40) / extent;
  return (
    <div ref={frame} className="overflow-hidden">
      <svg width={width} height={bars.length * PITCH + 8} role="img" aria-label={label} className="block font-sans">
        {bars.map(({ start = 0, length, label: name, ticks, isWrong, isQuiet, wanted }, index) => {
          const y = 22 + index * PITCH;
          const x = 1 + start * scale;
          const colour = isWrong ? 'var(--mark)' : isQuiet ? 'var(--soft)' : 'var(--ink)';
          return (
            <g key={index}>
              <rect x={x} y={y - 1.5} width={Math.max(length * scale, 1)} height={3} fill={colour} />
              {ticks.slice(0, MOST_TICKS).map((tick) => (
                <rect key={tick} x={x + tick * scale} y={y - 9} width={2.2} height={18} fill={colour} />
              ))}
              {wanted !== undefined && <line x1={1 + wanted * scale} x2={1 + wanted * scale} y1={y - 12} y2={y + 12} stroke="var(--mark)" strokeWidth={1.5} strokeDasharray="2 3" />}
              <text x={x + length * scale + 9} y={y + 5} fontSize={14} fill={isWrong ? 'var(--mark)' : 'var(--ink)'}>
                {name}
              </text>
            </g>
          );
        })}
        {meets !== undefined && <line x1={1 + meets * scale} x2={1 + meets * scale} y1={6} y2={bars.length * PITCH + 4} stroke="var(--ink)" strokeWidth={2.5} />}
      </svg>
    </div>
  );
}

/** A tick for each unit that begins within a length. */
export function unitTicks(length: number, unit = 1): number[] {
  const count = Math.min(MOST_TICKS, Math.ceil(length / unit - 1e-9));
  return Array.from({ length: count }, (_, index) => index * unit);
}
