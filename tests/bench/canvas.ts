import type { Page } from '@playwright/test';
import { openImported } from '../e2e/support/sheet-list';
import type { Room } from '../e2e/support/room';
import { ladderSheet } from '../support/sample-sheets';
import { freshContext, inBrowser } from './support/browser';
import { editTimes, startEditClock, timed } from './support/edit-clock';
import { percentile, print } from './support/figures';
import { watchFrames } from './support/frame-clock';

/*
 * The drawing at work, on a sheet of 60 parts that was imported through the application, in a production build:
 *
 * edit60.p95        from the keystroke of an edit to the commit of all readings (see support/edit-clock)
 * edit60.frame.p95  from the same keystroke to the end of the frame that shows them, with the wait for that frame
 * drag60.missed     frames missed while a part with its wires is dragged
 * drag60.script     script a frame, of the same
 * pan60.missed      frames missed while the drawing is moved about
 *
 * Half of the edits change the value of a part, by Enter in the Ledger's field; half step the operating frequency, which
 * turns every reading on the sheet. Saving goes on meanwhile, as it does for anyone who draws.
 */
const PARTS = 60;
const EDITS = 120;
const WARM_UP = 10;

await inBrowser(async (browser) => {
  const context = await freshContext(browser);
  const page = await context.newPage();
  const room = await openImported(page, `Ladder of ${PARTS} parts`, ladderSheet(PARTS));
  await measureEdits(page, room);
  await measureGestures(page, room);
});

async function measureEdits(page: Page, room: Room): Promise<void> {
  await room.ledger.show('current');
  await startEditClock(page);
  // The source's own resistance: whatever it becomes, every current and voltage of the ladder becomes another.
  await room.drawing.select('R1');
  const field = room.ledger.field('Resistance');
  for (let edit = 0; edit < (WARM_UP + EDITS) / 2; edit += 1) {
    await field.fill(edit % 2 === 0 ? `${30 + edit}` : '3.3');
    await timed(page, () => field.press('Enter'));
    await room.drawing.surface.focus();
    await timed(page, () => page.keyboard.press(edit % 2 === 0 ? '}' : '{'));
  }
  const times = (await editTimes(page)).slice(WARM_UP);
  if (times.length < EDITS) throw new Error(`only ${times.length} of ${EDITS} edits were seen`);
  print('canvas', 'edit60.p95', percentile(times.map(({ commit }) => commit), 0.95), 'ms');
  print('canvas', 'edit60.frame.p95', percentile(times.map(({ frame }) => frame), 0.95), 'ms');
}

async function measureGestures(page: Page, room: Room): Promise<void> {
  await room.drawing.surface.focus();
  await room.drawing.keys('Escape', 'f');
  await room.drawing.holdAndMove('L5', { x: 0, y: 60 });
  const { x, y } = await middleOf(room, 'L5');
  const drag = await watchFrames(page, (phase) => page.mouse.move(x + 40 * Math.sin(4 * phase), y + 40 * Math.cos(4 * phase)));
  await room.drawing.keys('Escape');
  await page.mouse.up();
  print('canvas', 'drag60.missed', drag.missedPercent, '%');
  print('canvas', 'drag60.script', drag.scriptMs, 'ms');

  await page.mouse.move(x, y);
  await page.mouse.down({ button: 'middle' });
  const pan = await watchFrames(page, (phase) => page.mouse.move(x + 200 * Math.sin(3 * phase), y + 80 * Math.cos(3 * phase)));
  await page.mouse.up({ button: 'middle' });
  print('canvas', 'pan60.missed', pan.missedPercent, '%');
}

async function middleOf(room: Room, name: string): Promise<{ readonly x: number; readonly y: number }> {
  const box = await room.drawing.part(name).boundingBox();
  if (box === null) throw new Error(`${name} is not on the screen`);
  return { x: box.x + box.width / 2, y: box.y + box.height / 2 };
}
