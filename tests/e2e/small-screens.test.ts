import type { Page } from '@playwright/test';
import { dividerSheet } from '../support/sample-sheets';
import { listening } from './support/session';
import { openImported, SheetList } from './support/sheet-list';
import { expect, test } from './support/test';

const PHONE = { viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true };
const TABLET = { viewport: { width: 834, height: 1112 }, hasTouch: true };

async function expectNoSidewaysScroll(page: Page, what: string): Promise<void> {
  const { content, screen } = await page.evaluate(() => ({
    content: document.documentElement.scrollWidth,
    screen: document.documentElement.clientWidth,
  }));
  expect(content, `${what} is no wider than the screen`).toBeLessThanOrEqual(screen);
}

for (const [name, screen] of [
  ['phone', PHONE],
  ['tablet', TABLET],
] as const) {
  test(`on a ${name} every page fits, and its main things are within reach`, async ({ makeTeam, visit }) => {
    const anyone = await visit(null, screen);
    for (const path of ['/', '/sign-in', '/sign-up']) {
      await anyone.goto(path);
      await expectNoSidewaysScroll(anyone, path);
    }
    await expect(anyone.getByRole('button', { name: 'Make the account' })).toBeVisible();

    const team = await makeTeam('owner', 'designer', 'reviewer');
    const page = await visit(team.person('owner'), screen);
    for (const path of ['/sheets', '/team', '/account']) {
      await page.goto(path);
      await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
      await expectNoSidewaysScroll(page, path);
    }
    const room = await openImported(page, 'A divider with a name that is longer than a phone is wide', dividerSheet());
    await expectNoSidewaysScroll(page, 'the open sheet');
    await expect(room.drawing.part('R1')).toBeInViewport();
    await expect(room.band.handle).toBeInViewport();
    await expect(room.keeping).toBeInViewport();
    await page.getByRole('button', { name: 'More', exact: true }).tap();
    await expect(page.getByRole('menuitem', { name: 'Snapshots…' })).toBeInViewport();
    await page.keyboard.press('Escape');
    await page.goto('/sheets');
    await expectNoSidewaysScroll(page, 'the list');
    await expect(new SheetList(page).sheets).toBeInViewport();
  });
}

test('on a phone the Ledger is a sheet from below: a part is pressed, and its readings are read', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'), PHONE);
  const room = await openImported(page, 'On a phone', dividerSheet());
  const grip = room.ledger.region.getByRole('button', { name: 'Ledger' });
  await listening(grip);
  await grip.tap();
  await expect(grip).toHaveAttribute('aria-expanded', 'true');
  await room.ledger.show('node');
  await expect(room.ledger.row('out')).toBeVisible();
  await expect.poll(() => room.ledger.reading('out')).toMatch(/0\.500\sV/);
  await grip.tap();
  await expect(grip).toHaveAttribute('aria-expanded', 'false');
  await expect(room.drawing.part('R1')).toBeInViewport();
});

test('on a tablet a finger places a part, joins it and moves it', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'), TABLET);
  const room = await openImported(page, 'On a tablet', dividerSheet());
  const before = dividerSheet().parts.length;
  await page.locator('[data-shelf-group="Resist"]').tap();
  await page.locator('[data-shelf-part="resistor"]').tap();
  await room.drawing.tap({ x: 640, y: 320 });
  await expect(room.drawing.parts).toHaveCount(before + 1);
  await expect(room.drawing.part('R3')).toBeVisible();
  room.drawing.learnPlace('R3', 'resistor', { x: 640, y: 320 });

  // A press on a pin, and one on another, joins them.
  await room.drawing.tapPin('R3.a');
  await room.drawing.tapPin('R2.a');
  await expect(room.drawing.spoken).toContainText('Joined.');
  await room.expectKeeping('saved');
  expect((await room.onServer()).wires).toHaveLength(dividerSheet().wires.length + 1);
});
