'use client';

import { useEffect, useState, useSyncExternalStore } from 'react';
import { type Rhythm, type StudyInput, buildStudy, clockOf, formatRhythm, parseStudy, playEvents } from '@/engine';
import { type PlayerState, StudyPlayer } from '@/lib/client/player';

const study = (rhythm: Rhythm): StudyInput => ({
  title: 'Heard',
  metre: '4/4',
  tempo: { beat: '1/4', perMinute: '96' },
  instruments: [{ id: 'claves', name: 'Claves', family: 'wood', sound: 'claves' }],
  sections: [{ id: 'line', name: 'Line', role: 'other', kind: 'free', lines: [{ instrument: 'claves', rhythm: formatRhythm(rhythm) }] }],
});

/** Plays one rhythm at a time, quietly, by one instrument. */
export function useHearing(): { playing: PlayerState; heard: string | null; hear: (name: string, rhythm: Rhythm) => void; stop: () => void } {
  const [player] = useState(() => new StudyPlayer());
  const [heard, setHeard] = useState<string | null>(null);
  const playing = useSyncExternalStore(player.onStateChange, player.getState, player.getState);
  useEffect(() => () => player.dispose(), [player]);
  const hear = (name: string, rhythm: Rhythm) => {
    const document = parseStudy(study(rhythm));
    const built = buildStudy(document);
    player.stop();
    setHeard(name);
    void player.load(playEvents(document, built), document.instruments, clockOf(document, built).total).then(() => player.play({ from: 0 }));
  };
  const stop = () => player.stop();
  return { playing, heard: playing.status === 'stopped' ? null : heard, hear, stop };
}
