'use client';

import { useMemo, type RefObject } from 'react';
import { useReactFlow, useStoreApi } from 'reactflow';
import type { Screen } from '../../commands/command';
import { targetAt } from '../../commands/edits/wires';
import { allPins, bodyOf, coursesOf, extentOf, partsById } from '../../document/lookup';
import { grow, unite } from '../../geometry/box';
import type { SheetStore } from '../../store/sheet-store';

const ZOOM = { least: 0.1, most: 4 } as const;
export { ZOOM as ZOOM_RANGE };

/** The screen as commands know it: React Flow's viewport, the clipboard, the panels. */
export function useScreen(store: SheetStore, frame: RefObject<HTMLElement | null>): Screen {
  const flow = useReactFlow();
  const flowStore = useStoreApi();
  return useMemo((): Screen => {
    const size = () => {
      const { width, height } = flowStore.getState();
      return { width, height };
    };
    const middle = () => {
      const box = frame.current?.getBoundingClientRect();
      if (!box) return { x: 0, y: 0 };
      return flow.screenToFlowPosition({ x: box.left + box.width / 2, y: box.top + box.height / 2 });
    };
    return {
      zoomIn: () => void flow.zoomIn({ duration: 0 }),
      zoomOut: () => void flow.zoomOut({ duration: 0 }),
      zoomToFull: () => {
        const { x, y } = middle();
        flow.setCenter(x, y, { zoom: 1 });
      },
      zoomToFit: () => {
        const { document } = store.getState();
        const box = unite(document.parts.flatMap((part) => [extentOf(part), grow(bodyOf(part), 30)]));
        const { width, height } = size();
        if (!box || width === 0) return;
        // Room for what is written beside the outermost parts, and for the status line below.
        const room = { left: box.left - 110, right: box.right + 170, top: box.top - 40, bottom: box.bottom + 70 };
        const zoom = Math.min(1.25, width / (room.right - room.left), height / (room.bottom - room.top));
        flow.setCenter((room.left + room.right) / 2, (room.top + room.bottom) / 2, { zoom: Math.max(ZOOM.least, zoom) });
      },
      middle,
      reveal: (place) => {
        const { transform } = flowStore.getState();
        const { width, height } = size();
        const [tx, ty, zoom] = transform;
        const at = { x: place.x * zoom + tx, y: place.y * zoom + ty };
        const margin = 40;
        const dx = at.x < margin ? margin - at.x : at.x > width - margin ? width - margin - at.x : 0;
        const dy = at.y < margin ? margin - at.y : at.y > height - margin ? height - margin - at.y : 0;
        if (dx !== 0 || dy !== 0) flow.setViewport({ x: tx + dx, y: ty + dy, zoom });
      },
      targetAt: (place) => {
        const { document } = store.getState();
        return targetAt(document, place, 4, allPins(document), coursesOf(document));
      },
      writeClipboard: (text) => navigator.clipboard.writeText(text),
      readClipboard: () => navigator.clipboard.readText(),
      editPart: (id) => {
        if (partsById(store.getState().document).has(id)) store.getState().setEditing(id);
      },
      open: (panel) => store.getState().setPanel(panel),
    };
  }, [flow, flowStore, frame, store]);
}
