import type { Page } from '@playwright/test';

/** When the largest content was painted, and how much moved by itself while the page came (W3C: 0 is still). */
export type Paint = { readonly largestMs: number; readonly shift: number };

declare global {
  interface Window {
    benchPaint?: { largestMs: number; shift: number };
  }
}

/** Watches the pages to come from their first byte. */
export async function watchPaint(page: Page): Promise<void> {
  await page.addInitScript(() => {
    const paint = (window.benchPaint = { largestMs: 0, shift: 0 });
    new PerformanceObserver((list) => {
      for (const { startTime } of list.getEntries()) paint.largestMs = startTime;
    }).observe({ type: 'largest-contentful-paint', buffered: true });
    new PerformanceObserver((list) => {
      for (const entry of list.getEntries()) {
        if ('value' in entry && typeof entry.value === 'number' && !('hadRecentInput' in entry && entry.hadRecentInput === true)) {
          paint.shift += entry.value;
        }
      }
    }).observe({ type: 'layout-shift', buffered: true });
  });
}

export async function paintOf(page: Page): Promise<Paint> {
  return page.evaluate(() => window.benchPaint ?? { largestMs: 0, shift: 0 });
}
