import { buildStudy, packMxl, statementsCsv, type Study, toMidi, toMusicXML } from '@/engine';

/** What the engine writes by itself; `mid` and `csv` are of the whole study only. */
export const MUSIC_KINDS = ['musicxml', 'mxl', 'mid', 'csv'] as const;
export type MusicKind = (typeof MUSIC_KINDS)[number];

/**
 * A study as a file for other programs.
 * @param player - id of the player whose part it is; the whole study without
 * @throws EngineError where it cannot be written, with the reason
 */
export function musicFile(study: Study, kind: MusicKind, player?: string): Uint8Array {
  const part = player === undefined ? {} : { part: player };
  switch (kind) {
    case 'musicxml':
      return new TextEncoder().encode(toMusicXML(study, part));
    case 'mxl':
      return packMxl(toMusicXML(study, part));
    case 'mid':
      return toMidi(study);
    case 'csv':
      return new TextEncoder().encode(statementsCsv(study, buildStudy(study)));
  }
}
