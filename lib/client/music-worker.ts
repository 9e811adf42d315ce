import { EngineError, formatFraction, midiDivision, type Study } from '@/engine';
import { musicFile, type MusicKind } from '../music-files';

/** What is asked of the thread that writes files, so that the page goes on meanwhile. */
export type MusicAsked = { readonly study: Study; readonly player?: string | undefined; readonly kind: MusicKind | 'division' };
export type MusicAnswer =
  | { readonly bytes: Uint8Array<ArrayBuffer> }
  | { readonly division: { readonly ticks: number; readonly isExact: boolean; readonly worst: string } }
  | { readonly refused: string };

const answer = ({ study, player, kind }: MusicAsked): MusicAnswer => {
  if (kind !== 'division') return { bytes: new Uint8Array(musicFile(study, kind, player)) };
  const { division, exact, worst } = midiDivision(study);
  return { division: { ticks: division, isExact: exact, worst: formatFraction(worst) } };
};

self.onmessage = ({ data }: MessageEvent<MusicAsked>) => {
  try {
    self.postMessage(answer(data));
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    self.postMessage({ refused: error.message } satisfies MusicAnswer);
  }
};
