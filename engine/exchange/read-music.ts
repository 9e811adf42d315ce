import { fromMidi } from './from-midi';
import { fromMusicXML, isMidi } from './from-musicxml';
import type { Candidate, ReadOptions } from './types';

/** The rhythms of a file, MIDI or MusicXML by its first bytes. @throws EngineError as `fromMidi` and `fromMusicXML` */
export const readMusic = (bytes: Uint8Array, options: ReadOptions = {}): Promise<Candidate[]> => (isMidi(bytes) ? fromMidi(bytes, options) : fromMusicXML(bytes, options));
