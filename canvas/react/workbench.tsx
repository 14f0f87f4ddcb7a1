'use client';

import { ChevronDown, ChevronUp } from 'lucide-react';
import { useRef, useState, type ReactNode } from 'react';
import { ReactFlowProvider } from 'reactflow';
import 'reactflow/dist/base.css';
import type { NoteAnchor } from '../document/notes';
import type { SheetStore } from '../store/sheet-store';
import { Band } from './band/band';
import { Drawing } from './drawing/drawing';
import { EmptySheet } from './drawing/empty-sheet';
import type { NotePin } from './drawing/note-pins';
import { useScreen } from './drawing/use-screen';
import { CommandList } from './help/command-list';
import { KeysDialog } from './help/keys-dialog';
import { Ledger } from './ledger/ledger';
import { StatusLine } from './ledger/status-line';
import { ScreenContext } from './screen-context';
import { SheetContext, useSheet } from './sheet-context';
import { Shelf } from './shelf/shelf';
import { usePrint } from './use-print';

export type { NotePin };

export type WorkbenchProps = {
  readonly store: SheetStore;
  readonly masthead: ReactNode;
  /** Between the masthead and the drawing: what the whole sheet must say (a frozen snapshot, a lost connection). */
  readonly banner?: ReactNode;
  readonly notesSection?: ReactNode;
  readonly notes?: readonly NotePin[];
  readonly openNote?: string | null;
  readonly onOpenNote?: (id: string) => void;
  /** Absent for those who may not pin notes. */
  readonly onPinNote?: (anchor: NoteAnchor) => void;
  readonly dialogs?: ReactNode;
};

/** The open sheet: masthead, Shelf, drawing, Ledger and Band, round one store. */
export function Workbench(props: WorkbenchProps) {
  return (
    <SheetContext.Provider value={props.store}>
      <ReactFlowProvider>
        <Bench {...props} />
      </ReactFlowProvider>
    </SheetContext.Provider>
  );
}

function Bench({
  store,
  masthead,
  banner,
  notesSection,
  notes = [],
  openNote = null,
  onOpenNote,
  onPinNote,
  dialogs,
}: WorkbenchProps) {
  const surface = useRef<HTMLDivElement>(null);
  const screen = useScreen(store, surface);
  const [pulledUp, setPulledUp] = useState(false);
  // Asked from the drawing, the problems must come into view on a phone too.
  const asked = useSheet((state) => state.panel === 'problems');
  if (asked && !pulledUp) setPulledUp(true);
  const raised = pulledUp || asked;
  usePrint(surface);
  return (
    <ScreenContext.Provider value={screen}>
      <div className="workbench grid h-dvh w-full overflow-hidden bg-paper text-ink">
        <header className="workbench-masthead min-w-0">
          {masthead}
          {banner}
        </header>
        <div className="workbench-shelf min-h-0">
          <Shelf />
        </div>
        <main ref={surface} className="workbench-drawing relative min-h-0 min-w-0">
          <Drawing notes={notes} openNote={openNote} onOpenNote={onOpenNote} onPinNote={onPinNote} />
          <EmptySheet />
          <div className="pointer-events-none absolute inset-x-4 bottom-3 z-10">
            <StatusLine />
          </div>
        </main>
        <aside aria-label="Ledger" data-raised={raised} className="workbench-ledger min-h-0 border-l border-rule bg-raised">
          <button
            type="button"
            aria-expanded={raised}
            onClick={() => setPulledUp(!raised)}
            className="workbench-grip h-11 w-full shrink-0 items-center justify-between px-4 text-[14px] font-semibold"
          >
            Ledger
            {raised ? <ChevronDown size={18} aria-hidden="true" /> : <ChevronUp size={18} aria-hidden="true" />}
          </button>
          <div className="min-h-0 flex-1 [height:100%]">
            <Ledger notes={notesSection} />
          </div>
        </aside>
        <footer aria-label="Band" className="workbench-band min-w-0 border-t border-rule bg-raised">
          <Band />
        </footer>
      </div>
      <KeysDialog />
      <CommandList />
      {dialogs}
      <Spoken />
    </ScreenContext.Provider>
  );
}

/** What happens on the drawing, spoken; a change of key makes the same words be read again. */
function Spoken() {
  const spoken = useSheet((state) => state.spoken);
  return (
    <div role="status" aria-live="polite" className="sr-only" data-spoken="">
      <span key={spoken.count}>{spoken.text}</span>
    </div>
  );
}
