'use client';

import { useCallback, useEffect, useMemo, useRef, useState, type PointerEvent as ReactPointerEvent } from 'react';
import ReactFlow, { Background, BackgroundVariant, EdgeLabelRenderer, useReactFlow, useStoreApi } from 'reactflow';
import { pasteText } from '../../commands/editing-commands';
import { clip, writeClipping } from '../../commands/edits/clipboard';
import { removeFromSheet } from '../../commands/edits/parts';
import { commandFor, keyName } from '../../commands/registry';
import { partsById } from '../../document/lookup';
import type { NoteAnchor } from '../../document/notes';
import { NOTHING_SELECTED, selectParts } from '../../document/selection';
import type { Box } from '../../geometry/box';
import { GRID } from '../../geometry/point';
import { PART_KINDS, type PartKind } from '../../parts/registry';
import { placePartInHand } from '../../commands/drawing-commands';
import { useCommands } from '../screen-context';
import { useSheet, useSheetStore } from '../sheet-context';
import { describePart } from './describe-part';
import { flowNodes } from './flow-nodes';
import { createGestures, noteAnchor, type Press } from './gestures';
import { HandLayer } from './hand-layer';
import { layoutOf } from './layout-of';
import { NotePins, type NotePin } from './note-pins';
import { PartNodeView } from './part-node';
import { createPointerPlace } from './pointer-place';
import { ReadingOverlay } from './reading-overlay';
import { ValueEditor } from './value-editor';
import { ZOOM_RANGE } from './use-screen';
import { WireLayer } from './wire-layer';

const nodeTypes = { part: PartNodeView };
const NO_EDGES: never[] = [];
/** Middle and right button; the left is the hand's. */
const PAN_BUTTONS = [1, 2];
export const PART_DRAG_TYPE = 'application/x-ohmstead-part';

export type DrawingProps = {
  readonly notes: readonly NotePin[];
  readonly openNote: string | null;
  readonly onOpenNote?: (id: string) => void;
  readonly onPinNote?: (anchor: NoteAnchor) => void;
};

/** The drawing surface. React Flow holds the viewport and mounts the parts; everything the hand does is in gestures. */
export function Drawing({ notes, openNote, onOpenNote, onPinNote }: DrawingProps) {
  const store = useSheetStore();
  const commands = useCommands();
  const flow = useReactFlow();
  const flowStore = useStoreApi();
  const frame = useRef<HTMLDivElement>(null);
  const [pointer] = useState(createPointerPlace);
  const gestures = useMemo(() => createGestures(commands.context), [commands]);
  useEffect(
    () => gestures.onNote((found, at) => onPinNote?.(noteAnchor(store.getState().document, found, at))),
    [gestures, onPinNote, store],
  );

  const parts = useSheet((state) => state.document.parts);
  const layout = useSheet(layoutOf);
  const readings = useSheet((state) => state.readings);
  const tool = useSheet((state) => state.tool.kind);
  const nodes = useMemo(() => flowNodes(parts, layout), [parts, layout]);

  const pressAt = useCallback(
    (event: { clientX: number; clientY: number; pointerType?: string; shiftKey: boolean; ctrlKey: boolean; metaKey: boolean }): Press => ({
      at: flow.screenToFlowPosition({ x: event.clientX, y: event.clientY }),
      zoom: flowStore.getState().transform[2],
      pointer: event.pointerType === 'touch' ? 'coarse' : 'fine',
      adds: event.shiftKey || event.ctrlKey || event.metaKey,
      keeps: event.shiftKey,
    }),
    [flow, flowStore],
  );

  const isSurface = (target: EventTarget) =>
    target instanceof Element && target.closest('.nopan, button, input, a, [data-not-surface]') === null;

  const onPointerDown = (event: ReactPointerEvent<HTMLDivElement>) => {
    if (event.button !== 0 || !isSurface(event.target)) return;
    frame.current?.focus({ preventScroll: true });
    store.getState().setEditing(null);
    if (!gestures.press(pressAt(event))) return;
    event.currentTarget.setPointerCapture(event.pointerId);
    if (event.pointerType === 'touch') event.stopPropagation();
  };
  const onPointerMove = (event: ReactPointerEvent<HTMLDivElement>) => {
    const press = pressAt(event);
    const { tool: now, cursor, setCursor } = store.getState();
    if (now.kind !== 'select' && cursor !== null && (event.movementX !== 0 || event.movementY !== 0)) setCursor(null);
    pointer.set(press.at);
    if (gestures.active()) gestures.move(press);
    else if (frame.current) frame.current.style.cursor = cursorFor(now.kind, gestures.hit(press).kind);
  };
  const onPointerUp = (event: ReactPointerEvent<HTMLDivElement>) => gestures.release(pressAt(event));

  const onDoubleClick = (event: React.MouseEvent) => {
    if (!isSurface(event.target)) return;
    const found = gestures.hit(pressAt(event));
    if (found.kind === 'part' && store.getState().mayEdit) store.getState().setEditing(found.part.id);
  };

  useDrawingKeys(gestures.cancel);
  useClipboardEvents();
  useFitUntilTouched();
  useEffect(() => {
    // The drawing is what one comes for: its keys work from the start, unless something else was focused already.
    if (document.activeElement === document.body) frame.current?.focus({ preventScroll: true });
  }, []);

  return (
    <div
      ref={frame}
      data-drawing=""
      data-tool={tool}
      role="application"
      aria-label="Drawing. Press ? for the keys, W to draw a wire, Tab to go through the parts."
      aria-roledescription="drawing"
      tabIndex={0}
      className="drawing relative h-full w-full touch-none overflow-hidden bg-paper outline-offset-[-2px]"
      onPointerDownCapture={onPointerDown}
      onPointerMove={onPointerMove}
      onPointerUp={onPointerUp}
      onPointerCancel={() => gestures.cancel()}
      onPointerLeave={() => pointer.set(null)}
      onDoubleClick={onDoubleClick}
      onContextMenu={(event) => event.preventDefault()}
      onFocus={(event) => focusPart(event.target, store)}
      onDragOver={(event) => {
        if (!event.dataTransfer.types.includes(PART_DRAG_TYPE)) return;
        event.preventDefault();
        event.dataTransfer.dropEffect = 'copy';
        pointer.set(pressAt(event).at);
      }}
      onDrop={(event) => {
        const kind = event.dataTransfer.getData(PART_DRAG_TYPE);
        if (!isPartKind(kind)) return;
        event.preventDefault();
        const now = commands.context();
        if (now.tool.kind === 'place') placePartInHand(now, pressAt(event).at);
        frame.current?.focus({ preventScroll: true });
      }}
    >
      <ReactFlow
        nodes={nodes}
        edges={NO_EDGES}
        nodeTypes={nodeTypes}
        nodesDraggable={false}
        nodesConnectable={false}
        nodesFocusable
        elementsSelectable={false}
        disableKeyboardA11y
        panOnDrag={PAN_BUTTONS}
        panOnScroll
        zoomOnDoubleClick={false}
        selectionKeyCode={null}
        deleteKeyCode={null}
        multiSelectionKeyCode={null}
        minZoom={ZOOM_RANGE.least}
        maxZoom={ZOOM_RANGE.most}
        proOptions={{ hideAttribution: true }}
      >
        <Background variant={BackgroundVariant.Dots} gap={2 * GRID} size={1.4} color="var(--rule)" />
        <EdgeLabelRenderer>
          <WireLayer />
          <HandLayer pointer={pointer} targetAt={(place) => gestures.target({ at: place, zoom: flowStore.getState().transform[2], pointer: 'fine', adds: false, keeps: false })} />
          <NotePins notes={notes} open={openNote} onOpen={onOpenNote} />
          <ValueEditor />
        </EdgeLabelRenderer>
      </ReactFlow>
      <ReadingOverlay gestures={gestures} />
      <MarqueeBox onMarquee={gestures.onMarquee} />
      <PartNames parts={parts} readings={readings} />
    </div>
  );
}

