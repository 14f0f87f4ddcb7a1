import { render } from '@testing-library/react';
import userEvent, { PointerEventsCheckLevel } from '@testing-library/user-event';
import type { ReactNode } from 'react';
import type { Screen } from '@/canvas/commands/command';
import type { SheetDocument } from '@/canvas/document/types';
import type { Point } from '@/canvas/geometry/point';
import { ScreenContext } from '@/canvas/react/screen-context';
import { SheetContext } from '@/canvas/react/sheet-context';
import { createSheetStore, type SheetStore } from '@/canvas/store/sheet-store';

export type Room = {
  readonly store: SheetStore;
  readonly user: ReturnType<typeof userEvent.setup>;
  /** Places that were brought into view. */
  readonly revealed: readonly Point[];
  /** Texts that were put on the clipboard. */
  readonly copied: readonly string[];
  /** The steps that undo knows, by name. */
  steps(): readonly string[];
  select(designator: string): void;
};

/** Renders a part of the open sheet round a real store, with a screen that notes what it is asked for. */
export function openRoom(document: SheetDocument, content: ReactNode, mayEdit = true): Room {
  const store = createSheetStore(document, mayEdit);
  const revealed: Point[] = [];
  const copied: string[] = [];
  const screen: Screen = {
    zoomIn: () => {},
    zoomOut: () => {},
    zoomToFit: () => {},
    zoomToFull: () => {},
    middle: () => ({ x: 0, y: 0 }),
    reveal: (place) => void revealed.push(place),
    targetAt: (at) => ({ kind: 'open', at }),
    writeClipboard: async (text) => void copied.push(text),
    readClipboard: async () => '',
    editPart: () => {},
    open: () => {},
  };
  render(
    <SheetContext.Provider value={store}>
      <ScreenContext.Provider value={screen}>{content}</ScreenContext.Provider>
    </SheetContext.Provider>,
  );
  return {
    store,
    // No pause between keys, and no asking for styles that jsdom would have to work out: neither is tested here.
    user: userEvent.setup({ delay: null, pointerEventsCheck: PointerEventsCheckLevel.Never }),
    revealed,
    copied,
    steps: () => store.getState().history.past.map(({ label }) => label),
    select(designator) {
      const part = store.getState().document.parts.find((candidate) => candidate.designator === designator);
      if (!part) throw new Error(`there is no ${designator} on the sheet`);
      store.getState().select({ parts: new Set([part.id]), wires: new Set() });
    },
  };
}

/** Thin spaces as plain ones, so that an expectation can be read. */
export function plain(text: string | null | undefined): string {
  return (text ?? '').replace(/[\u2009\u00a0]/g, ' ');
}
