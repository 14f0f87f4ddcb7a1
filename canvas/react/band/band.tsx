'use client';

import { useEffect, useRef, useState, type PointerEvent, type RefObject } from 'react';
import { useSheet } from '../sheet-context';
import { BandRangeButton } from './band-range';
import { FrequencyAxis } from './frequency-axis';
import { FrequencyHandle } from './frequency-handle';
import { useFrequencyDrag } from './use-frequency-drag';

/** Before the frame is measured: the axis of a full screen. */
const USUAL_LENGTH = 1296;

/** The strip along the bottom: a logarithmic frequency axis whose handle is the operating frequency. */
export function Band() {
  const band = useSheet((state) => state.document.band);
  const frame = useRef<HTMLDivElement>(null);
  const handle = useRef<HTMLDivElement>(null);
  const lengthPx = useLength(frame);
  const drag = useFrequencyDrag(frame);

  const onPointerDown = (event: PointerEvent<HTMLElement>) => {
    // A press in the window in which a value is typed comes through here too, as React passes events on.
    if (!(event.target instanceof Node) || !event.currentTarget.contains(event.target)) return;
    // The default would move the focus to the page; the handle takes it, so that keys go on from here.
    event.preventDefault();
    handle.current?.focus({ preventScroll: true });
    drag.onPointerDown(event);
  };

  return (
    <div className="relative flex h-16 w-full bg-raised select-none">
      <div
        className="relative mx-[72px] min-w-0 flex-1 cursor-pointer touch-pan-y"
        onPointerDown={onPointerDown}
        onPointerMove={drag.onPointerMove}
        onPointerUp={drag.onPointerUp}
        onPointerCancel={drag.onPointerCancel}
      >
        <div ref={frame} className="absolute inset-x-0 top-1 bottom-0">
          <FrequencyAxis band={band} lengthPx={lengthPx} />
          <FrequencyHandle ref={handle} onCancel={drag.cancel} />
        </div>
      </div>
      <div className="absolute right-2 bottom-1.5">
        <BandRangeButton />
      </div>
    </div>
  );
}

/** The length of the axis in px, in steps that can matter for its marks. */
function useLength(frame: RefObject<HTMLElement | null>): number {
  const [length, setLength] = useState(USUAL_LENGTH);
  useEffect(() => {
    const element = frame.current;
    if (!element) return;
    const observer = new ResizeObserver(([entry]) => {
      if (entry && entry.contentRect.width > 0) setLength(Math.round(entry.contentRect.width / 8) * 8);
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, [frame]);
  return length;
}