/** Accessible names live on React Flow's own node elements, which are what Tab goes through. */
function PartNames({ parts, readings }: { parts: readonly { readonly id: string }[]; readings: unknown }) {
  const store = useSheetStore();
  useEffect(() => {
    // At most four times a second, so that a dragged frequency does not rewrite hundreds of names at every frame.
    const timer = setTimeout(() => {
      const state = store.getState();
      const byId = partsById(state.document);
      for (const element of document.querySelectorAll<HTMLElement>('[data-drawing] .react-flow__node')) {
        const part = byId.get(element.dataset['id'] ?? '');
        if (!part) continue;
        const name = describePart(part, state);
        if (element.getAttribute('aria-label') !== name) element.setAttribute('aria-label', name);
        // React Flow gives no role to what Tab passes by (a junction), and a name needs one to stand on.
        if (!element.hasAttribute('role')) element.setAttribute('role', 'img');
        element.dataset['part'] = part.designator || part.kind;
      }
    }, 120);
    return () => clearTimeout(timer);
  }, [parts, readings, store]);
  return null;
}

function MarqueeBox({ onMarquee }: { onMarquee(listener: (box: Box | null) => void): () => void }) {
  const element = useRef<HTMLDivElement>(null);
  const flowStore = useStoreApi();
  useEffect(
    () =>
      onMarquee((box) => {
        const style = element.current?.style;
        if (!style) return;
        style.display = box ? 'block' : 'none';
        if (!box) return;
        const [x, y, zoom] = flowStore.getState().transform;
        style.transform = `translate(${box.left * zoom + x}px, ${box.top * zoom + y}px)`;
        style.width = `${(box.right - box.left) * zoom}px`;
        style.height = `${(box.bottom - box.top) * zoom}px`;
      }),
    [onMarquee, flowStore],
  );
  return (
    <div
      ref={element}
      className="pointer-events-none absolute left-0 top-0 z-[7] hidden bg-voltage/15 will-change-transform"
      aria-hidden="true"
    />
  );
}

