'use client';

import { useEffect, useRef, useState, useSyncExternalStore } from 'react';
import { Fraction, type Statement, clockOf, formatClock, measureAt, tempoOf, tempoWords, totalLength } from '@/engine';
import type { PlayOptions, PlayerState, StudyPlayer } from '@/lib/client/player';
import { PLAYER } from '@/lib/client/player';
import { Button } from '../ui/button';
import { useStudy, useValueNames } from './context';
import { HearingCaution } from './hearing';

/** Where an attack of the subject comes in a statement, in whole notes from the study's start. */
function attackStart({ rhythm, origins, start }: Statement, origin: number): Fraction | null {
  const value = origins.indexOf(origin);
  return value === -1 ? null : start.add(totalLength(rhythm.slice(0, value)));
}

const SPEEDS = [1, 0.75, 0.5, 0.25] as const;
const READ_KEY = 'sesqui.hearing-read';

const never = () => () => {};
/** Whether this browser has been shown the caution before. */
const hasRead = () => localStorage.getItem(READ_KEY) === 'yes';

const BAR_BUTTON = 'rounded px-2 py-1.5 font-[550] hover:bg-paper/15 disabled:opacity-45 focus-visible:outline-paper';
const PANEL = 'absolute bottom-full right-3 mb-2 w-[min(30rem,calc(100vw-24px))] border border-ink bg-paper p-5 text-ink sm:right-12';

