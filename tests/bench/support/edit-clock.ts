import type { Page } from '@playwright/test';

/**
 * One edit, in milliseconds from the moment at which the browser took the keystroke (the event's own time stamp, before
 * any script of the page has run).
 */
export type EditTimes = {
  /**
   * Until every reading of the table is in the page: the network read from the drawing, solved, set as text and
   * committed by React, which does it in one piece.
   */
  readonly commit: number;
  /** Until the frame that shows them is done: style, layout, the canvas of readings, paint. Holds the wait for the frame. */
  readonly frame: number;
};

declare global {
  interface Window {
    benchEdits?: EditTimes[];
  }
}

/** Starts the clock of a page: from then on every keystroke after which the table of readings changes is an edit. */
export async function startEditClock(page: Page): Promise<void> {
  await page.evaluate(() => {
    const edits: EditTimes[] = (window.benchEdits = []);
    let beganAt: number | null = null;
    window.addEventListener(
      'keydown',
      (event) => {
        if (event.isTrusted) beganAt = event.timeStamp;
      },
      { capture: true },
    );
    const ledger = document.querySelector('aside[aria-label="Ledger"]');
    if (ledger === null) throw new Error('there is no Ledger to watch');
    // Called when the script that changed the page is over, before the browser does anything else.
    new MutationObserver((changes) => {
      if (beganAt === null) return;
      const ofReadings = changes.some(({ target }) => (target.parentElement ?? document.body).closest('tbody') !== null);
      if (!ofReadings) return;
      const start = beganAt;
      beganAt = null;
      const commit = performance.now() - start;
      requestAnimationFrame(() => {
        // A message comes as a task of its own, after the frame that this callback is the beginning of.
        const { port1, port2 } = new MessageChannel();
        port1.onmessage = () => edits.push({ commit, frame: performance.now() - start });
        port2.postMessage(null);
      });
    }).observe(ledger, { subtree: true, childList: true, characterData: true, attributes: true });
  });
}

/** Makes an edit, and waits until the clock has it. */
export async function timed(page: Page, edit: () => Promise<void>): Promise<void> {
  const before = await page.evaluate(() => window.benchEdits?.length ?? 0);
  await edit();
  await page.waitForFunction((count) => (window.benchEdits?.length ?? 0) > count, before);
}

export async function editTimes(page: Page): Promise<readonly EditTimes[]> {
  return page.evaluate(() => window.benchEdits ?? []);
}