function useDrawingKeys(cancelGesture: () => boolean): void {
  const store = useSheetStore();
  const commands = useCommands();
  useEffect(() => {
    const onKeyDown = (event: KeyboardEvent) => {
      if (event.defaultPrevented || event.isComposing || typesText(event.target)) return;
      if (document.querySelector('dialog[open], [role="dialog"], [role="menu"]')) return;
      if (event.key === 'Escape' && cancelGesture()) {
        event.preventDefault();
        return;
      }
      // The clipboard has events of its own, which need no permission.
      if (['mod+c', 'mod+x', 'mod+v'].includes(keyName(event))) return;
      // Keys without Ctrl or ⌘ belong to the drawing, so that dictation and other controls never set them off
      // (WCAG 2.1.4). Escape steps back from anywhere.
      const inDrawing = event.target instanceof Element && event.target.closest('[data-drawing]') !== null;
      if (!inDrawing && !event.ctrlKey && !event.metaKey && event.key !== 'Escape') return;
      const command = commandFor(event, commands.context());
      if (!command) return;
      event.preventDefault();
      void command.run(commands.context());
    };
    const onKeyUp = (event: KeyboardEvent) => {
      if (event.key.startsWith('Arrow') || '[]{}'.includes(event.key)) store.getState().endGesture();
    };
    window.addEventListener('keydown', onKeyDown);
    window.addEventListener('keyup', onKeyUp);
    return () => {
      window.removeEventListener('keydown', onKeyDown);
      window.removeEventListener('keyup', onKeyUp);
    };
  }, [commands, store, cancelGesture]);
}

function useClipboardEvents(): void {
  const commands = useCommands();
  useEffect(() => {
    const outside = (event: ClipboardEvent) =>
      typesText(event.target) || (document.getSelection()?.toString() ?? '') !== '' || document.querySelector('dialog[open]') !== null;
    const onCopy = (event: ClipboardEvent) => {
      const now = commands.context();
      if (outside(event) || now.selection.parts.size === 0) return;
      if (event.type === 'cut' && !now.mayEdit) return;
      event.clipboardData?.setData('text/plain', writeClipping(clip(now.document, now.selection)));
      event.preventDefault();
      if (event.type === 'cut') {
        now.apply({
          label: `Cut ${now.selection.parts.size === 1 ? 'a part' : `${now.selection.parts.size} parts`}`,
          document: removeFromSheet(now.document, now.selection.parts, now.selection.wires),
          selection: NOTHING_SELECTED,
          say: 'Cut.',
        });
      } else {
        now.say('Copied.');
      }
    };
    const onPaste = (event: ClipboardEvent) => {
      const now = commands.context();
      if (outside(event) || !now.mayEdit) return;
      event.preventDefault();
      pasteText(now, event.clipboardData?.getData('text/plain') ?? '');
    };
    document.addEventListener('copy', onCopy);
    document.addEventListener('cut', onCopy);
    document.addEventListener('paste', onPaste);
    return () => {
      document.removeEventListener('copy', onCopy);
      document.removeEventListener('cut', onCopy);
      document.removeEventListener('paste', onPaste);
    };
  }, [commands]);
}

/** Keeps the drawing fitted to its surface from the opening until the person first does something with it. */
function useFitUntilTouched(): void {
  const commands = useCommands();
  const flowStore = useStoreApi();
  useEffect(() => {
    let size = '';
    const fit = () => {
      const { width, height, d3Zoom } = flowStore.getState();
      if (width === 0 || !d3Zoom || size === `${width} ${height}`) return;
      size = `${width} ${height}`;
      commands.context().screen.zoomToFit();
    };
    fit();
    const unsubscribe = flowStore.subscribe(fit);
    const touched = new AbortController();
    const stop = () => {
      unsubscribe();
      touched.abort();
    };
    for (const event of ['pointerdown', 'keydown', 'wheel'] as const) {
      window.addEventListener(event, stop, { capture: true, passive: true, signal: touched.signal });
    }
    return stop;
  }, [commands, flowStore]);
}

function focusPart(target: EventTarget, store: ReturnType<typeof useSheetStore>): void {
  if (!(target instanceof HTMLElement) || !target.matches('.react-flow__node') || !target.matches(':focus-visible')) return;
  const id = target.dataset['id'];
  if (id !== undefined && store.getState().tool.kind === 'select') store.getState().select(selectParts([id]));
}

/** A choice or a tick has no text of its own to undo or to copy: there the keys are the drawing's. */
const TEXT_FIELDS = 'input:not([type="radio"], [type="checkbox"]), textarea, select';

function typesText(target: EventTarget | null): boolean {
  return target instanceof HTMLElement && (target.isContentEditable || target.matches(TEXT_FIELDS));
}

function isPartKind(text: string): text is PartKind {
  return (PART_KINDS as readonly string[]).includes(text);
}

function cursorFor(tool: string, hit: string): string {
  if (tool === 'place' || tool === 'wire' || tool === 'note') return 'crosshair';
  if (hit === 'pin') return 'crosshair';
  return hit === 'nothing' ? 'default' : hit === 'part' ? 'move' : 'pointer';
}
