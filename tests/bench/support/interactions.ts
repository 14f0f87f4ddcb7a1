import type { Page } from '@playwright/test';

declare global {
  interface Window {
    benchInteractions?: Map<number, number>;
  }
}

/** The browser tells of no event that took less; rounded to 8 ms by the standard (W3C Event Timing). */
const LEAST_TOLD_MS = 16;

/** Watches every interaction of the pages to come: a press with all its events is one, a key is one. */
export async function countInteractions(page: Page): Promise<void> {
  await page.addInitScript((leastMs) => {
    const longest = (window.benchInteractions = new Map<number, number>());
    new PerformanceObserver((list) => {
      for (const entry of list.getEntries()) {
        if (!('interactionId' in entry) || typeof entry.interactionId !== 'number' || entry.interactionId === 0) continue;
        longest.set(entry.interactionId, Math.max(entry.duration, longest.get(entry.interactionId) ?? 0));
      }
    }).observe({ type: 'event', durationThreshold: leastMs, buffered: true } as PerformanceObserverInit);
  }, LEAST_TOLD_MS);
}

/**
 * How long each interaction on the present page took to its next paint, in milliseconds. One that was too short to be
 * told of counts as the shortest that is.
 */
export async function interactionDurations(page: Page): Promise<readonly number[]> {
  const { told, all } = await page.evaluate(() => ({
    told: [...(window.benchInteractions?.values() ?? [])],
    all: 'interactionCount' in performance ? Number(performance.interactionCount) : 0,
  }));
  return [...told, ...Array.from({ length: Math.max(0, all - told.length) }, () => LEAST_TOLD_MS)];
}