function InstrumentsHeard({ player, playing }: { player: StudyPlayer; playing: PlayerState }) {
  const { state } = useStudy();
  const toggle = (list: readonly string[], id: string) => (list.includes(id) ? list.filter((one) => one !== id) : [...list, id]);
  return (
    <fieldset className={`${PANEL} max-h-[60vh] overflow-y-auto`}>
      <legend className="sr-only">What is heard</legend>
      <table className="w-full text-left text-[14px]">
        <thead>
          <tr className="text-[13px] text-soft">
            <th className="pb-1 font-normal">Instrument</th>
            <th className="pb-1 font-normal">Alone</th>
            <th className="pb-1 font-normal">Silent</th>
          </tr>
        </thead>
        <tbody>
          {state.study.instruments.map(({ id, name }) => (
            <tr key={id} className="border-t border-hair">
              <th scope="row" className="py-1.5 font-semibold">
                {name}
              </th>
              <td>
                <input
                  type="checkbox"
                  className="h-5 w-5 accent-ink"
                  aria-label={`${name} alone`}
                  checked={playing.solo.includes(id)}
                  onChange={() => player.setSolo(toggle(playing.solo, id))}
                />
              </td>
              <td>
                <input
                  type="checkbox"
                  className="h-5 w-5 accent-ink"
                  aria-label={`${name} silent`}
                  checked={playing.muted.includes(id)}
                  onChange={() => player.setMuted(toggle(playing.muted, id))}
                />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </fieldset>
  );
}

/** Play, stop, place, speed, loop, volume, and what is heard; always at the foot of the page. */
export function TransportBar({ player, playing }: { player: StudyPlayer; playing: PlayerState }) {
  const { state, selection, place } = useStudy();
  const valueNames = useValueNames();
  const { study, built, measures } = state;
  const clock = clockOf(study, built);
  const read = useSyncExternalStore(never, hasRead, () => true);
  const [isAsking, setAsking] = useState<PlayOptions | 'resume' | null>(null);
  const [isRead, setRead] = useState(false);
  const [panel, setPanel] = useState<'heard' | 'sound' | null>(null);
  const [isLoop, setLoop] = useState(false);
  const now = useRef<HTMLSpanElement>(null);
  const slider = useRef<HTMLInputElement>(null);
  const fill = useRef<HTMLDivElement>(null);

  const section = built.sections.find(({ id }) => id === selection.section)!;
  const statement = built.statements.find(({ id }) => id === selection.statement);
  const chosen = statement ?? section;
  const seconds = (position: Fraction) => clock.secondsAt(position);
  // From here is from the chosen attack where one is chosen, else from the start of the statement or section.
  const attack = statement && selection.origin !== null ? attackStart(statement, selection.origin) : null;
  const here = seconds(attack ?? chosen.start);
  const choice: PlayOptions = { from: seconds(chosen.start), to: seconds(chosen.start.add(chosen.length)), loop: true };
  const total = clock.total.valueOf();

  useEffect(
    () =>
      place.watch((position) => {
        const at = position ?? 0;
        const measure = measures.findLast((one) => one.start.valueOf() <= at + 1e-9);
        const time = place.secondsAt(at);
        const words = `measure ${measure?.number ?? 1} · ${formatClock(new Fraction(Math.round(time * 1000), 1000))}`;
        if (now.current && now.current.textContent !== words) now.current.textContent = words;
        if (slider.current && document.activeElement !== slider.current) slider.current.value = String(measure?.index ?? 0);
        if (fill.current) fill.current.style.left = `${total === 0 ? 0 : (100 * time) / total}%`;
      }),
    [place, measures, total],
  );

  const play = (options: PlayOptions | 'resume') => {
    if (!read && !isRead) {
      setAsking(options);
      return;
    }
    void player.play(options === 'resume' ? undefined : options);
  };
  const start = () => {
    if (playing.status === 'playing' || playing.status === 'preparing') player.pause();
    else play(isLoop && playing.status === 'stopped' ? choice : 'resume');
  };
  const startRef = useRef(start);
  useEffect(() => {
    startRef.current = start;
  });
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      const target = event.target as HTMLElement;
      if (event.code !== 'Space' || event.ctrlKey || event.metaKey || target.closest('input, textarea, select, button, a, summary, [role="slider"], [role="dialog"]')) return;
      event.preventDefault();
      startRef.current();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, []);

  const toggleLoop = () => {
    const next = !isLoop;
    setLoop(next);
    if (playing.status !== 'playing') return;
    player.setPassage(next ? choice : { from: player.position() });
  };
  const isOn = playing.status === 'playing' || playing.status === 'preparing';
  const measureIndex = measureAt(measures, chosen.start)?.index ?? 0;

  return (
    <div role="region" aria-label="Playback" className="fixed inset-x-0 bottom-0 z-40 bg-ink text-[14px] text-paper" onKeyDown={(event) => event.key === 'Escape' && (setPanel(null), setAsking(null))}>
      {isAsking !== null && (
        <div role="dialog" aria-label="Before the first sound" className={PANEL}>
          <HearingCaution />
          <Button
            kind="strong"
            autoFocus
            className="mt-3"
            onClick={() => {
              localStorage.setItem(READ_KEY, 'yes');
              setRead(true);
              setAsking(null);
              void player.play(isAsking === 'resume' ? undefined : isAsking);
            }}
          >
            Play quietly
          </Button>
        </div>
      )}
      {panel === 'heard' && <InstrumentsHeard player={player} playing={playing} />}
      {panel === 'sound' && (
        <div role="group" aria-label="Sound" className={PANEL}>
          <label className="block">
            {`Volume: ${Math.round(playing.volume)} dB`}
            <input
              type="range"
              min={PLAYER.quietest}
              max={0}
              step={1}
              value={playing.volume}
              onChange={(event) => player.setVolume(Number(event.target.value))}
              className="mt-1 block w-full accent-ink"
            />
          </label>
          <HearingCaution className="mt-3" />
        </div>
      )}
      {playing.problem && (
        <p role="alert" className={PANEL}>
          {playing.problem}
        </p>
      )}
      <div className="flex flex-wrap items-center gap-x-2 gap-y-1 px-3 py-2 sm:gap-x-4 sm:px-8 lg:px-12">
        <button type="button" className={`${BAR_BUTTON} flex w-[5.6rem] items-center gap-2`} onClick={start} aria-label={isOn ? 'Pause' : 'Play'}>
          <svg aria-hidden width="14" height="16" viewBox="0 0 14 16" fill="currentColor">
            {isOn ? <path d="M1 0h4v16H1zM9 0h4v16H9z" /> : <path d="M0 0v16l13-8z" />}
          </svg>
          {playing.preparing ? `${playing.preparing.done}/${playing.preparing.total}` : isOn ? 'Pause' : 'Play'}
        </button>
        <button type="button" className={BAR_BUTTON} onClick={() => player.stop()} disabled={playing.status === 'stopped'}>
          Stop
        </button>
        <button type="button" className={BAR_BUTTON} onClick={() => play({ from: here })}>
          From here
        </button>
        <button type="button" className={`${BAR_BUTTON} aria-pressed:bg-paper aria-pressed:text-ink`} aria-pressed={isLoop} onClick={toggleLoop}>
          Loop choice
        </button>
        <span ref={now} className="order-first w-full whitespace-nowrap sm:order-none sm:w-[8.6rem]" data-testid="now" />
        <div className="relative hidden h-7 min-w-40 flex-1 md:block">
          {built.sections.map(({ id, start: from, length }) => {
            const a = seconds(from).valueOf();
            const b = seconds(from.add(length)).valueOf();
            return (
              <div
                key={id}
                className={`absolute top-3 h-1 ${id === selection.section ? 'bg-paper' : 'bg-paper/45'}`}
                style={{ left: `${(100 * a) / total}%`, width: `calc(${(100 * (b - a)) / total}% - 3px)` }}
              />
            );
          })}
          <div ref={fill} className="pointer-events-none absolute inset-y-0 w-0.5 bg-paper" style={{ left: 0 }} />
          <input
            ref={slider}
            type="range"
            aria-label="Place, by measure"
            min={0}
            max={Math.max(measures.length - 1, 0)}
            step={1}
            defaultValue={measureIndex}
            onChange={(event) => {
              const measure = measures[Number(event.target.value)];
              if (measure) player.seek(seconds(measure.start));
              place.wake();
            }}
            className="absolute inset-0 w-full cursor-pointer opacity-0 focus-visible:opacity-60"
          />
        </div>
        <span className="hidden lg:inline">{tempoWords(tempoOf(study, study.sections.find(({ id }) => id === selection.section)!), { valueNames })}</span>
        <label className="flex items-center gap-1.5">
          <span className="sr-only">Speed</span>
          <select
            value={playing.speed}
            onChange={(event) => player.setSpeed(Number(event.target.value))}
            className="rounded border border-paper/50 bg-ink px-1.5 py-1 focus-visible:outline-paper"
          >
            {SPEEDS.map((speed) => (
              <option key={speed} value={speed}>
                {speed === 1 ? 'full speed' : `${speed * 100} %`}
              </option>
            ))}
          </select>
        </label>
        <button type="button" className={BAR_BUTTON} aria-expanded={panel === 'heard'} onClick={() => setPanel(panel === 'heard' ? null : 'heard')}>
          {playing.solo.length > 0 ? `Alone: ${playing.solo.length}` : playing.muted.length > 0 ? `Silent: ${playing.muted.length}` : 'Heard: all'}
        </button>
        <button type="button" className={BAR_BUTTON} aria-expanded={panel === 'sound'} onClick={() => setPanel(panel === 'sound' ? null : 'sound')}>
          Volume
        </button>
        <span className="hidden sm:inline">{formatClock(clock.total)}</span>
      </div>
    </div>
  );
}
