import type { Browser, Page } from '@playwright/test';
import { ladderSheet } from '../support/sample-sheets';
import { Room } from '../e2e/support/room';
import { importSheet, openImported, SheetList } from '../e2e/support/sheet-list';
import { freshContext, inBrowser } from './support/browser';
import { median, percentile, print } from './support/figures';
import { countInteractions, interactionDurations } from './support/interactions';
import { drawLowPass } from './support/low-pass-session';
import { watchPaint, paintOf } from './support/paint';
import { scriptBytes } from './support/script-bytes';

/*
 * The application from the outside, in a production build, each first load in a browser with nothing in its cache:
 *
 * js.list.gzipKB, js.sheet.gzipKB  script that came over the network, compressed as it came, until the page is at rest
 * lcp.sheet.ms      largest contentful paint of an open sheet of 60 parts; median of seven first loads
 * cls.sheet         layout shift of the same loads; the worst of them
 * inp.p95           from a press or key to the next paint, over the interactions of drawing and reading a low-pass
 * save.p95          from an edit's keystroke to the masthead's word that the server has it; holds the pause for more typing
 * save.answer.p95   of that, the request alone
 */
const LOADS = 7;
const SAVES = 40;

await inBrowser(async (browser) => {
  const id = await withPage(browser, (page) => importSheet(page, 'Ladder of 60 parts', ladderSheet(60)));
  const list = await withPage(browser, (page) => scriptBytes(page, () => SheetList.open(page)));
  print('app', 'js.list.gzipKB', list / 1000, 'kB');
  const sheet = await withPage(browser, (page) => scriptBytes(page, () => Room.open(page, id)));
  print('app', 'js.sheet.gzipKB', sheet / 1000, 'kB');

  const paints = [];
  for (let load = 0; load < LOADS; load += 1) {
    paints.push(
      await withPage(browser, async (page) => {
        await watchPaint(page);
        await Room.open(page, id);
        await page.waitForLoadState('networkidle').catch(() => undefined);
        return paintOf(page);
      }),
    );
  }
  print('app', 'lcp.sheet.ms', median(paints.map(({ largestMs }) => largestMs)), 'ms');
  print('app', 'cls.sheet', Math.max(...paints.map(({ shift }) => shift)), '');

  await withPage(browser, measureInteractions);
  await withPage(browser, measureSaves);
});

async function withPage<T>(browser: Browser, work: (page: Page) => Promise<T>): Promise<T> {
  const context = await freshContext(browser);
  try {
    return await work(await context.newPage());
  } finally {
    await context.close();
  }
}

async function measureInteractions(page: Page): Promise<void> {
  await countInteractions(page);
  const room = await (await SheetList.open(page)).begin('Drawn by the bench');
  await drawLowPass(room);
  print('app', 'inp.p95', percentile(await interactionDurations(page), 0.95), 'ms');
}

async function measureSaves(page: Page): Promise<void> {
  const room = await openImported(page, 'Saved by the bench', ladderSheet(60));
  await room.expectKeeping('saved', 60_000);
  await room.drawing.surface.focus();
  await page.evaluate(() => {
    let beganAt: number | null = null;
    const saves: number[] = (window.benchSaves = []);
    window.addEventListener(
      'keydown',
      (event) => {
        if (event.isTrusted) beganAt = event.timeStamp;
      },
      { capture: true },
    );
    let unsaved = false;
    new MutationObserver(() => {
      const state = document.querySelector('[data-keeping]')?.getAttribute('data-keeping');
      if (state !== 'saved') unsaved = true;
      if (state !== 'saved' || !unsaved || beganAt === null) return;
      saves.push(performance.now() - beganAt);
      unsaved = false;
      beganAt = null;
    }).observe(document.body, { subtree: true, attributes: true, attributeFilter: ['data-keeping'] });
  });
  const answers: number[] = [];
  page.on('requestfinished', (request) => {
    if (request.method() !== 'POST') return;
    const { requestStart, responseEnd } = request.timing();
    answers.push(responseEnd - requestStart);
  });
  for (let save = 0; save < SAVES; save += 1) {
    await page.keyboard.press(save % 2 === 0 ? '}' : '{');
    await page.waitForFunction((count) => (window.benchSaves?.length ?? 0) > count, save);
  }
  print('app', 'save.p95', percentile(await page.evaluate(() => window.benchSaves ?? []), 0.95), 'ms');
  print('app', 'save.answer.p95', percentile(answers, 0.95), 'ms');
}

declare global {
  interface Window {
    benchSaves?: number[];
  }
}
