'use client';

import { useEffect, useMemo, useState, useSyncExternalStore } from 'react';
import { type PlayEvent, clockOf, playEvents } from '@/engine';
import { Place } from '@/lib/client/place';
import { type PlayerState, StudyPlayer } from '@/lib/client/player';
import type { EditorSnapshot } from '@/lib/client/study-editor';

/** An attack of the subject that is to stand out, wherever that subject is stated. */
export type Followed = { readonly subject: string; readonly origin: number } | null;

/** The events of a study; a followed attack is struck harder, so that it can be heard in every statement. */
function eventsOf({ study, built }: EditorSnapshot, subject: string | null, origin: number | null): PlayEvent[] {
  const events = playEvents(study, built);
  if (subject === null || origin === null) return events;
  const same = new Set(built.statements.filter((s) => s.subject === subject).map(({ id }) => id));
  return events.map((event) => (event.origin === origin && same.has(event.statement) ? { ...event, accent: 'strong' } : event));
}

/** The player of a study and the place of its sound, kept in step with the document. */
export function usePlayer(state: EditorSnapshot, followed: Followed): { player: StudyPlayer; place: Place; playing: PlayerState } {
  const [{ player, place }] = useState(() => {
    const player = new StudyPlayer();
    const place = new Place(() => {
      const { status } = player.state;
      const seconds = player.position();
      return status === 'stopped' && seconds === 0 ? null : { seconds, isMoving: status === 'playing' };
    });
    return { player, place };
  });
  const playing = useSyncExternalStore(player.onStateChange, player.getState, player.getState);
  const { study, built } = state;
  const clock = useMemo(() => clockOf(study, built), [study, built]);

  useEffect(() => {
    place.setClock(clock);
  }, [place, clock]);
  const subject = followed?.subject ?? null;
  const origin = followed?.origin ?? null;
  useEffect(() => {
    void player.load(eventsOf(state, subject, origin), state.study.instruments, clock.total);
  }, [player, state, clock, subject, origin]);
  useEffect(() => place.wake(), [place, playing.status]);
  useEffect(() => () => player.dispose(), [player]);
  return { player, place, playing };
}
