import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { ApiError } from '@/lib/client/get-json';
import { blankStudy } from '@/lib/client/new-study';
import { StudyEditor } from '@/lib/client/study-editor';
import { setTitle } from '@/lib/client/study-edits';
import { type SaveRequest, type Saved, StudySaver } from '@/lib/client/study-saver';

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

/** A server in memory: versions, and saves known by their id. */
class Server {
  version = 1;
  readonly titles: string[] = [];
  readonly asked: SaveRequest[] = [];
  private readonly known = new Map<string, Saved>();
  /** what happens to the next requests: an error before they arrive, or an answer that is lost */
  readonly mishaps: ('offline' | 'lost answer' | number)[] = [];

  readonly save = async (request: SaveRequest): Promise<Saved> => {
    this.asked.push(request);
    const mishap = this.mishaps.shift();
    if (mishap === 'offline') throw new ApiError('offline', 'Sesqui cannot be reached.', 0);
    if (typeof mishap === 'number') throw new ApiError('x', `Refused with ${mishap}.`, mishap);
    let saved = this.known.get(request.saveId);
    if (!saved) {
      if (request.baseVersion !== this.version) throw new ApiError('version_conflict', 'Changed elsewhere.', 409);
      this.version += 1;
      this.titles.push(request.document.title);
      saved = { version: this.version, updatedAt: new Date(0) };
      this.known.set(request.saveId, saved);
    }
    if (mishap === 'lost answer') throw new ApiError('offline', 'Sesqui cannot be reached.', 0);
    return saved;
  };
}

function open() {
  const server = new Server();
  const storage = { keep: () => true, forget: vi.fn() };
  const editor = new StudyEditor('id', blankStudy, 1, null, storage);
  const saver = new StudySaver(editor, editor.getSnapshot().study, null, server.save);
  saver.start();
  return { server, editor, saver, storage };
}
const pass = (ms: number) => vi.advanceTimersByTimeAsync(ms);

describe('StudySaver', () => {
  test('saves a moment after a change, quick changes together, and lets the draft go', async () => {
    const { server, editor, saver, storage } = open();
    for (const title of ['A', 'AB', 'ABC']) editor.edit(setTitle(title));
    expect(server.asked).toHaveLength(0);
    await pass(1_000);
    expect(server.titles).toEqual(['ABC']);
    expect(saver.getState()).toMatchObject({ kind: 'saved', version: 2 });
    expect(storage.forget).toHaveBeenCalled();
    await pass(60_000);
    expect(server.asked).toHaveLength(1);
  });

  test('without a connection it waits, says so, and saves the last state when it is back', async () => {
    const { server, editor, saver } = open();
    server.mishaps.push('offline', 'offline');
    editor.edit(setTitle('A'));
    await pass(1_000);
    expect(saver.getState()).toMatchObject({ kind: 'waiting', why: 'Sesqui cannot be reached.' });
    editor.edit(setTitle('B'));
    saver.retryNow();
    await pass(10);
    expect(saver.getState().kind).toBe('waiting');
    await pass(10_000);
    expect(server.titles).toEqual(['A', 'B']);
    expect(saver.getState()).toMatchObject({ kind: 'saved', version: 3 });
  });

  test('a save whose answer was lost counts once', async () => {
    const { server, editor, saver } = open();
    server.mishaps.push('lost answer');
    editor.edit(setTitle('A'));
    await pass(10_000);
    expect(server.titles).toEqual(['A']);
    expect(new Set(server.asked.map(({ saveId }) => saveId)).size).toBe(1);
    expect(saver.getState()).toMatchObject({ kind: 'saved', version: 2 });
  });

  test('a version saved elsewhere holds everything until it is settled', async () => {
    const { server, editor, saver } = open();
    server.version = 5;
    editor.edit(setTitle('Mine'));
    await pass(1_000);
    expect(saver.getState().kind).toBe('conflict');
    editor.edit(setTitle('Mine, later'));
    await pass(60_000);
    expect(server.asked).toHaveLength(1);
    saver.settle(editor.getSnapshot().study, 5, new Date(0));
    editor.edit(setTitle('On top'));
    await pass(2_000);
    expect(server.titles).toEqual(['On top']);
  });

  test.each([
    [401, 'signed-out'],
    [404, 'gone'],
    [422, 'refused'],
    [413, 'refused'],
    [429, 'waiting'],
    [503, 'waiting'],
  ])('an answer of %i is told as %s', async (status, kind) => {
    const { server, editor, saver } = open();
    server.mishaps.push(status);
    editor.edit(setTitle('A'));
    await pass(1_000);
    expect(saver.getState().kind).toBe(kind);
  });

  test('after a refusal the next change is tried anew; after signing in again the waiting one is', async () => {
    const { server, editor, saver } = open();
    server.mishaps.push(422, 401);
    editor.edit(setTitle('A'));
    await pass(1_000);
    editor.edit(setTitle('B'));
    await pass(1_000);
    expect(saver.getState().kind).toBe('signed-out');
    saver.retryNow();
    await pass(10);
    expect(server.titles).toEqual(['B']);
  });

  test('once stopped it sends nothing more', async () => {
    const { server, editor, saver } = open();
    editor.edit(setTitle('A'));
    saver.stop();
    await pass(60_000);
    expect(server.asked).toHaveLength(0);
  });
});
