'use client';

import { useEffect, useId, useLayoutEffect, useRef, useState, type ReactElement, type ReactNode } from 'react';
import { createPortal } from 'react-dom';
import { Kbd } from './kbd';
import { besideOf, type Side, type TooltipPlace } from './tooltip-place';

export type TooltipProps = {
  readonly label: ReactNode;
  /** A key or chord that does the same, such as `Ctrl Z`. */
  readonly shortcut?: string;
  readonly side?: Side;
  readonly children: ReactElement;
};

/** A hand that rests asks; one that passes does not. */
const REST_MS = 450;
/** Within this after one tooltip has gone, the next comes without a wait: someone is reading along a row. */
const READING_ON_MS = 300;
/** Time to move from the element onto the tooltip, which must be possible (WCAG 2.2, 1.4.13). */
const GRACE_MS = 120;

let lastGoneAt = Number.NEGATIVE_INFINITY;

/**
 * Words for something shown without them, on hover and on keyboard focus; Escape takes them away. Never the only
 * carrier of a name: the element keeps its own label, so the words are not read out a second time.
 */
export function Tooltip({ label, shortcut, side = 'bottom', children }: TooltipProps) {
  const anchor = useRef<HTMLSpanElement>(null);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const [shown, setShown] = useState(false);

  useEffect(() => () => clearTimeout(timer.current), []);

  const after = (milliseconds: number, next: boolean): void => {
    clearTimeout(timer.current);
    timer.current = setTimeout(() => setShown(next), milliseconds);
  };
  const hide = (): void => {
    clearTimeout(timer.current);
    setShown(false);
  };

  return (
    <span
      ref={anchor}
      className="contents"
      onPointerEnter={(event) => {
        if (event.pointerType !== 'mouse') return;
        after(performance.now() - lastGoneAt < READING_ON_MS ? 0 : REST_MS, true);
      }}
      onPointerLeave={() => after(GRACE_MS, false)}
      // A press is an answer already.
      onPointerDown={hide}
      onFocus={(event) => {
        if (event.target.matches(':focus-visible')) after(0, true);
      }}
      onBlur={hide}
    >
      {children}
      {shown && (
        <Words anchor={anchor} side={side} onGone={hide} onStay={() => after(0, true)}>
          {label}
          {shortcut !== undefined && <Kbd tone="inverse">{shortcut}</Kbd>}
        </Words>
      )}
    </span>
  );
}

function Words({
  anchor,
  side,
  onGone,
  onStay,
  children,
}: {
  readonly anchor: { readonly current: HTMLElement | null };
  readonly side: Side;
  readonly onGone: () => void;
  readonly onStay: () => void;
  readonly children: ReactNode;
}) {
  const id = useId();
  const frame = useRef<HTMLDivElement>(null);
  const [place, setPlace] = useState<TooltipPlace | null>(null);
  const gone = useRef(onGone);
  useEffect(() => {
    gone.current = onGone;
  }, [onGone]);

  useLayoutEffect(() => {
    // `display: contents` has no box of its own: the element inside has.
    const element = anchor.current?.firstElementChild;
    if (element === null || element === undefined || frame.current === null) return;
    const { clientWidth: width, clientHeight: height } = document.documentElement;
    setPlace(besideOf(element.getBoundingClientRect(), frame.current.getBoundingClientRect(), side, { width, height }));
  }, [anchor, side]);

  useEffect(() => {
    const onKeyDown = (event: KeyboardEvent): void => {
      if (event.key === 'Escape') gone.current();
    };
    const onScroll = (): void => gone.current();
    window.addEventListener('keydown', onKeyDown);
    window.addEventListener('scroll', onScroll, { capture: true, passive: true });
    return () => {
      window.removeEventListener('keydown', onKeyDown);
      window.removeEventListener('scroll', onScroll, { capture: true });
      lastGoneAt = performance.now();
    };
  }, []);

  return createPortal(
    <div
      ref={frame}
      id={id}
      role="tooltip"
      onPointerEnter={onStay}
      style={place === null ? { visibility: 'hidden', left: 0, top: 0 } : { left: place.x, top: place.y }}
      className="fade-in fixed z-50 flex w-max max-w-72 items-center gap-2 rounded-md bg-ink px-2.5 py-1.5 text-[13px] leading-snug font-normal text-paper shadow-float print:hidden"
    >
      {children}
    </div>,
    // Inside an open dialog, so that it lies above it.
    anchor.current?.closest('dialog') ?? document.body,
  );
}
