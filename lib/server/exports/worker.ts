import 'server-only';
import { getDatabase } from '@/db/client';
import { failExport, finishExport, renewExport, sweepExports, takeExport } from '@/db/queries/export-jobs';
import { stampOf } from './page-options';
import { logFault } from '../log-fault';
import { Engraver, PrintError } from './engraver';

type Taken = NonNullable<Awaited<ReturnType<typeof takeExport>>>;

const RENEW_MS = 700;
const LOOK_MS = 2_000;
const SWEEP_MS = 10 * 60_000;

/** Takes prints that wait, one at a time, for as long as the server runs. */
class Worker {
  private readonly id = crypto.randomUUID();
  private readonly engraver = new Engraver();
  private readonly making = new Map<string, AbortController>();
  private wakeUp: () => void = () => undefined;
  private sweptAt = 0;

  /** Looks for a print at once. */
  readonly wake = (): void => this.wakeUp();
  /** Gives up a print that this process makes, if it does. */
  readonly abort = (job: string): void => this.making.get(job)?.abort();

  async run(): Promise<never> {
    for (let wasWell = true; ; ) {
      let found = false;
      try {
        found = await this.takeOne();
        wasWell = true;
      } catch (error) {
        // A database that is away is told of once.
        if (wasWell) logFault(error);
        wasWell = false;
      }
      if (!found) await this.rest();
    }
  }

  private rest(): Promise<void> {
    return new Promise((go) => {
      const timer = setTimeout(go, LOOK_MS);
      this.wakeUp = () => {
        clearTimeout(timer);
        go();
      };
    });
  }

  private async takeOne(): Promise<boolean> {
    if (Date.now() - this.sweptAt > SWEEP_MS) {
      await sweepExports(getDatabase());
      this.sweptAt = Date.now();
    }
    const job = await takeExport(getDatabase(), this.id);
    if (job) await this.make(job);
    return job !== undefined;
  }

  private async make(job: Taken): Promise<void> {
    const by = { id: job.id, worker: this.id };
    const control = new AbortController();
    this.making.set(job.id, control);
    let progress: { done: number; total: number | null } = { done: 0, total: null };
    const renewal = setInterval(() => {
      // Without an answer the lease runs on; whoever takes the print then is told of by the next answer.
      renewExport(getDatabase(), { ...by, ...progress }).then((isOurs) => !isOurs && control.abort(), () => undefined);
    }, RENEW_MS);
    try {
      if (!job.study) throw new PrintError('not_found', 'The study was thrown away before it could be printed.');
      const { options, study } = job;
      const { what, as, player, page } = options;
      const request = { study, what, as, player, options: page && { ...page, stamp: stampOf(job) }, madeAt: job.madeAt };
      const { total, ...file } = await this.engraver.print(request, (done, all) => void (progress = { done, total: all }), control.signal);
      await finishExport(getDatabase(), { ...by, file, pages: total });
    } catch (error) {
      if (control.signal.aborted) return;
      if (!(error instanceof PrintError)) throw error;
      await failExport(getDatabase(), { ...by, code: error.code, message: error.message });
    } finally {
      clearInterval(renewal);
      this.making.delete(job.id);
    }
  }
}

// On the global object: handlers are built apart from what starts with the server, and the development server loads anew.
const store = globalThis as typeof globalThis & { sesquiExports?: Worker };

/** Begins to take prints, once for the process. */
export function startExportWorker(): void {
  if (store.sesquiExports) return;
  store.sesquiExports = new Worker();
  void store.sesquiExports.run();
}

/** Has a print that was just asked for looked at now rather than in a moment. */
export const wakeExportWorker = (): void => store.sesquiExports?.wake();
/** Ends the making of a print that was given up, where this process makes it; another learns of it by itself. */
export const abortExport = (id: string): void => store.sesquiExports?.abort(id);
