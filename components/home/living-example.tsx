'use client';

import { useEffect, useMemo, useRef, useState, useSyncExternalStore } from 'react';
import { type Reading, type StudyInput, clockOf, measureWords, metreOf, playEvents, threadsOf } from '@/engine';
import { Place } from '@/lib/client/place';
import { StudyPlayer } from '@/lib/client/player';
import { derive } from '@/lib/client/study-editor';
import { tint } from '../study/family';
import { type ThreadGeometry, rowY, threadPath, tickX } from '../study/thread-geometry';
import { useWidth } from '../study/use-width';
import { Choices } from '../study/choices';
import { Token } from '../ui/token';

const RATIOS = { '3/2': 'half as long again', '4/3': 'a third as long again', '5/4': 'a quarter as long again', '2': 'twice as long', '1/2': 'half as long' } as const;
type Ratio = keyof typeof RATIOS;
const READINGS = { forwards: 'forwards', 'backwards-values': 'backwards' } as const;
const BY = { values: 'backwards', attacks: 'backwards by attacks' } as const;

export type ExampleRule = { readonly ratio: Ratio; readonly reading: Extract<Reading, keyof typeof READINGS>; readonly by: keyof typeof BY };

/** The study behind the first page: three statements and all of it undone. */
export const exampleStudy = ({ ratio, reading, by }: ExampleRule): StudyInput => ({
  title: 'Towpath',
  metre: '3/4',
  tempo: { beat: '1/4', perMinute: '152' },
  subjects: [{ id: 's', name: 'Subject', rhythm: '3/4> 1/4 1/2 1/2 1' }],
  instruments: [
    { id: 'finger-cymbals', name: 'Finger cymbals', family: 'metal', sound: 'finger-cymbals' },
    { id: 'claves', name: 'Claves', family: 'wood', sound: 'claves' },
    { id: 'bongos', name: 'Bongos', family: 'skin', sound: 'bongos' },
  ],
  sections: [
    {
      id: 'out',
      name: 'Out',
      role: 'exposition',
      kind: 'process',
      subject: 's',
      process: { kind: 'proportion', ratio, count: 3, reading, entries: 'successive' },
      instruments: ['finger-cymbals', 'claves', 'bongos'],
    },
    { id: 'back', name: 'Back', role: 'recapitulation', kind: 'mirror', of: 'out', by },
  ],
});

const options = <T extends string>(words: Record<T, string>) => Object.entries(words) as [T, string][];

