import type { Page } from '@playwright/test';
import { dividerSheet } from '../support/sample-sheets';
import { expectAccessible } from './support/axe';
import { Room } from './support/room';
import { importSheet, openImported, SheetList } from './support/sheet-list';
import { expect, test, type Fixtures } from './support/test';
import type { Person } from './support/records';

/** A browser that is set to a theme, as the account page sets it. */
async function visitIn(theme: string, visit: Fixtures['visit'], baseURL: string | undefined, person: Person | null): Promise<Page> {
  const page = await visit(person);
  await page.context().addCookies([{ name: 'theme', value: theme, url: baseURL ?? '' }]);
  return page;
}

async function expectTheme(page: Page, theme: string): Promise<void> {
  await expect(page.locator('html')).toHaveAttribute('data-theme', theme);
}

for (const theme of ['day', 'night']) {
  test.describe(`in the ${theme} theme`, () => {
    test('the pages before signing in', async ({ visit, baseURL, watch }) => {
      watch.allow(/status of 404/);
      const page = await visitIn(theme, visit, baseURL, null);
      for (const path of ['/', '/sign-in', '/sign-up']) {
        await page.goto(path);
        await expectTheme(page, theme);
        await expectAccessible(page, path);
      }
    });

    test('the lists, the team, the account, and an address where nothing is', async ({ makeTeam, visit, baseURL, watch }) => {
      watch.allow(/status of 404/);
      const team = await makeTeam('owner', 'designer', 'reviewer');
      const page = await visitIn(theme, visit, baseURL, team.person('owner'));
      const list = await SheetList.open(page);
      await expectTheme(page, theme);
      await expect(page.getByRole('heading', { name: 'No sheets yet' })).toBeVisible();
      await expectAccessible(page, 'the empty list');
      await list.page.getByRole('button', { name: 'New sheet' }).click();
      await expectAccessible(page, 'the dialog of a new sheet');
      await importSheet(page, 'One of them', dividerSheet());
      await expectAccessible(page, 'the list');
      await page.getByRole('button', { name: 'Actions for One of them' }).click();
      await expect(page.getByRole('menu')).toBeVisible();
      await expectAccessible(page, 'a menu of the list');
      for (const path of ['/team', '/account', '/there-is-nothing-here']) {
        await page.goto(path);
        await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
        await expectAccessible(page, path);
      }
    });

    test('an open sheet: at rest, with a part selected, at fault, with a note, and in print', async ({ makeTeam, visit, baseURL }) => {
      const team = await makeTeam('owner');
      const page = await visitIn(theme, visit, baseURL, team.person('owner'));
      const room = await openImported(page, 'To be looked at', dividerSheet());
      await expectTheme(page, theme);
      await expectAccessible(page, 'at rest');
      await room.drawing.select('R1');
      await expectAccessible(page, 'a part selected');
      await room.drawing.doublePress('R1');
      await room.drawing.editor('Resistance', 'R1').fill('?');
      await expectAccessible(page, 'a value that cannot be read');
      await room.drawing.keys('Escape');
      await page.locator('[data-shelf-group="Store"]').click();
      await expectAccessible(page, 'the Shelf open');
      await room.drawing.keys('Escape');
      await room.drawing.select('reference-1');
      await room.drawing.keys('Delete');
      await expect(room.ledger.problems).toBeVisible();
      await expectAccessible(page, 'a network without a reference');
      await room.drawing.keys('Control+z');
      await room.pinNote(() => room.drawing.select('R2'), 'What is this for?');
      await expectAccessible(page, 'a note');
    });

    test('the dialogs of a sheet, and a snapshot', async ({ makeTeam, visit, baseURL }) => {
      const team = await makeTeam('owner');
      const page = await visitIn(theme, visit, baseURL, team.person('owner'));
      const room = await openImported(page, 'With dialogs', dividerSheet());
      await room.drawing.surface.focus();
      for (const [key, title] of [
        ['?', 'Keys'],
        ['Control+k', 'Commands'],
        ['Control+s', 'Take a snapshot'],
      ] as const) {
        await room.drawing.keys(key);
        await expect(room.dialog(title)).toBeVisible();
        await expectAccessible(page, title);
        await room.drawing.keys('Escape');
        await expect(room.dialog(title)).toBeHidden();
      }
      await page.getByRole('button', { name: 'Clone', exact: true }).click();
      await expectAccessible(page, 'Clone this sheet');
      await room.drawing.keys('Escape');
      await room.band.handle.focus();
      await room.drawing.keys('Enter');
      await expect(page.getByRole('textbox', { name: 'Operating frequency' })).toBeVisible();
      await expectAccessible(page, 'typing the frequency');
      await room.drawing.keys('Escape');

      await room.drawing.keys('Control+s');
      await room.dialog('Take a snapshot').getByLabel('Name').fill('Looked at');
      await room.dialog('Take a snapshot').getByRole('button', { name: 'Take snapshot' }).click();
      await expect(room.dialog('Take a snapshot')).toBeHidden();
      await room.menu('Snapshots…');
      await expect(room.dialog('Snapshots').getByRole('link', { name: 'View Looked at' })).toBeVisible();
      await expectAccessible(page, 'Snapshots');
      await room.dialog('Snapshots').getByRole('link', { name: 'View Looked at' }).click();
      await page.waitForURL(/\/snapshots\//);
      await room.ready();
      await expectAccessible(page, 'the snapshot');
    });

    test('the dialog of a conflict', async ({ makeTeam, visit, baseURL, watch }) => {
      watch.allow(/net::ERR_INTERNET_DISCONNECTED/);
      const team = await makeTeam('owner', 'designer');
      const page = await visitIn(theme, visit, baseURL, team.person('designer'));
      const mine = await openImported(page, 'In two places', dividerSheet());
      await page.context().setOffline(true);
      await mine.drawing.select('R1');
      await mine.drawing.keys('Delete');
      await mine.expectKeeping('local');
      const other = await visit(team.person('owner'));
      await other.goto(page.url());
      const theirs = new Room(other);
      await theirs.ready();
      theirs.drawing.know(dividerSheet());
      await expect(theirs.drawing.parts).toHaveCount(dividerSheet().parts.length);
      await theirs.drawing.select('R2');
      await theirs.drawing.keys('Delete');
      await theirs.expectKeeping('saved');
      await page.context().setOffline(false);
      await expect(mine.dialog('This sheet was changed in two places')).toBeVisible({ timeout: 15_000 });
      await expectAccessible(page, 'the conflict');
      await mine.dialog('This sheet was changed in two places').getByRole('button', { name: 'Keep theirs' }).click();
      await expectAccessible(page, 'the question before dropping');
    });
  });
}
