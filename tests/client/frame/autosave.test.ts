import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { frameDocument, type FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { DraftResponse } from '#shared/schemas/project.ts';
import { ApiError } from '#src/lib/api.ts';
import { createAutosave, type AutosaveParts } from '#src/features/frame/state/autosave.ts';
import { createFrameStore } from '#src/features/frame/state/frameStore.ts';

const person = {
  id: '3f6c2f9e-52b8-4a7e-8a55-0b1f6f7f2a10',
  name: 'Ines',
  role: 'designer' as const,
};
const at = '2026-03-03T10:00:00Z';

const named = (name: string): FrameDocument =>
  frameDocument.parse({ name, nodes: [{ id: 'n1', x: 0, z: 0 }] });

const draftOf = (version: number, document: FrameDocument): DraftResponse => ({
  projectId: '0c6d3a36-7a0e-4a0a-9d0f-2f4a7b1f5c01',
  version,
  fingerprint: 'a'.repeat(64),
  document,
  updatedAt: at,
  updatedBy: person,
});

const failure = (status: number, details?: Record<string, unknown>) =>
  new ApiError(status, {
    type: 'about:blank',
    title: 'Refused',
    status,
    detail: 'Refused.',
    code: 'stale-version',
    ...(details ? { details } : {}),
  });

function setUp(write: AutosaveParts['write'], theirs = draftOf(7, named('theirs'))) {
  const document = named('start');
  const store = createFrameStore(document);
  const onSaved = vi.fn();
  const autosave = createAutosave({
    store,
    draft: draftOf(3, document),
    write,
    read: () => Promise.resolve(theirs),
    onSaved,
  });
  const stop = autosave.start();
  const rename = (name: string) =>
    store.getState().run({ kind: 'set', fields: { name } }, 'name the frame');
  return { store, autosave, rename, onSaved, stop, status: () => autosave.status.getState().kind };
}

const taken = (version: number) => ({ version, fingerprint: 'b'.repeat(64), updatedAt: at });

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

describe('createAutosave', () => {
  it('writes once after a pause, each write on the version the last one gave', async () => {
    const write = vi.fn((version: number) => Promise.resolve(taken(version + 1)));
    const { rename, status, stop } = setUp(write);
    rename('a');
    rename('ab');
    expect(status()).toBe('changed');
    await vi.runAllTimersAsync();
    rename('abc');
    await vi.runAllTimersAsync();
    expect(write.mock.calls).toEqual([
      [3, named('ab')],
      [4, named('abc')],
    ]);
    expect(status()).toBe('saved');
    stop();
  });

  it('never has two writes under way, and ends with what is on screen', async () => {
    let underWay = 0;
    const written: string[] = [];
    const { rename, autosave, stop } = setUp(async (version, document) => {
      underWay += 1;
      expect(underWay).toBe(1);
      await new Promise((resolve) => setTimeout(resolve, 50));
      written.push(document.name);
      underWay -= 1;
      return taken(version + 1);
    });
    rename('one');
    const first = autosave.flush();
    rename('two');
    const second = autosave.flush();
    await vi.runAllTimersAsync();
    expect(await Promise.all([first, second])).toEqual([true, true]);
    expect(written).toEqual(['one', 'two']);
    stop();
  });

  it('says that it is offline and tries again by itself', async () => {
    const write = vi
      .fn<AutosaveParts['write']>()
      .mockRejectedValueOnce(failure(0))
      .mockResolvedValue(taken(4));
    const { rename, autosave, status, stop } = setUp(write);
    rename('a');
    expect(await autosave.flush()).toBe(false);
    expect(status()).toBe('offline');
    await vi.runAllTimersAsync();
    expect(status()).toBe('saved');
    stop();
  });

  it('does not send a document that would be refused', async () => {
    const write = vi.fn<AutosaveParts['write']>();
    const { store, autosave, status, stop } = setUp(write);
    const twice = [...store.getState().frame.nodes, { id: 'n1', x: 1, y: 0, z: 0 }];
    store.getState().run({ kind: 'set', fields: { nodes: twice } }, 'two of one id');
    expect(await autosave.flush()).toBe(false);
    expect(status()).toBe('faulty');
    expect(write).not.toHaveBeenCalled();
    stop();
  });

  describe('when somebody else saved meanwhile', () => {
    const stale = () =>
      failure(412, { currentVersion: 7, updatedBy: person, updatedAt: at, changes: [] });

    it('writes nothing more until the person decides, and takes theirs on wish', async () => {
      const write = vi.fn<AutosaveParts['write']>().mockRejectedValue(stale());
      const { store, rename, autosave, status, stop } = setUp(write);
      rename('mine');
      await vi.runAllTimersAsync();
      expect(status()).toBe('conflict');
      rename('mine again');
      await vi.runAllTimersAsync();
      expect(await autosave.flush()).toBe(false);
      expect(write).toHaveBeenCalledTimes(1);
      await autosave.takeTheirs();
      expect(store.getState().frame.name).toBe('theirs');
      expect([status(), autosave.version()]).toEqual(['saved', 7]);
      stop();
    });

    it('keeps mine as a version after theirs', async () => {
      const write = vi
        .fn<AutosaveParts['write']>()
        .mockRejectedValueOnce(stale())
        .mockResolvedValue(taken(8));
      const { rename, autosave, status, stop } = setUp(write);
      rename('mine');
      await autosave.flush();
      expect(await autosave.keepMine()).toBe(true);
      expect(write).toHaveBeenLastCalledWith(7, named('mine'));
      expect([status(), autosave.version()]).toEqual(['saved', 8]);
      stop();
    });

    it('takes a newer draft at once where nothing here is unsaved, and not otherwise', () => {
      const { store, rename, autosave, stop } = setUp(vi.fn<AutosaveParts['write']>());
      autosave.offer(draftOf(5, named('newer')));
      expect(store.getState().frame.name).toBe('newer');
      rename('mine');
      autosave.offer(draftOf(6, named('newest')));
      expect(store.getState().frame.name).toBe('mine');
      stop();
    });
  });
});
