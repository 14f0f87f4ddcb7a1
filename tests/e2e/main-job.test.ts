import type { Page } from '@playwright/test';
import { currentOf, outputOf, type LowPass } from './support/low-pass';
import type { Room } from './support/room';
import { fillSignUp, listening } from './support/session';
import { SheetList } from './support/sheet-list';
import { expect, test } from './support/test';

// The first path that anyone goes, from the front page to a clone, in one piece as they do it.
test('a new user draws a low-pass with the pointer, reads it, errs, undoes, keeps, freezes and clones it', async ({ page }) => {
  test.setTimeout(120_000);
  await page.goto('/');
  await page.getByRole('link', { name: 'Make an account' }).click();
  await page.waitForURL('**/sign-up');
  await listening(page.locator('form'));
  const mark = Date.now().toString(36);
  await fillSignUp(page, { name: 'Lena Strand', team: `Strand ${mark}`, email: `lena-${mark}@strand.example`, password: 'under-the-weir-9' });
  await expect(page.getByRole('heading', { name: 'No sheets yet' })).toBeVisible();

  const list = new SheetList(page);
  await list.ready();
  const room = await list.begin('River low-pass');
  await drawLowPass(room);
  const filter: LowPass = { volts: 5, ohms: 4700, farads: 10e-9 };

  await test.step('the readings are those of the formula', async () => {
    expect(await room.band.hertz()).toBe(1000);
    await expectReadings(room, filter, 1000);
  });

  const hertz = await test.step('dragging the frequency turns every reading with it', async () => {
    const expected = 1000 * (100_000 / 10) ** (160 / (await room.band.length()));
    await room.band.drag(160);
    const hertz = await room.band.hertz();
    // The handle's frequency is kept to four digits, and the pointer stands on whole pixels.
    expect(hertz).toBeGreaterThan(expected * 0.995);
    expect(hertz).toBeLessThan(expected * 1.005);
    await expectReadings(room, filter, hertz);
    return hertz;
  });

  await test.step('a value that cannot be read gets a sentence, and the old one stays', async () => {
    await room.drawing.select('R1');
    const field = room.ledger.field('Resistance');
    await field.fill('4k7 parsecs');
    await field.press('Tab');
    await expect(room.ledger.region.getByText(/“4k7 parsecs” was not taken; R1 keeps 4\.70\s*kΩ\. .+\./)).toBeVisible();
    await expect(field).toHaveValue('4k7');

    await room.drawing.doublePress('C1');
    const editor = room.drawing.editor('Capacitance', 'C1');
    await editor.fill('ten');
    await expect(room.drawing.surface.locator('#value-editor-echo')).toHaveText(/[a-z].+\.$/);
    await room.drawing.press({ x: 620, y: 100 });
    await expect(editor).toBeHidden();
    await expect(room.drawing.spoken).toContainText('C1 keeps 10n.');
    await expectReadings(room, filter, hertz);
  });

  await test.step('without a reference there are no node voltages, and the sheet says why', async () => {
    await room.drawing.select('ground');
    await room.drawing.keys('Delete');
    await expect(room.ledger.problems).toContainText('reference');
    await expect.poll(() => room.drawing.words('R1')).toContain('at fault');
    await room.drawing.keys('Control+z');
    await expect(room.ledger.problems).toBeHidden();
    await expectReadings(room, filter, hertz);
    await expect.poll(() => room.drawing.words('R1')).not.toContain('at fault');
  });

  await test.step('undo and redo go as far as there is anything to undo', async () => {
    const parts = await room.drawing.parts.count();
    for (let steps = 0; steps < 40; steps += 1) await room.drawing.keys('Control+z');
    await expect(room.drawing.parts).toHaveCount(0);
    for (let steps = 0; steps < 40; steps += 1) await room.drawing.keys('Control+Shift+z');
    // The last of all was taking the reference away, which had been undone: redone too, it goes again, and the junction
    // that its wire made with it.
    await expect(room.drawing.parts).toHaveCount(parts - 2);
    await room.drawing.keys('Control+z');
    await expect(room.drawing.parts).toHaveCount(parts);
    await expectReadings(room, filter, hertz);
  });

  await test.step('it is there again after a reload', async () => {
    await room.expectKeeping('saved');
    await page.reload();
    await room.ready();
    expect(await room.band.hertz()).toBe(hertz);
    await expectReadings(room, filter, hertz);
  });

  await test.step('a snapshot stays as it was when the sheet goes on', async () => {
    await page.getByRole('button', { name: 'Snapshot', exact: true }).click();
    const dialog = room.dialog('Take a snapshot');
    await dialog.getByLabel('Name').fill('Before review');
    await dialog.getByRole('button', { name: 'Take snapshot' }).click();
    await expect(dialog).toBeHidden();

    await room.drawing.select('R1');
    await setField(page, room, 'Resistance', '10k');
    await expectReadings(room, { ...filter, ohms: 10_000 }, hertz);
    await room.expectKeeping('saved');

    const sheet = page.url();
    await room.menu('Snapshots…');
    await room.dialog('Snapshots').getByRole('link', { name: 'View Before review' }).click();
    await page.waitForURL(/\/snapshots\//);
    await room.ready();
    await expect(page.getByText('Before review').first()).toBeVisible();
    await expectReadings(room, filter, hertz);
    await page.goto(sheet);
    await room.ready();
    await expectReadings(room, { ...filter, ohms: 10_000 }, hertz);
  });

  await test.step('a clone is a sheet of its own that knows where it came from', async () => {
    const original = room.id;
    await page.getByRole('button', { name: 'Clone', exact: true }).click();
    const dialog = room.dialog('Clone this sheet');
    await expect(dialog.getByLabel('Name of the clone')).toHaveValue('River low-pass (clone)');
    await dialog.getByRole('button', { name: 'Clone', exact: true }).click();
    await expect(page.getByRole('heading', { name: 'River low-pass (clone)' })).toBeVisible();
    await room.ready();
    expect(room.id).not.toBe(original);
    await expectReadings(room, { ...filter, ohms: 10_000 }, hertz);
    await page.getByRole('button', { name: 'More', exact: true }).click();
    await page.getByRole('menuitem', { name: /^Cloned from River low-pass, revision \d+$/ }).click();
    await page.waitForURL(`**/sheets/${original}`);
  });
});

/** Everything with the pointer: parts dragged from the Shelf, wires pulled from pin to pin and onto a wire. */
async function drawLowPass(room: Room): Promise<void> {
  const { drawing, page } = room;
  await test.step('parts are dragged from the Shelf, and wires pulled from pin to pin', async () => {
    expect(await drawing.place('voltageSource', { x: 420, y: 320 })).toBe('VS1');
    expect(await drawing.place('resistor', { x: 560, y: 200 })).toBe('R1');
    expect(await drawing.place('capacitor', { x: 700, y: 320 })).toBe('C1');
    await drawing.turn('C1');
    await drawing.place('reference', { x: 560, y: 480 }, 'ground');
    await drawing.wire('VS1.a', 'R1.a');
    await drawing.wire('R1.b', 'C1.a');
    await drawing.wire('VS1.b', 'C1.b');
    // Onto the wire that was drawn last, which makes a junction of the place.
    await drawing.wireTo('ground.a', await drawing.middleOfWire(2));
    await expect(drawing.part('junction')).toHaveCount(1);
  });
  await test.step('values are typed as engineers type them, and what was understood is echoed', async () => {
    await drawing.select('R1');
    await room.ledger.field('Resistance').fill('4k7');
    await expect(room.ledger.region.getByText(/understood as 4\.70\s*kΩ/)).toBeVisible();
    await room.ledger.field('Resistance').press('Enter');
    await drawing.select('C1');
    await setField(page, room, 'Capacitance', '10n');
    await drawing.select('VS1');
    await setField(page, room, 'Amplitude', '5 V');
  });
}

async function setField(page: Page, room: Room, label: string, text: string): Promise<void> {
  const field = room.ledger.field(label);
  await field.fill(text);
  await page.keyboard.press('Enter');
  await expect(field).toHaveValue(text);
}

async function expectReadings(room: Room, filter: LowPass, hertz: number): Promise<void> {
  await room.ledger.expectReading('voltage', 'C1', outputOf(filter, hertz));
  await room.ledger.expectReading('current', 'R1', currentOf(filter, hertz));
}
