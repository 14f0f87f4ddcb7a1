'use client';

import { useEffect, type RefObject } from 'react';

/** Width of the printed area of an A4 or Letter page in portrait, in CSS pixels. */
const PAGE_WIDTH = 680;

/**
 * Makes ready for a print: daylight ink, and the drawing at its size on the screen, scaled to the page. The readings
 * are a bitmap of that size, which a page laid out anew would pull away from the parts.
 */
export function usePrint(surface: RefObject<HTMLElement | null>): void {
  useEffect(() => {
    const root = document.documentElement;
    let theme: string | undefined;
    const before = () => {
      theme = root.dataset['theme'];
      root.dataset['theme'] = 'day';
      const box = surface.current?.getBoundingClientRect();
      if (!box) return;
      surface.current?.style.setProperty('--print-width', `${box.width}px`);
      surface.current?.style.setProperty('--print-height', `${box.height}px`);
      surface.current?.style.setProperty('--print-zoom', String(Math.min(1, PAGE_WIDTH / box.width)));
    };
    const after = () => {
      if (theme === undefined) delete root.dataset['theme'];
      else root.dataset['theme'] = theme;
    };
    // Before the canvas of readings hears of it, so that it paints in daylight.
    window.addEventListener('beforeprint', before, { capture: true });
    window.addEventListener('afterprint', after);
    return () => {
      window.removeEventListener('beforeprint', before, { capture: true });
      window.removeEventListener('afterprint', after);
    };
  }, [surface]);
}
