'use client';

import { type ReactNode, useState } from 'react';
import type { SoundWish } from '@/lib/client/sound-export/export-sound';
import type { SampleFormat } from '@/lib/client/sound-export/wav';
import { Segments } from '../ui/segments';
import { useStudy } from './context';
import { HearingCaution } from './hearing';
import type { Make } from './use-work';

const FIELD = 'rounded border border-hair bg-paper px-2 py-1.5';

/** The study as sound files: the mix, a stem for each instrument, a click for each player. */
export function SoundGroup({ word, row }: { word: (text: string, what: string, make: Make) => ReactNode; row: (name: string, content: ReactNode) => ReactNode }) {
  const { state } = useStudy();
  const { study, built } = state;
  const [format, setFormat] = useState<SampleFormat>({ rate: 44_100, bits: 24 });
  const [countIn, setCountIn] = useState('');
  const [withMusic, setWithMusic] = useState(false);

  const made =
    (wish: SoundWish): Make =>
    async (onProgress, signal) => {
      // Tone comes with the player; a page that exports nothing needs none of this.
      const { exportSound } = await import('@/lib/client/sound-export/export-sound');
      let shown = -1;
      return exportSound(study, built, wish, {
        format,
        signal,
        onProgress: (share) => {
          const percent = Math.min(99, Math.floor(share * 100));
          if (percent !== shown) onProgress({ done: (shown = percent), total: 100 });
        },
      });
    };
  const clicks = (players: readonly string[]): SoundWish => ({ what: 'clicks', players, withMusic, ...(countIn === '' ? {} : { countIn: Number(countIn) }) });

  return (
    <>
      <div className="mb-2 flex flex-wrap items-center gap-x-4 gap-y-2">
        <Segments label="Size of a sample" value={String(format.bits)} options={[['24', '24 bits'], ['16', '16 bits']]} onChange={(bits) => setFormat({ ...format, bits: bits === '16' ? 16 : 24 })} />
        <Segments label="Samples a second" value={String(format.rate)} options={[['44100', '44.1 kHz'], ['48000', '48 kHz']]} onChange={(rate) => setFormat({ ...format, rate: rate === '48000' ? 48_000 : 44_100 })} />
      </div>
      {row('All together', word('WAV', 'The sound as WAV', made({ what: 'mix' })))}
      {row('One for each instrument', word('zip of WAVs', 'Stems as zip of WAVs', made({ what: 'stems' })))}
      {study.players.length > 0 && (
        <>
          <div className="mt-3 mb-1 flex flex-wrap items-center gap-x-4 gap-y-2 text-[13.5px]">
            <label className="flex items-center gap-2">
              <span className="text-soft">Count-in</span>
              <select value={countIn} onChange={(event) => setCountIn(event.target.value)} className={FIELD}>
                <option value="">usual</option>
                {[0, 1, 2, 3, 4].map((count) => (
                  <option key={count} value={count}>
                    {count === 0 ? 'none' : count === 1 ? '1 measure' : `${count} measures`}
                  </option>
                ))}
              </select>
            </label>
            <label className="flex cursor-pointer items-baseline gap-2">
              <input type="checkbox" checked={withMusic} onChange={(event) => setWithMusic(event.target.checked)} className="accent-ink" />
              Click over the music
            </label>
          </div>
          {study.players.map(({ id, name }) => (
            <span key={id}>{row(`Click for ${name}`, word('WAV', `Click for ${name} as WAV`, made(clicks([id]))))}</span>
          ))}
          {study.players.length > 1 && row('Clicks for everybody', word('zip of WAVs', 'Clicks as zip of WAVs', made(clicks(study.players.map(({ id }) => id)))))}
          <p className="mt-1 text-[13.5px] text-soft">Slow beats are divided; the measure before an entry after a long rest clicks higher.</p>
        </>
      )}
      <HearingCaution className="mt-2" />
    </>
  );
}
