'use client';

import { useMemo, useRef, type PointerEvent, type RefObject } from 'react';
import { frequencyText, setOperatingFrequency } from '../../commands/looking-commands';
import { useCommands } from '../screen-context';
import { useSheetStore } from '../sheet-context';
import { handlePlace, hertzAt } from './axis';

/** A pointer that moved less than this pressed and did not drag, in px. */
const SLACK = 2;

type Drag = {
  readonly pointer: number;
  readonly gesture: string;
  readonly startX: number;
  readonly startShare: number;
  readonly startText: string;
  moved: boolean;
};

export type FrequencyDrag = {
  readonly onPointerDown: (event: PointerEvent<HTMLElement>) => void;
  readonly onPointerMove: (event: PointerEvent<HTMLElement>) => void;
  readonly onPointerUp: (event: PointerEvent<HTMLElement>) => void;
  readonly onPointerCancel: (event: PointerEvent<HTMLElement>) => void;
  /** Puts the frequency back to where the drag took it up; whether there was one. */
  readonly cancel: () => boolean;
};

/**
 * Drags the operating frequency along the axis that fills `frame`: one step for undo from press to release. A press on
 * the axis brings the handle there; a press on the handle takes it up where it is, and moves nothing by itself.
 */
export function useFrequencyDrag(frame: RefObject<HTMLElement | null>): FrequencyDrag {
  const store = useSheetStore();
  const commands = useCommands();
  const drag = useRef<Drag | null>(null);

  return useMemo(() => {
    const moveTo = (share: number, gesture: string) => {
      const { band, operatingFrequency } = store.getState().document;
      const hz = hertzAt(band, Math.min(1, Math.max(0, share)));
      setOperatingFrequency(commands.context(), frequencyText(hz, operatingFrequency), gesture);
    };
    const end = () => {
      if (!drag.current) return;
      drag.current = null;
      store.getState().endGesture();
    };
    return {
      onPointerDown(event) {
        const box = frame.current?.getBoundingClientRect();
        if (!box || box.width === 0 || event.button !== 0 || drag.current) return;
        const { document, readings } = store.getState();
        const pressed = event.target instanceof Element ? event.target.closest('[data-frequency-handle]') : null;
        const onHandle = pressed !== null;
        const gesture = `drag the frequency ${event.timeStamp}`;
        const share = onHandle ? handlePlace(document.band, readings.frequencyHz).share : (event.clientX - box.left) / box.width;
        drag.current = {
          pointer: event.pointerId,
          gesture,
          startX: event.clientX,
          startShare: share,
          startText: document.operatingFrequency,
          moved: !onHandle,
        };
        // Who holds the pointer also gets the clicks: the handle has to, or a double click would never reach it.
        (pressed ?? event.currentTarget).setPointerCapture?.(event.pointerId);
        if (!onHandle) moveTo(share, gesture);
      },
      onPointerMove(event) {
        const box = frame.current?.getBoundingClientRect();
        const current = drag.current;
        if (!current || !box || event.pointerId !== current.pointer) return;
        const dx = event.clientX - current.startX;
        if (!current.moved && Math.abs(dx) < SLACK) return;
        current.moved = true;
        moveTo(current.startShare + dx / box.width, current.gesture);
      },
      onPointerUp: end,
      onPointerCancel: end,
      cancel() {
        const current = drag.current;
        if (!current) return false;
        setOperatingFrequency(commands.context(), current.startText, current.gesture);
        end();
        return true;
      },
    };
  }, [commands, frame, store]);
}
