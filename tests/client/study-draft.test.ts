import { beforeEach, describe, expect, test } from 'vitest';
import { blankStudy } from '@/lib/client/new-study';
import { type Draft, deleteDraft, isLocal, listDrafts, readDraft, writeDraft } from '@/lib/client/study-draft';

/** The browser's storage, in memory; `full` makes it refuse. */
class MemoryStorage implements Storage {
  [name: string]: unknown;
  private readonly items = new Map<string, string>();
  full = false;
  get length() {
    return this.items.size;
  }
  clear = () => this.items.clear();
  getItem = (key: string) => this.items.get(key) ?? null;
  key = (index: number) => [...this.items.keys()][index] ?? null;
  removeItem = (key: string) => void this.items.delete(key);
  setItem = (key: string, value: string) => {
    if (this.full) throw new DOMException('full', 'QuotaExceededError');
    this.items.set(key, value);
  };
}

const draft = (title: string, changedAt: string): Draft => ({ document: { ...blankStudy, title }, baseVersion: null, texts: {}, changedAt });
let storage: MemoryStorage;
beforeEach(() => {
  storage = new MemoryStorage();
});

describe('drafts in the browser', () => {
  test('what is written is read again, and listed with the last changed first', () => {
    expect(readDraft('draft-a', storage)).toEqual({ kind: 'none' });
    expect(writeDraft('draft-a', draft('First', '2026-12-01T10:00:00.000Z'), storage)).toBe(true);
    writeDraft('lock-gates', draft('Second', '2026-12-01T11:00:00.000Z'), storage);
    storage.setItem('something else', '{}');
    expect(readDraft('draft-a', storage)).toMatchObject({ kind: 'draft', draft: { document: { title: 'First' } } });
    expect(listDrafts(storage).map(({ id }) => id)).toEqual(['lock-gates', 'draft-a']);
    deleteDraft('draft-a', storage);
    expect(readDraft('draft-a', storage)).toEqual({ kind: 'none' });
  });

  test.each([
    ['no JSON', '{"document":'],
    ['no draft', '[]'],
    ['an unknown field', JSON.stringify({ ...draft('x', 'y'), document: { ...blankStudy, echoes: 3 } })],
    ['another format', JSON.stringify({ ...draft('x', 'y'), document: { ...blankStudy, format: 2 } })],
  ])('%s is told as unreadable, and left as it is', (_, text) => {
    storage.setItem('sesqui.draft.draft-a', text);
    expect(readDraft('draft-a', storage)).toEqual({ kind: 'unreadable', text });
    expect(storage.getItem('sesqui.draft.draft-a')).toBe(text);
    expect(listDrafts(storage)).toEqual([]);
  });

  test('a full storage is told, not thrown', () => {
    storage.full = true;
    expect(writeDraft('draft-a', draft('x', 'y'), storage)).toBe(false);
  });

  test('a study that was begun here is told from one of the server', () => {
    expect(isLocal('draft-1a2b3c4d')).toBe(true);
    expect(isLocal('lock-gates')).toBe(false);
  });
});
