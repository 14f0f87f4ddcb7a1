import type { Page } from '@playwright/test';
import { dividerSheet } from '../support/sample-sheets';
import type { SheetDocument } from '@/canvas/document/types';
import { Room, serverDocument } from './support/room';
import { importSheet, openImported, SheetList } from './support/sheet-list';
import { expect, test, type Fixtures } from './support/test';

const document = dividerSheet();

/** R2 as a document has it. */
const lower = (sheet: SheetDocument) => sheet.parts.find(({ designator }) => designator === 'R2')?.values['resistance'];

async function setLower(room: Room, text: string): Promise<void> {
  await room.drawing.select('R2');
  await room.ledger.field('Resistance').fill(text);
  await room.ledger.field('Resistance').press('Enter');
  await expect.poll(() => room.drawing.words('R2')).toContain(`${Number(text.replace('k', '')).toFixed(2)}\u2009kΩ`);
}

/** Lets no save of this page through: what is typed then is on this machine alone. */
async function holdSaves(page: Page): Promise<void> {
  await page.route('**/sheets/*', async (route) => {
    // Never answered, as by a server that died; everything but the page's own actions goes on.
    if (route.request().method() !== 'POST') await route.continue();
  });
}

test('what was typed before the tab was closed, and never reached the server, is there on return', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const room = await openImported(page, 'Closed too soon', document);
  const { id } = room;
  await holdSaves(page);
  await setLower(room, '3k');
  await page.close();

  const again = await page.context().newPage();
  expect(lower(await serverDocument(again, id))).toBe('1k');
  const returned = await Room.open(again, id);
  returned.drawing.know(document);
  await expect.poll(() => returned.drawing.words('R2')).toContain('3.00\u2009kΩ');
  await returned.expectKeeping('saved');
  expect(lower(await serverDocument(again, id))).toBe('3k');
});

test('without a server the sheet is kept on this machine, says so, and is saved when the server answers', async ({ makeTeam, visit, watch }) => {
  watch.allow(/net::ERR_INTERNET_DISCONNECTED/);
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const room = await openImported(page, 'On the river', document);
  await page.context().setOffline(true);
  await setLower(room, '3k');
  await room.expectKeeping('local');
  await expect(room.keeping).toContainText('Kept on this machine only');
  // Drawing goes on, and so do the readings.
  await setLower(room, '4k');
  await room.ledger.show('node');
  await expect.poll(() => room.ledger.reading('out')).toMatch(/0\.800\sV/);

  await page.context().setOffline(false);
  await room.expectKeeping('saved');
  await expect(room.keeping).toContainText(/Saved · revision \d+/);
  expect(lower(await serverDocument(page, room.id))).toBe('4k');
});

test('a server that breaks off an answer loses nothing', async ({ makeTeam, visit, watch }) => {
  watch.allow(/net::ERR_FAILED/);
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const room = await openImported(page, 'Broken off', document);
  let broken = 0;
  await page.route('**/sheets/*', async (route) => {
    if (route.request().method() !== 'POST' || broken > 0) return route.continue();
    broken += 1;
    // The server has it; its answer is lost on the way.
    await route.fetch();
    return route.abort();
  });
  await setLower(room, '3k');
  await room.expectKeeping('saved', 20_000);
  expect(broken).toBe(1);
  // The second sending of the same sheet is neither a conflict nor another revision.
  await expect(room.keeping).toContainText('revision 2');
  expect(lower(await serverDocument(page, room.id))).toBe('3k');
});

test.describe('two people change the same sheet', () => {
  test('keep mine: it becomes the next revision, over theirs', async ({ makeTeam, visit, watch }) => {
    watch.allow(/net::ERR_INTERNET_DISCONNECTED/);
    const { mine, id, theirPage } = await conflict(makeTeam, visit);
    await mine.dialog('This sheet was changed in two places').getByRole('button', { name: 'Keep mine' }).click();
    await mine.expectKeeping('saved');
    expect(lower(await serverDocument(theirPage, id))).toBe('9k');
    const again = await Room.open(theirPage, id);
    await expect.poll(() => again.drawing.words('R2')).toContain('9.00\u2009kΩ');
  });

  test('keep theirs: asks once more, then shows what stands on the server', async ({ makeTeam, visit, watch }) => {
    watch.allow(/net::ERR_INTERNET_DISCONNECTED/);
    const { mine, id, theirPage } = await conflict(makeTeam, visit);
    await mine.dialog('This sheet was changed in two places').getByRole('button', { name: 'Keep theirs' }).click();
    const sure = mine.page.getByRole('alertdialog', { name: 'Drop your version?' });
    await sure.getByRole('button', { name: 'Drop mine' }).click();
    await mine.expectKeeping('saved');
    await expect.poll(() => mine.drawing.words('R2')).toContain('3.00\u2009kΩ');
    expect(lower(await serverDocument(theirPage, id))).toBe('3k');
  });

  test('keep both: mine becomes a clone, theirs stays', async ({ makeTeam, visit, watch }) => {
    watch.allow(/net::ERR_INTERNET_DISCONNECTED/);
    const { mine, id, theirPage } = await conflict(makeTeam, visit);
    await mine.dialog('This sheet was changed in two places').getByRole('button', { name: 'Keep both, mine as a clone' }).click();
    await expect(mine.dialog('This sheet was changed in two places')).toBeHidden();
    expect(lower(await serverDocument(theirPage, id))).toBe('3k');
    const list = await SheetList.open(theirPage);
    await expect(list.sheets).toHaveCount(2);
    const clone = list.sheets.and(theirPage.locator(`:not([data-sheet-link="${id}"])`));
    expect(lower(await serverDocument(theirPage, (await clone.getAttribute('data-sheet-link')) ?? ''))).toBe('9k');
  });
});

/** Brings it about that R2 is 3k on the server and 9k here, both made from the first revision. */
async function conflict(makeTeam: Fixtures['makeTeam'], visit: Fixtures['visit']) {
  const team = await makeTeam('owner', 'designer');
  const theirPage = await visit(team.person('owner'));
  const id = await importSheet(theirPage, 'Shared divider', document);
  const mine = await Room.open(await visit(team.person('designer')), id);
  mine.drawing.know(document);
  await expect(mine.drawing.parts).toHaveCount(document.parts.length);
  await mine.page.context().setOffline(true);
  await setLower(mine, '9k');
  await mine.expectKeeping('local');

  const theirs = await Room.open(theirPage, id);
  theirs.drawing.know(document);
  await expect(theirs.drawing.parts).toHaveCount(document.parts.length);
  await setLower(theirs, '3k');
  await theirs.expectKeeping('saved');

  await mine.page.context().setOffline(false);
  await mine.expectKeeping('conflict');
  const dialog = mine.dialog('This sheet was changed in two places');
  await expect(dialog).toBeVisible();
  const row = dialog.getByRole('row').filter({ has: mine.page.getByRole('rowheader', { name: /R2/ }) });
  await expect(row).toContainText(/9/);
  await expect(row).toContainText(/3/);
  await expect(dialog).toContainText(team.person('owner').name);
  return { mine, id, theirPage };
}
