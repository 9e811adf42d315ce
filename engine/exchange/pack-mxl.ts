import { strToU8, zipSync } from 'fflate';

const CONTAINER =
  '<?xml version="1.0" encoding="UTF-8"?>\n<container><rootfiles><rootfile full-path="score.musicxml" media-type="application/vnd.recordare.musicxml+xml"/></rootfiles></container>\n';
/** Always the same, so that the same score gives the same bytes; the format has no earlier year. */
const TIME = '1980-01-01T00:00:00';

/**
 * MusicXML as a compressed file: `mimetype` first and stored, then the container, then the score.
 * @see MusicXML 4.0, Compressed .mxl files
 */
export function packMxl(musicXml: string): Uint8Array {
  const mtime = TIME;
  return zipSync(
    {
      mimetype: [strToU8('application/vnd.recordare.musicxml'), { level: 0, mtime }],
      'META-INF/container.xml': [strToU8(CONTAINER), { mtime }],
      'score.musicxml': [strToU8(musicXml), { level: 9, mtime }],
    },
    { mtime },
  );
}
