'use client';

import { unstable_isUnrecognizedActionError } from 'next/navigation';
import { useEffect, useState, useSyncExternalStore } from 'react';
import { fetchResult } from '@/app/_client/fetch-result';
import type { SheetRecord } from '@/app/_shared/wire';
import { saveSheet } from '@/app/sheets/[id]/actions';
import type { SheetStore } from '@/canvas/store/sheet-store';
import { keepLooks } from '../keep-looks';
import { openDraftBox } from './drafts';
import { Keeper, type KeeperView } from './keeper';
import { leaseOf } from './lease';

export type KeeperOptions = {
  readonly store: SheetStore;
  readonly sheet: SheetRecord;
  readonly userId: string;
  /** Whether this person may change this sheet. */
  readonly mayWrite: boolean;
};

/** Whether a pointer is pressed anywhere: a drag computes from the document it began with. */
let pressed = false;

/** A part of what the keeper knows: something that is equal as long as it says the same. */
export function useKept<T>(keeper: Keeper, select: (view: KeeperView) => T): T {
  const read = () => select(keeper.getView());
  return useSyncExternalStore(keeper.subscribe, read, read);
}

/** The keeper of an open sheet, tied to the sheet's store and to the page's life. */
export function useKeeper({ store, sheet, userId, mayWrite }: KeeperOptions): Keeper {
  const [keeper] = useState(() => {
    let given = store.getState().document;
    return new Keeper({
      userId,
      sheetId: sheet.id,
      mayWrite,
      standing: sheet,
      sheetName: () => sheet.name,
      openDrafts: openDraftBox,
      save: saveSheet,
      fetchStanding: () => fetchResult<SheetRecord>(`/api/sheets/${sheet.id}`).catch(() => null),
      lease: (events) => leaseOf(userId, sheet.id, events),
      isOutdated: unstable_isUnrecognizedActionError,
      document: () => store.getState().document,
      show: (next) => {
        const { document, selection, replace, select } = store.getState();
        replace(mayWrite ? next : keepLooks(next, document, given));
        select(selection);
        given = next;
      },
      isQuiet: () => !pressed && store.getState().editing === null && store.getState().tool.kind === 'select',
      now: () => performance.now(),
    });
  });

  useEffect(() => {
    const unsubscribe = store.subscribe((state, before) => {
      if (state.document !== before.document) keeper.changed(state.document);
    });
    const press = () => {
      pressed = true;
    };
    const release = () => {
      pressed = false;
    };
    const leave = () => {
      keeper.flush();
    };
    const look = () => {
      if (document.visibilityState === 'hidden') keeper.flush();
      keeper.hurry();
    };
    const comeBack = () => {
      keeper.hurry();
    };
    const warn = (event: BeforeUnloadEvent) => {
      keeper.flush();
      if (keeper.wouldLose()) event.preventDefault();
    };
    // Taken off all together, by the one signal.
    const ended = new AbortController();
    const { signal } = ended;
    window.addEventListener('pointerdown', press, { capture: true, signal });
    window.addEventListener('pointerup', release, { capture: true, signal });
    window.addEventListener('pointercancel', release, { capture: true, signal });
    window.addEventListener('blur', release, { signal });
    window.addEventListener('pagehide', leave, { signal });
    window.addEventListener('online', comeBack, { signal });
    window.addEventListener('focus', comeBack, { signal });
    window.addEventListener('beforeunload', warn, { signal });
    document.addEventListener('visibilitychange', look, { signal });
    keeper.start();
    return () => {
      ended.abort();
      unsubscribe();
      keeper.stop();
    };
  }, [keeper, store]);

  return keeper;
}
