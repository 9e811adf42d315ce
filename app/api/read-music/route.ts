import { readMusicResponse } from '@/lib/schemas/music';
import { jsonResponse } from '@/lib/server/json-response';
import { readMusicFile } from '@/lib/server/read-music-file';
import { withPublic } from '@/lib/server/with-access';

// POST /api/read-music: the lines of a MusicXML or MIDI file, sent as it is
export const POST = withPublic('POST /api/read-music', async ({ body }) => jsonResponse(readMusicResponse, await readMusicFile(body as Uint8Array)));
