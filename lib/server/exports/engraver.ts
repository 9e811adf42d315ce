import 'server-only';
import { type ChildProcess, fork } from 'node:child_process';
import type { PrintedFile, PrintMessage, PrintRequest } from '../../engraving/pdf/messages';
import { logFault } from '../log-fault';
import { PRINT_LIMITS } from './print-limits';

/** A print that was not made, with a code and a sentence. */
export class PrintError extends Error {
  constructor(
    readonly code: string,
    message: string,
  ) {
    super(message);
    this.name = 'PrintError';
  }
}

/** Where `scripts/lib/build.mjs` has put the program that prints. */
function program(): string {
  const at = process.env.SESQUI_ENGRAVER;
  if (!at) throw new PrintError('internal', 'This server was started without the program that prints. Start it with npm start, which makes it.');
  return at;
}

/**
 * Prints in a process of its own, one study at a time: drawing needs a browser's globals and all of a processor, which a web
 * server must not give. The process is kept for a minute after a print, and knows neither database nor secrets.
 */
export class Engraver {
  private child: ChildProcess | null = null;
  private idle: ReturnType<typeof setTimeout> | null = null;

  private open(): ChildProcess {
    if (this.idle) clearTimeout(this.idle);
    this.idle = null;
    if (this.child?.connected) return this.child;
    const { PATH, TZ } = process.env;
    const child = fork(program(), [], {
      serialization: 'advanced',
      execArgv: [`--max-old-space-size=${PRINT_LIMITS.megabytes}`, '--enable-source-maps'],
      env: { ...(PATH && { PATH }), ...(TZ && { TZ }), NODE_ENV: 'production' },
      stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
    });
    child.once('exit', () => void (this.child === child && (this.child = null)));
    this.child = child;
    return child;
  }

  /** Ends the process, whatever it does. */
  close(): void {
    if (this.idle) clearTimeout(this.idle);
    this.idle = null;
    this.child?.kill('SIGKILL');
    this.child = null;
  }

  /**
   * @param onProgress - told what is made, and how much there will be
   * @param signal - gives it up, and ends the process
   * @throws PrintError with the reason; AbortError where it was given up
   */
  async print(request: PrintRequest, onProgress: (done: number, total: number) => void, signal: AbortSignal): Promise<PrintedFile & { readonly total: number }> {
    signal.throwIfAborted();
    const child = this.open();
    try {
      return await new Promise((resolve, reject) => {
        const settle = (act: () => void) => {
          clearTimeout(late);
          child.off('message', onMessage).off('exit', onExit).off('error', onExit);
          signal.removeEventListener('abort', onAbort);
          act();
        };
        const fail = (error: unknown) =>
          settle(() => {
            this.close();
            reject(error);
          });
        const onAbort = () => fail(signal.reason);
        const onExit = () =>
          fail(new PrintError('print_stopped', 'This could not be made: it needed more memory than there is for it. Print the parts one by one, or fewer sections at a time.'));
        const late = setTimeout(
          () => fail(new PrintError('print_too_long', `This took longer than ${PRINT_LIMITS.minutes} minutes and was given up. Print the parts one by one, or fewer sections at a time.`)),
          PRINT_LIMITS.minutes * 60_000,
        );
        const onMessage = (message: PrintMessage) => {
          if (message.kind === 'progress') onProgress(message.done, message.total);
          else if (message.kind === 'refused') settle(() => reject(new PrintError(message.code, message.message)));
          else if (message.kind === 'fault') {
            logFault(new Error(`A print failed. ${message.message}`));
            settle(() => reject(new PrintError('internal', 'Something went wrong on our side while this was drawn. The study itself is safe; try again, or export MusicXML meanwhile.')));
          } else if (message.kind === 'done') {
            if (message.file.bytes.byteLength > PRINT_LIMITS.bytes) {
              fail(new PrintError('print_too_large', `The file would be larger than ${PRINT_LIMITS.bytes / 1024 / 1024} MB. Print the parts one by one.`));
            } else settle(() => resolve({ ...message.file, total: message.total }));
          }
        };
        child.on('message', onMessage).once('exit', onExit).once('error', onExit);
        signal.addEventListener('abort', onAbort, { once: true });
        child.send(request, (error) => void (error && onExit()));
      });
    } finally {
      if (this.child) {
        this.idle = setTimeout(() => this.close(), PRINT_LIMITS.idleSeconds * 1000);
        this.idle.unref();
      }
    }
  }
}
