import type { Study } from '@/engine';
import { ApiError } from './get-json';
import type { StudyEditor } from './study-editor';

export type SaveRequest = { readonly document: Study; readonly baseVersion: number; readonly saveId: string };
export type Saved = { readonly version: number; readonly updatedAt: Date };

/** How the saving of a study stands. */
export type SaveState =
  | { readonly kind: 'saved'; readonly version: number; readonly at: Date | null }
  | { readonly kind: 'saving'; readonly version: number }
  /** no connection, or a server that is down or busy: tried again by itself */
  | { readonly kind: 'waiting'; readonly why: string }
  | { readonly kind: 'signed-out' }
  /** somebody saved another version first: nothing is sent until a choice is made */
  | { readonly kind: 'conflict' }
  /** the study was deleted elsewhere, or is no longer one's own */
  | { readonly kind: 'gone' }
  /** the server will not take this document; the next change is tried anew */
  | { readonly kind: 'refused'; readonly why: string };

const SETTLE_MS = 700;
const FIRST_RETRY_MS = 2_000;
const LONGEST_RETRY_MS = 30_000;

/**
 * Saves a study by itself: a moment after a change, one save at a time, and again after a lost connection. A save whose
 * answer was lost is sent again under the same id, so that it counts once. What is not saved yet stays in the editor's
 * draft. No React here.
 */
export class StudySaver {
  private state: SaveState;
  private saved: Study;
  private pending: SaveRequest | null = null;
  private isBusy = false;
  private timer: ReturnType<typeof setTimeout> | null = null;
  private retryMs = FIRST_RETRY_MS;
  private isStopped = true;
  private unsubscribe: (() => void) | null = null;
  private readonly listeners = new Set<() => void>();

  /**
   * @param saved - the document as the server has it
   * @param send - sends one save; rejects with an ApiError
   */
  constructor(
    private readonly editor: StudyEditor,
    saved: Study,
    at: Date | null,
    private readonly send: (request: SaveRequest) => Promise<Saved>,
    private readonly makeId: () => string = () => crypto.randomUUID(),
  ) {
    this.saved = saved;
    this.state = { kind: 'saved', version: editor.version ?? 0, at };
  }

  readonly getState = (): SaveState => this.state;
  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  start(): void {
    this.isStopped = false;
    this.unsubscribe = this.editor.subscribe(() => this.schedule(SETTLE_MS));
    this.schedule(0);
  }

  stop(): void {
    this.isStopped = true;
    this.unsubscribe?.();
    if (this.timer !== null) clearTimeout(this.timer);
    this.timer = null;
  }

  /** Tries at once: the connection is back, or somebody signed in again. */
  retryNow(): void {
    if (this.state.kind === 'waiting' || this.state.kind === 'signed-out') this.schedule(0, true);
  }

  /** A conflict is known before anything is sent: the draft stands on an older version than the server's. */
  holdForConflict(): void {
    this.show({ kind: 'conflict' });
  }

  /** The conflict was settled: the document was, or is to be, saved on top of this version. */
  settle(saved: Study, version: number, at: Date): void {
    this.pending = null;
    this.saved = saved;
    this.editor.markSaved(saved, version);
    this.show({ kind: 'saved', version, at });
    this.schedule(0);
  }

  private show(state: SaveState): void {
    this.state = state;
    for (const listener of this.listeners) listener();
  }

  private isHeld(): boolean {
    return this.state.kind === 'conflict' || this.state.kind === 'gone';
  }

  private schedule(delay: number, restart = false): void {
    if (this.isStopped || this.isBusy || this.isHeld()) return;
    if (this.timer !== null) {
      // While one waits for the connection, further changes do not hurry it.
      if (!restart && this.state.kind === 'waiting') return;
      clearTimeout(this.timer);
    }
    this.timer = setTimeout(() => void this.save(), delay);
  }

  private async save(): Promise<void> {
    this.timer = null;
    const { study } = this.editor.getSnapshot();
    if (this.pending === null) {
      if (study === this.saved) return;
      this.pending = { document: study, baseVersion: this.editor.version ?? 0, saveId: this.makeId() };
    }
    const request = this.pending;
    this.isBusy = true;
    if (this.state.kind !== 'waiting') this.show({ kind: 'saving', version: request.baseVersion });
    try {
      const { version, updatedAt } = await this.send(request);
      this.pending = null;
      this.retryMs = FIRST_RETRY_MS;
      this.saved = request.document;
      this.editor.markSaved(request.document, version);
      this.show({ kind: 'saved', version, at: updatedAt });
      this.isBusy = false;
      this.schedule(SETTLE_MS);
    } catch (error) {
      this.isBusy = false;
      this.fail(error);
    }
  }

  private fail(error: unknown): void {
    if (!(error instanceof ApiError)) throw error;
    const { status, message } = error;
    if (status === 409) this.show({ kind: 'conflict' });
    else if (status === 401) this.show({ kind: 'signed-out' });
    else if (status === 404) this.show({ kind: 'gone' });
    else if (status === 0 || status === 429 || status >= 500) {
      this.show({ kind: 'waiting', why: message });
      this.schedule(this.retryMs, true);
      this.retryMs = Math.min(this.retryMs * 2, LONGEST_RETRY_MS);
    } else {
      // The document itself is refused: the same bytes would be refused again.
      this.pending = null;
      this.show({ kind: 'refused', why: message });
    }
  }
}
