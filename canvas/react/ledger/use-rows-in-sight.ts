import { useEffect, useState, type RefObject } from 'react';

export type RowRange = { readonly from: number; readonly to: number };

/** The range is known to so many rows, so that scrolling changes it seldom. */
const STEP = 16;

/**
 * Which rows of a list of rows of one height are in sight in what scrolls it, with some to spare on both sides.
 *
 * @param list the element that holds the rows, and nothing else
 */
export function useRowsInSight(list: RefObject<HTMLElement | null>, rowHeightPx: number): RowRange {
  const [range, setRange] = useState<RowRange>({ from: 0, to: 3 * STEP });
  useEffect(() => {
    const element = list.current;
    const scroller = scrollerOf(element);
    if (element === null || scroller === null) return;
    const look = () => {
      const above = scroller.getBoundingClientRect().top - element.getBoundingClientRect().top;
      const from = STEP * Math.max(0, Math.floor(above / rowHeightPx / STEP - 0.5));
      const to = STEP * Math.max(1, Math.ceil((above + scroller.clientHeight) / rowHeightPx / STEP + 0.5));
      setRange((before) => (before.from === from && before.to === to ? before : { from, to }));
    };
    look();
    scroller.addEventListener('scroll', look, { passive: true });
    const sizes = new ResizeObserver(look);
    sizes.observe(scroller);
    return () => {
      scroller.removeEventListener('scroll', look);
      sizes.disconnect();
    };
  }, [list, rowHeightPx]);
  return range;
}

function scrollerOf(element: HTMLElement | null): HTMLElement | null {
  for (let at = element?.parentElement ?? null; at !== null; at = at.parentElement) {
    if (/auto|scroll/.test(getComputedStyle(at).overflowY)) return at;
  }
  return null;
}
