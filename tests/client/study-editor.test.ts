import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { EngineError, describeSection } from '@/engine';
import { blankStudy } from '@/lib/client/new-study';
import type { Draft } from '@/lib/client/study-draft';
import { StudyEditor } from '@/lib/client/study-editor';
import { setCount, setFactors, setTitle } from '@/lib/client/study-edits';

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

function open(draft: Draft | null = null, accepts = true) {
  const kept: Draft[] = [];
  const forget = vi.fn();
  const keep = (_: string, next: Draft) => {
    if (accepts) kept.push(next);
    return accepts;
  };
  return { editor: new StudyEditor('draft-1', blankStudy, 3, draft, { keep, forget }), kept, forget };
}

describe('StudyEditor', () => {
  test('a change builds, is told to those who listen, and is kept a moment later', () => {
    const { editor, kept } = open();
    const listener = vi.fn();
    editor.subscribe(listener);
    expect(editor.edit(setFactors('opening', ['1', '2']))).toBeNull();
    expect(listener).toHaveBeenCalledTimes(1);
    expect(editor.getSnapshot().built.totalLength.toFraction()).toBe('6');
    expect(kept).toHaveLength(0);
    vi.advanceTimersByTime(1_000);
    expect(kept).toHaveLength(1);
    expect(kept[0]).toMatchObject({ baseVersion: 3, document: { sections: [{ process: { factors: ['1', '2'] } }] } });
  });

  test('a change that cannot be built is refused, and nothing moves', () => {
    const { editor, kept } = open();
    const before = editor.getSnapshot();
    const error = editor.edit((study) => ({ ...study, metre: '4/3' }));
    expect(error).toBeInstanceOf(EngineError);
    expect(error?.code).toBe('invalid_metre');
    expect(editor.getSnapshot()).toBe(before);
    vi.advanceTimersByTime(1_000);
    expect(kept).toHaveLength(0);
  });

  test('undo and redo go back and forth over many changes; a new change forgets what was undone', () => {
    const { editor } = open();
    for (let n = 1; n <= 20; n += 1) editor.edit(setTitle(`Weir ${n}`));
    for (let n = 19; n >= 1; n -= 1) {
      editor.undo();
      expect(editor.getSnapshot().study.title).toBe(`Weir ${n}`);
    }
    editor.undo();
    expect(editor.getSnapshot().study.title).toBe('Untitled study');
    expect(editor.getSnapshot().canUndo).toBe(false);
    editor.undo();
    editor.redo();
    expect(editor.getSnapshot().study.title).toBe('Weir 1');
    editor.edit(setTitle('Elsewhere'));
    expect(editor.getSnapshot().canRedo).toBe(false);
  });

  test('a text that does not build yet is kept, and comes back with the draft', () => {
    const { editor, kept } = open();
    editor.type('subjects.subject', '1/4 1/0');
    editor.flush();
    expect(kept[0]?.texts).toEqual({ 'subjects.subject': '1/4 1/0' });
    const again = open(kept[0]!);
    expect(again.editor.getSnapshot().texts).toEqual({ 'subjects.subject': '1/4 1/0' });
    expect(again.editor.getSnapshot().isChanged).toBe(true);
  });

  test('a save lets the draft go, unless something newer stands on it; undo reaches past it', () => {
    const { editor, kept, forget } = open();
    editor.edit(setTitle('Weir'));
    const saved = editor.getSnapshot().study;
    editor.edit(setTitle('Newer'));
    editor.markSaved(saved, 4);
    expect(editor.version).toBe(4);
    expect(forget).not.toHaveBeenCalled();
    vi.advanceTimersByTime(1_000);
    expect(kept.at(-1)).toMatchObject({ baseVersion: 4, document: { title: 'Newer' } });
    editor.markSaved(editor.getSnapshot().study, 5);
    expect(forget).toHaveBeenCalledTimes(1);
    expect(editor.getSnapshot().isChanged).toBe(false);
    editor.undo();
    editor.undo();
    expect(editor.getSnapshot().study.title).toBe('Untitled study');
    expect(editor.getSnapshot().isChanged).toBe(true);
  });

  test('says so when the browser does not keep a change', () => {
    const { editor } = open(null, false);
    editor.edit(setTitle('Weir'));
    expect(editor.getSnapshot().isUnkept).toBe(false);
    vi.advanceTimersByTime(1_000);
    expect(editor.getSnapshot().isUnkept).toBe(true);
  });
});

describe('edits', () => {
  test('more statements go on by the last step, fewer leave the last ones out', () => {
    const { editor } = open();
    editor.edit(setCount('opening', 4));
    expect(describeSection(editor.getSnapshot().study, 'opening')).toContain('at 1, 3/2, 9/4, 27/8 times its length');
    editor.edit(setCount('opening', 1));
    expect(describeSection(editor.getSnapshot().study, 'opening')).toContain('is stated once, at 1 time its length');
  });

  test('400 statements are refused with the limit', () => {
    expect(() => setCount('opening', 400)).toThrow(/from 1 to 256 statements/);
    expect(() => setCount('opening', NaN)).toThrow(EngineError);
  });
});
