import 'fake-indexeddb/auto';
import { IDBFactory } from 'fake-indexeddb';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { Draft } from '@/app/sheets/[id]/_room/keeping/drafts';

/** A page that is loaded anew: modules start again, the storage does not. */
async function freshPage() {
  vi.resetModules();
  return import('@/app/sheets/[id]/_room/keeping/drafts');
}

const draft = (over: Partial<Draft> = {}): Draft => ({
  userId: 'mara',
  sheetId: 'sheet',
  sheetName: 'Anti-alias',
  document: '{"version":1}',
  madeFrom: 4,
  unanswered: ['a'],
  at: 10,
  ...over,
});

beforeEach(() => {
  globalThis.indexedDB = new IDBFactory();
});

describe('drafts in IndexedDB', () => {
  it('are there again after the page is loaded anew, as they were', async () => {
    const first = await (await freshPage()).openDraftBox();
    await first.write(draft());
    const again = await (await freshPage()).openDraftBox();
    expect(await again.read('mara', 'sheet')).toEqual(draft());
  });

  it('are one a person and sheet, the newest', async () => {
    const box = await (await freshPage()).openDraftBox();
    await box.write(draft());
    await box.write(draft({ document: 'newer' }));
    await box.write(draft({ userId: 'tarik', document: 'tarik’s' }));
    await box.write(draft({ sheetId: 'other', document: 'other' }));
    expect((await box.read('mara', 'sheet'))?.document).toBe('newer');
    expect((await box.read('tarik', 'sheet'))?.document).toBe('tarik’s');
    expect(await box.read('tarik', 'other')).toBeNull();
  });

  it('take effect in the order of the calls, awaited or not', async () => {
    const box = await (await freshPage()).openDraftBox();
    const calls = [
      box.write(draft({ document: 'first' })),
      box.remove('mara', 'sheet'),
      box.write(draft({ document: 'second' })),
      box.write(draft({ document: 'third' })),
    ];
    await Promise.all(calls);
    expect((await box.read('mara', 'sheet'))?.document).toBe('third');
    void box.write(draft({ document: 'fourth' }));
    await box.remove('mara', 'sheet');
    expect(await box.read('mara', 'sheet')).toBeNull();
  });

  it('are asked for and committed within the call, for a page that has no later moment', async () => {
    const box = await (await freshPage()).openDraftBox();
    const commit = vi.spyOn(IDBTransaction.prototype, 'commit');
    const written = box.write(draft());
    // Before anything was awaited.
    expect(commit).toHaveBeenCalledTimes(1);
    await written;
    commit.mockRestore();
  });

  it('go on when the browser has closed the connection', async () => {
    const box = await (await freshPage()).openDraftBox();
    await box.write(draft());
    // A newer build in another tab asks for its version: this tab must let go, and goes on when that is done.
    await new Promise<void>((resolve, reject) => {
      const request = indexedDB.deleteDatabase('ohmstead');
      request.onsuccess = () => resolve();
      request.onerror = () => reject(request.error);
      request.onblocked = () => reject(new Error('held up'));
    });
    await box.write(draft({ document: 'after' }));
    expect((await box.read('mara', 'sheet'))?.document).toBe('after');
  });

  it('reject, and do not hang, where the browser has no storage', async () => {
    const page = await freshPage();
    vi.stubGlobal('indexedDB', {
      open: () => {
        throw new DOMException('denied', 'SecurityError');
      },
    });
    await expect(page.openDraftBox()).rejects.toThrow('denied');
    vi.unstubAllGlobals();
  });
});
