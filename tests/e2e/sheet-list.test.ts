import { dividerSheet, ladderSheet } from '../support/sample-sheets';
import { importSheet, SheetList } from './support/sheet-list';
import { expect, test } from './support/test';

test('sheets are found, ordered, renamed, cloned, put away and taken out again', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  await importSheet(page, 'Anti-alias filter', { ...ladderSheet(12), purpose: 'For the hydrophone at the weir.' });
  await importSheet(page, 'Bias divider', dividerSheet());
  await importSheet(page, 'Crossover', ladderSheet(9));
  const list = await SheetList.open(page);
  await expect(list.sheets).toHaveText(['Crossover', 'Bias divider', 'Anti-alias filter']);

  await page.getByRole('combobox', { name: 'Order' }).selectOption({ label: 'Name' });
  await expect(list.sheets).toHaveText(['Anti-alias filter', 'Bias divider', 'Crossover']);
  // By its purpose as well as by its name.
  await page.keyboard.press('Control+k');
  await page.keyboard.type('weir');
  await expect(list.sheets).toHaveText(['Anti-alias filter']);
  await page.keyboard.press('Escape');
  await expect(list.sheets).toHaveCount(3);

  await list.act('Crossover', 'Rename');
  // A hand types when it sees the field.
  await expect(page.getByRole('textbox', { name: 'New name of Crossover' })).toBeFocused();
  await page.keyboard.press('Control+a');
  await page.keyboard.type('Two-way crossover');
  await page.keyboard.press('Enter');
  await expect(list.sheet('Two-way crossover')).toBeVisible();

  await list.act('Bias divider', 'Clone');
  await expect(list.said).toContainText('“Bias divider” was cloned.');
  await expect(list.sheets).toHaveCount(4);
  await expect(page.getByRole('listitem').filter({ hasText: 'from Bias divider' })).toHaveCount(1);

  await list.act('Two-way crossover', 'Archive');
  await expect(list.sheet('Two-way crossover')).toHaveCount(0);
  await page.getByRole('button', { name: 'Archive', exact: true }).click();
  await expect(list.sheets).toHaveText(['Two-way crossover']);
  await list.act('Two-way crossover', 'Restore');
  await expect(page.getByRole('heading', { name: 'The archive is empty' })).toBeVisible();
  await page.reload();
  await expect(new SheetList(page).sheets).toHaveCount(4);
});
