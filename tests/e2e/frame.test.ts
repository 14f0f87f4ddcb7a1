import { ladderSheet } from '../support/sample-sheets';
import { openImported } from './support/sheet-list';
import { expect, test } from './support/test';

// How long an edit takes is for the bench to say; here only that nothing on the screen is ever older than the rest.
test('in the frame after an edit, the handle, the status line and every reading are of the new frequency', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const room = await openImported(page, 'Sixty parts', ladderSheet(60));
  await room.ledger.show('current');
  await room.drawing.surface.focus();

  const frames = await page.evaluate(async () => {
    const text = (selector: string) => document.querySelector(selector)?.textContent ?? '';
    const look = () => ({
      hertz: Number(document.querySelector('[data-frequency-handle]')?.getAttribute('aria-valuenow')),
      handle: text('[data-frequency-handle]'),
      status: text('[aria-label="How to read the figures"]'),
      rows: [...document.querySelectorAll('aside table tbody tr')].map((row) => row.textContent ?? '').join('\n'),
    });
    const seen = [look()];
    for (let edits = 0; edits < 12; edits += 1) {
      document.querySelector('[data-drawing]')?.dispatchEvent(new KeyboardEvent('keydown', { key: '}', bubbles: true, cancelable: true }));
      // Before the frame that the browser would paint next.
      await new Promise<void>((resolve) => requestAnimationFrame(() => resolve()));
      seen.push(look());
    }
    return seen;
  });

  expect(new Set(frames.map(({ hertz }) => hertz)).size).toBe(frames.length);
  expect(new Set(frames.map(({ rows }) => rows)).size).toBe(frames.length);
  for (const { handle, status, rows } of frames) {
    expect(status).toContain(handle.trim());
    expect(rows.split('\n')).toHaveLength(60);
  }
  // The last frame's readings are those that the same sheet has when nothing moves.
  const last = frames[frames.length - 1];
  await page.reload();
  await room.ready();
  await room.ledger.show('current');
  await expect
    .poll(async () => (await room.ledger.region.locator('tbody tr').allTextContents()).join('\n'))
    .toBe(last?.rows);
});