/** A sentence, its threads and its sound: what the whole product does, in one screen. */
export function LivingExample() {
  const [rule, setRule] = useState<ExampleRule>({ ratio: '3/2', reading: 'forwards', by: 'values' });
  const { study, built } = useMemo(() => derive(exampleStudy(rule)), [rule]);
  const { rows, threads, extent } = useMemo(() => threadsOf(built.statements, 'from-one-start'), [built]);
  const frame = useRef<HTMLDivElement>(null);
  const cursors = useRef<SVGGElement>(null);
  const width = useWidth(frame, 560);
  const label = 96;
  const geometry: ThreadGeometry = { left: 2, scale: (width - label) / extent.valueOf(), top: 16, pitch: 60 };
  const height = geometry.top + (rows.length - 1) * geometry.pitch + 18;

  const [{ player, place }] = useState(() => {
    const player = new StudyPlayer();
    return { player, place: new Place(() => (player.state.status === 'stopped' ? null : { seconds: player.position(), isMoving: true })) };
  });
  const playing = useSyncExternalStore(player.onStateChange, player.getState, player.getState);
  useEffect(() => {
    const clock = clockOf(study, built);
    place.setClock(clock);
    void player.load(playEvents(study, built), study.instruments, clock.total);
  }, [player, place, study, built]);
  useEffect(() => place.wake(), [place, playing.status]);
  useEffect(() => () => player.dispose(), [player]);
  const { scale } = geometry;
  useEffect(
    () =>
      place.watch((position) => {
        rows.forEach(({ statement }, index) => {
          const line = cursors.current?.children[index];
          const within = position === null ? -1 : position - statement.start.valueOf();
          const isIn = within >= 0 && within < statement.length.valueOf();
          line?.setAttribute('visibility', isIn ? 'visible' : 'hidden');
          if (isIn) line?.setAttribute('x', String(2 + within * scale - 1.25));
        });
      }),
    [place, rows, scale],
  );

  const isOn = playing.status === 'playing' || playing.status === 'preparing';
  const set = (change: Partial<ExampleRule>) => {
    setRule({ ...rule, ...change });
    return null;
  };
  const x = (row: number, tick: number) => tickX(geometry, rows[row]!.ticks[tick]!.at.valueOf());
  return (
    <div className="min-w-0">
      <p className="max-w-[46ch] font-serif text-[20px] leading-[1.6] sm:text-[22px]" data-testid="example-sentence">
        Each statement is{' '}
        <Token text={RATIOS[rule.ratio]} label="Each to the one before">
          {() => <Choices name="Each statement" value={rule.ratio} options={options<Ratio>(RATIOS)} onTry={(ratio) => set({ ratio })} />}
        </Token>
        , played{' '}
        <Token text={READINGS[rule.reading]} label="Reading">
          {() => <Choices name="Reading" value={rule.reading} options={options<ExampleRule['reading']>(READINGS)} onTry={(reading) => set({ reading })} />}
        </Token>
        , then all of it{' '}
        <Token text={BY[rule.by]} label="The return">
          {() => <Choices name="The return" value={rule.by} options={options<ExampleRule['by']>(BY)} onTry={(by) => set({ by })} />}
        </Token>
        .
      </p>
      <div ref={frame} className="mt-4 overflow-hidden">
        <svg width={width} height={height} className="block font-sans" role="img" aria-label={`${rows.length} statements: ${rows.map(({ statement }) => measureWords(statement.length, study.metre)).join(', ')}`}>
          {threads.map(({ row, from, to }) => {
            const turns = rows[row]!.statement.mirrored !== rows[row + 1]!.statement.mirrored;
            return (
              <path
                key={`${row}-${from}`}
                d={threadPath(geometry, row, x(row, from) + 1.6, x(row + 1, to) + 1.6)}
                fill="none"
                stroke="var(--ink)"
                strokeWidth={turns ? 1.5 : 0.8}
                opacity={turns ? 0.85 : 0.5}
              />
            );
          })}
          {rows.map(({ statement, ticks }, index) => {
            const y = rowY(geometry, index);
            const end = statement.length.valueOf() * scale;
            const section = study.sections.find(({ id }) => id === statement.section)!;
            return (
              <g key={statement.id}>
                <rect x={2} y={y - 1.5} width={end} height={3} fill={tint(study, statement.instrument)} />
                {ticks.map(({ at, value }) => (
                  <rect key={value} x={tickX(geometry, at.valueOf())} y={y - 9} width={3.4} height={18} fill={tint(study, statement.instrument)} />
                ))}
                <text x={end + 12} y={y + 5} fontSize={13.5} fill="var(--soft)">
                  {measureWords(statement.length, metreOf(study, section))}
                </text>
              </g>
            );
          })}
          <g ref={cursors}>
            {rows.map(({ statement }, index) => (
              <rect key={statement.id} visibility="hidden" y={rowY(geometry, index) - 15} width={2.5} height={30} fill="var(--ink)" />
            ))}
          </g>
        </svg>
      </div>
      <div className="mt-3 flex flex-wrap items-baseline gap-4">
        <button
          type="button"
          onClick={() => (isOn ? player.stop() : void player.play({ from: 0 }))}
          className="rounded border border-ink px-5 py-2.5 font-[560] hover:bg-wash"
        >
          {isOn ? 'Stop' : 'Hear this one'}
        </button>
        <span className="max-w-[46ch] text-[13px] text-soft">
          {playing.problem ?? 'Starts quiet and is limited. Percussion can harm hearing: turn it up with care, above all in headphones.'}
        </span>
      </div>
    </div>
  );
}
