import type { CDPSession, Page } from '@playwright/test';

/** How a gesture ran, frame by frame. */
export type Smoothness = {
  /** Share of frames that came more than 25 ms after the one before, in percent: at 60 Hz each of them is a frame missed. */
  readonly missedPercent: number;
  /** Script for each frame that was drawn, in milliseconds. */
  readonly scriptMs: number;
};

const GESTURE_MS = 3_000;
const MISSED_MS = 25;

declare global {
  interface Window {
    benchFrames?: { readonly stamps: number[]; running: boolean };
  }
}

/**
 * Watches the frames while the pointer, already pressed, is moved to and fro for three seconds, about sixty times a
 * second. The first quarter of a second does not count: a gesture has one long frame at its beginning.
 */
export async function watchFrames(page: Page, move: (phase: number) => Promise<void>): Promise<Smoothness> {
  const session: CDPSession = await page.context().newCDPSession(page);
  await session.send('Performance.enable');
  await keepMoving(move, 250);
  const scriptBefore = await scriptSeconds(session);
  await page.evaluate(() => {
    const frames = (window.benchFrames = { stamps: [] as number[], running: true });
    void (async () => {
      while (frames.running) frames.stamps.push(await new Promise<number>((resolve) => requestAnimationFrame(resolve)));
    })();
  });
  await keepMoving(move, GESTURE_MS);
  const stamps = await page.evaluate(() => {
    if (window.benchFrames) window.benchFrames.running = false;
    return window.benchFrames?.stamps ?? [];
  });
  const script = (await scriptSeconds(session)) - scriptBefore;
  await session.detach();
  const intervals = stamps.slice(1).map((stamp, index) => stamp - (stamps[index] ?? stamp));
  if (intervals.length === 0) throw new Error('the browser drew no frame');
  return {
    missedPercent: (100 * intervals.filter((ms) => ms > MISSED_MS).length) / intervals.length,
    scriptMs: (1000 * script) / intervals.length,
  };
}

async function keepMoving(move: (phase: number) => Promise<void>, forMs: number): Promise<void> {
  const start = performance.now();
  for (let now = start; now - start < forMs; now = performance.now()) {
    await move((now - start) / 1000);
    await new Promise((resolve) => setTimeout(resolve, Math.max(0, 16 - (performance.now() - now))));
  }
}

async function scriptSeconds(session: CDPSession): Promise<number> {
  const { metrics } = await session.send('Performance.getMetrics');
  return metrics.find(({ name }) => name === 'ScriptDuration')?.value ?? 0;
}
