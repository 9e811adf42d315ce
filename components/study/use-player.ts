'use client';

import { useEffect, useMemo, useState, useSyncExternalStore } from 'react';
import { clockOf, playEvents } from '@/engine';
import { Place } from '@/lib/client/place';
import { type PlayerState, StudyPlayer } from '@/lib/client/player';
import type { EditorSnapshot } from '@/lib/client/study-editor';

/** The player of a study and the place of its sound, kept in step with the document. */
export function usePlayer(state: EditorSnapshot): { player: StudyPlayer; place: Place; playing: PlayerState } {
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
    void player.load(playEvents(study, built), study.instruments, clock.total);
  }, [player, place, clock, study, built]);
  useEffect(() => place.wake(), [place, playing.status]);
  useEffect(() => () => player.dispose(), [player]);
  return { player, place, playing };
}
