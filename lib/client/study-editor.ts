import {
  type BuiltStudy,
  type DescribeContext,
  EngineError,
  type Study,
  type StudyInput,
  buildStudy,
  describeContext,
  parseStudy,
} from '@/engine';
import { type Draft, deleteDraft, writeDraft } from './study-draft';

/** A study and everything that the engine makes of it, worked out together once for each change. */
export type Derived = DescribeContext & { readonly study: Study; readonly built: BuiltStudy };

export type EditorSnapshot = Derived & {
  readonly canUndo: boolean;
  readonly canRedo: boolean;
  /** whether it differs from what was opened */
  readonly isChanged: boolean;
  /** whether the browser refused to keep the last change */
  readonly isUnkept: boolean;
  readonly texts: Readonly<Record<string, string>>;
};

/** @throws EngineError where the document cannot be built */
export function derive(document: StudyInput): Derived {
  const study = parseStudy(document);
  return describeContext(study, buildStudy(study));
}

/** Marks of the browser's own timeline: a change begins, the study is drawn, a system of the score is drawn. */
export const CHANGE_MARK = 'sesqui:change';
export const DRAWN_MARK = 'sesqui:drawn';
export const SYSTEM_MARK = 'sesqui:system';

/** Where drafts are kept: the browser's storage, or a test's. */
export type DraftStorage = { readonly keep: (id: string, draft: Draft) => boolean; readonly forget: (id: string) => void };

const HISTORY = 500;
const KEEP_AFTER_MS = 200;

/**
 * The state of one open study: its document, undo and redo, and the draft in the browser. The document always builds: a
 * change that would not is refused with the engine's error, and nothing is lost. No React here.
 */
export class StudyEditor {
  private past: Study[] = [];
  private future: Study[] = [];
  private current: Derived;
  private texts: Record<string, string>;
  private snapshot: EditorSnapshot;
  private isChanged: boolean;
  private isUnkept = false;
  private timer: ReturnType<typeof setTimeout> | null = null;
  private readonly listeners = new Set<() => void>();

  /** @throws EngineError where the document cannot be built */
  constructor(
    readonly id: string,
    document: StudyInput,
    private baseVersion: number | null,
    draft: Draft | null,
    private readonly storage: DraftStorage = { keep: writeDraft, forget: deleteDraft },
  ) {
    this.current = derive(draft?.document ?? document);
    this.texts = { ...draft?.texts };
    this.isChanged = draft !== null;
    this.snapshot = this.take();
  }

  readonly getSnapshot = (): EditorSnapshot => this.snapshot;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  /** Changes the document. @returns the engine's error where the change is refused, else null */
  edit(change: (study: Study) => StudyInput): EngineError | null {
    performance.clearMarks(CHANGE_MARK);
    performance.mark(CHANGE_MARK);
    try {
      const next = derive(change(this.current.study));
      this.past = [...this.past.slice(-HISTORY), this.current.study];
      this.future = [];
      this.show(next);
      return null;
    } catch (error) {
      if (error instanceof EngineError) return error;
      throw error;
    }
  }

  /** Keeps a text that is being typed, also while it does not build; null forgets it. */
  type(field: string, text: string | null): void {
    if (text === null) delete this.texts[field];
    else this.texts[field] = text;
    this.isChanged = true;
    this.publish();
  }

  undo(): void {
    const before = this.past.pop();
    if (before === undefined) return;
    this.future.push(this.current.study);
    this.texts = {};
    this.show(derive(before));
  }

  redo(): void {
    const after = this.future.pop();
    if (after === undefined) return;
    this.past.push(this.current.study);
    this.texts = {};
    this.show(derive(after));
  }

  /** The version that the document was saved as, or started from; null for one that began in this browser. */
  get version(): number | null {
    return this.baseVersion;
  }

  /** A save was acknowledged: what is newer than it stays a draft on top of it, else the draft is let go. */
  markSaved(saved: Study, version: number): void {
    this.baseVersion = version;
    if (this.current.study !== saved || Object.keys(this.texts).length > 0) {
      this.publish();
      return;
    }
    if (this.timer !== null) clearTimeout(this.timer);
    this.timer = null;
    this.storage.forget(this.id);
    this.isChanged = false;
    this.isUnkept = false;
    this.snapshot = this.take();
    for (const listener of this.listeners) listener();
  }

  /** Writes what waits to be kept: call it before the page goes away. */
  flush(): void {
    if (this.timer === null) return;
    clearTimeout(this.timer);
    this.timer = null;
    const kept = this.storage.keep(this.id, {
      document: this.current.study,
      baseVersion: this.baseVersion,
      texts: this.texts,
      changedAt: new Date().toISOString(),
    });
    if (kept === this.isUnkept) {
      this.isUnkept = !kept;
      this.snapshot = this.take();
      for (const listener of this.listeners) listener();
    }
  }

  private show(next: Derived): void {
    this.current = next;
    this.isChanged = true;
    this.publish();
  }

  private publish(): void {
    this.snapshot = this.take();
    this.timer ??= setTimeout(() => this.flush(), KEEP_AFTER_MS);
    for (const listener of this.listeners) listener();
  }

  private take(): EditorSnapshot {
    return {
      ...this.current,
      canUndo: this.past.length > 0,
      canRedo: this.future.length > 0,
      isChanged: this.isChanged,
      isUnkept: this.isUnkept,
      texts: { ...this.texts },
    };
  }
}
