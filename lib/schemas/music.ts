import { z } from 'zod';

/** What a file of music holds: its lines, each as rhythm text, exact. */
export const readMusicResponse = z.object({
  candidates: z.array(
    z.object({
      name: z.string().describe('The part and voice, or track and channel'),
      metre: z.string(),
      tempo: z.object({ beat: z.string(), perMinute: z.string() }),
      rhythm: z.string().describe('Rhythm text of the whole line'),
      warnings: z.array(z.string()).describe('What was left out, supposed or found odd'),
    }),
  ),
});
export type ReadMusicResponse = z.output<typeof readMusicResponse>;
