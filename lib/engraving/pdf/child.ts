import { EngineError } from '@/engine';
import { openNodeEngraver } from '../node-environment';
import type { PrintMessage, PrintRequest } from './messages';
import { printStudy } from './print-study';

const say = (message: PrintMessage): void => void process.send?.(message);

/** A process of its own that prints, one study at a time, and ends with whoever started it. */
async function run(): Promise<void> {
  process.on('disconnect', () => process.exit());
  const engraver = await openNodeEngraver();
  let before = Promise.resolve();
  const print = async (request: PrintRequest): Promise<void> => {
    let all = 0;
    try {
      const file = await printStudy(engraver, request, (done, total) => {
        all = total;
        say({ kind: 'progress', done, total });
      });
      say({ kind: 'done', file, total: all });
    } catch (error) {
      if (error instanceof EngineError) say({ kind: 'refused', code: error.code, message: error.message });
      else say({ kind: 'fault', message: error instanceof Error ? (error.stack ?? error.message) : String(error) });
    }
  };
  process.on('message', (request: PrintRequest) => void (before = before.then(() => print(request))));
  say({ kind: 'ready' });
}

await run();
