import type { CSSProperties } from 'react';
import { stripLanes } from '@/lib/client/strip-lanes';
import type { Strip } from '@/lib/schemas/studies';
import { TEXTURES } from '../study/family';

const percent = (share: number): string => `${100 * share}%`;

function Part({ part: { from, to, family }, lane, count }: { part: Strip[number]['parts'][number]; lane: number; count: number }) {
  const style = {
    '--c': `var(--${family})`,
    left: `calc(${percent(from)} + 1px)`,
    width: `max(1px, calc(${percent(to - from)} - 1px))`,
    top: percent(lane / count),
    height: `calc(${percent(1 / count)} - ${count > 1 ? 1 : 0}px)`,
  } as CSSProperties;
  return <span className={`absolute ${TEXTURES[family]}`} style={style} />;
}

/** The form of a study drawn small, to scale in time: who plays when, section by section. */
export function SmallStrip({ strip }: { strip: Strip }) {
  return (
    <div aria-hidden className="flex h-[28px] border-r border-ink">
      {strip.map(({ share, parts }, index) => {
        const { lanes, count } = stripLanes(parts);
        return (
          <div key={index} className="relative shrink-0 border-l border-ink py-1" style={{ width: percent(share) }}>
            <div className="relative h-full">
              {parts.map((part, number) => (
                <Part key={number} part={part} lane={lanes[number]!} count={count} />
              ))}
            </div>
          </div>
        );
      })}
    </div>
  );
}
