import { z } from 'zod';
import { type StudyInput, studySchema } from '@/engine';

/** What a browser keeps of a study that somebody changed or began without an account. */
export type Draft = {
  readonly document: StudyInput;
  /** the saved version that it started from; null for one that began here */
  readonly baseVersion: number | null;
  /** texts that are being typed and do not build yet, by field, so that a reload loses nothing */
  readonly texts: Readonly<Record<string, string>>;
  /** ISO 8601 */
  readonly changedAt: string;
};

const draftSchema = z.object({
  document: z.unknown(),
  baseVersion: z.int().nullable(),
  texts: z.record(z.string(), z.string()).default({}),
  changedAt: z.string(),
});

const PREFIX = 'sesqui.draft.';

export type ReadDraft =
  | { readonly kind: 'none' }
  | { readonly kind: 'draft'; readonly draft: Draft }
  /** something is kept that this version cannot read: it is left as it is */
  | { readonly kind: 'unreadable'; readonly text: string };

/** The draft kept for a study, if any. Nothing is deleted here, readable or not. */
export function readDraft(id: string, storage: Storage = localStorage): ReadDraft {
  const text = storage.getItem(PREFIX + id);
  if (text === null) return { kind: 'none' };
  try {
    const { document, ...rest } = draftSchema.parse(JSON.parse(text));
    return { kind: 'draft', draft: { ...rest, document: studySchema.parse(document) } };
  } catch (error) {
    if (error instanceof SyntaxError || error instanceof z.ZodError) return { kind: 'unreadable', text };
    throw error;
  }
}

/** Keeps a draft. @returns false where the browser refuses, e.g. because its storage is full */
export function writeDraft(id: string, draft: Draft, storage: Storage = localStorage): boolean {
  try {
    storage.setItem(PREFIX + id, JSON.stringify(draft));
    return true;
  } catch (error) {
    if (error instanceof DOMException) return false;
    throw error;
  }
}

export const deleteDraft = (id: string, storage: Storage = localStorage): void => storage.removeItem(PREFIX + id);

export type DraftEntry = { readonly id: string; readonly title: string; readonly changedAt: string };

/** Every readable draft, the last changed first. */
export function listDrafts(storage: Storage = localStorage): DraftEntry[] {
  const entries: DraftEntry[] = [];
  for (let index = 0; index < storage.length; index += 1) {
    const key = storage.key(index);
    if (!key?.startsWith(PREFIX)) continue;
    const id = key.slice(PREFIX.length);
    const read = readDraft(id, storage);
    if (read.kind === 'draft') entries.push({ id, title: read.draft.document.title, changedAt: read.draft.changedAt });
  }
  return entries.sort((a, b) => b.changedAt.localeCompare(a.changedAt));
}

export const LOCAL_PREFIX = 'draft-';
/** Whether a study lives in this browser only. */
export const isLocal = (id: string): boolean => id.startsWith(LOCAL_PREFIX);
