import { ladderSheet, dividerSheet } from '../support/sample-sheets';
import type { SheetDocument } from '@/canvas/document/types';
import { openImported } from './support/sheet-list';
import { expect, test } from './support/test';

const document = dividerSheet();
const placeOf = (sheet: SheetDocument, name: string) => {
  const part = sheet.parts.find(({ designator }) => designator === name);
  return part && { ...part.at, turn: part.turn, mirrored: part.mirrored };
};

test('a part is moved on the grid, turned, mirrored, nudged and deleted, and every step goes back', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const room = await openImported(page, 'Moved about', document);
  const { drawing } = room;
  const onServer = async () => {
    await room.expectKeeping('saved');
    return room.onServer();
  };

  await drawing.move('R1', { x: 43, y: -38 });
  await expect.poll(async () => placeOf(await onServer(), 'R1')).toEqual({ x: 370, y: 160, turn: 0, mirrored: false });
  await drawing.keys('t', 'm');
  await expect.poll(async () => placeOf(await onServer(), 'R1')).toMatchObject({ x: 370, y: 160, mirrored: true });
  await drawing.keys('Control+z', 'Control+z', 'ArrowRight', 'Shift+ArrowDown');
  await expect.poll(async () => placeOf(await onServer(), 'R1')).toEqual({ x: 380, y: 210, turn: 0, mirrored: false });
  await drawing.keys('Delete');
  await expect(drawing.part('R1')).toHaveCount(0);
  await drawing.keys('Control+z');
  await expect(drawing.part('R1')).toHaveCount(1);
  for (let steps = 0; steps < 5; steps += 1) await drawing.keys('Control+z');
  await expect.poll(async () => onServer()).toEqual(document);
});

test('Escape in the middle of a drag puts everything back', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const room = await openImported(page, 'Thought better of', document);
  const resting = await room.drawing.part('R1').boundingBox();
  await room.drawing.holdAndMove('R1', { x: 80, y: 60 });
  await expect.poll(() => room.drawing.part('R1').boundingBox()).not.toEqual(resting);
  await room.drawing.keys('Escape');
  await page.mouse.up();
  await expect.poll(() => room.drawing.part('R1').boundingBox()).toEqual(resting);
  await room.expectKeeping('saved');
  expect(await room.onServer()).toEqual(document);
});

test('a box selects, Shift adds, and a duplicate has designators of its own', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const room = await openImported(page, 'Doubled', document);
  const { drawing } = room;
  await drawing.box({ x: 270, y: 150 }, { x: 620, y: 380 });
  await expect(room.ledger.region).toContainText(/\d things/);
  await drawing.keys('Escape');
  await drawing.select('R1');
  await page.keyboard.down('Shift');
  await drawing.select('R2');
  await page.keyboard.up('Shift');
  await expect(room.ledger.region).toContainText('2 things');
  await drawing.keys('Control+d');
  await expect(drawing.part('R3')).toHaveCount(1);
  await expect(drawing.part('R4')).toHaveCount(1);
  await drawing.keys('Delete', 'Control+a');
  await expect(room.ledger.region).toContainText(`${document.parts.length + document.wires.length} things`);
});

test('what the list of keys names does what it says: zoom, fit, and what stands on the drawing', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const room = await openImported(page, 'Looked at', ladderSheet(30));
  const { drawing } = room;
  const view = page.locator('.react-flow__viewport');
  const fitted = await view.getAttribute('style');
  await drawing.surface.focus();
  await drawing.keys('0');
  await expect(view).toHaveAttribute('style', /scale\(1\)/);
  await drawing.keys('+');
  await expect(view).toHaveAttribute('style', /scale\(1\.2\)/);
  await drawing.keys('f');
  await expect(view).toHaveAttribute('style', fitted ?? '');
  await drawing.keys('2');
  await expect(drawing.spoken).toContainText('voltages shown.');
  await drawing.keys('p');
  await expect(drawing.spoken).toContainText('Readings are peak.');
  await expect(room.ledger.region.getByRole('button', { name: /^Readings/ })).toContainText('peak');

  await drawing.keys('?');
  const keys = room.dialog('Keys');
  await expect(keys.getByText('Take a resistor')).toBeVisible();
  await drawing.keys('Escape');
  await expect(keys).toBeHidden();
  // Whoever knows no key types what they want.
  await drawing.keys('Control+k');
  await page.keyboard.type('rectangular');
  await page.keyboard.press('Enter');
  await expect(drawing.spoken).toContainText('Readings are rectangular.');
  await room.ledger.show('current');
  await expect.poll(() => room.ledger.reading('R1')).toMatch(/ [+−] j/);
});

test('a source is typed in full, and one of another frequency is dead and says so', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const room = await openImported(page, 'Driven', document);
  const { ledger } = room;
  await room.drawing.select('VS1');
  await ledger.field('Amplitude').fill('10');
  await ledger.field('Amplitude').press('Enter');
  await ledger.region.getByRole('radio', { name: 'peak to peak' }).check();
  await ledger.region.getByRole('radio', { name: 'sine', exact: true }).check();
  await ledger.field('Phase').fill('30');
  await ledger.field('Phase').press('Enter');
  // 10 V peak to peak are 10/(2√2) V rms, and sin(ωt + 30°) is cos(ωt − 60°); half of it is at the output.
  await ledger.expectReading('node', 'out', { size: 10 / (2 * Math.SQRT2) / 2, degrees: -60 });

  await ledger.region.getByRole('radio', { name: 'its own' }).check();
  await ledger.field('In Hz or rad/s').fill('50 Hz');
  await ledger.field('In Hz or rad/s').press('Enter');
  await expect(page.getByRole('list', { name: 'How to read the figures' })).toContainText(/VS1 \(50\.00\sHz\) is dead at 1\.000\skHz/);
  await expect.poll(() => room.drawing.words('VS1')).toContain('dead at this frequency');
  await room.band.type('50');
  await ledger.expectReading('node', 'out', { size: 10 / (2 * Math.SQRT2) / 2, degrees: -60 });
});

test('a wire on a wire makes a junction, and a node keeps the name it is given', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const room = await openImported(page, 'Joined', document);
  const { drawing } = room;
  const junctions = document.parts.filter(({ kind }) => kind === 'junction').length;
  expect(await drawing.place('capacitor', { x: 600, y: 320 })).toBe('C1');
  await drawing.turn('C1');
  await drawing.wireTo('C1.a', await drawing.middleOfWire(0));
  await expect(drawing.part('junction')).toHaveCount(junctions + 1);
  await drawing.select('nodeName-1');
  await room.ledger.field('Name').fill('sense');
  await room.ledger.field('Name').press('Enter');
  await room.ledger.show('node');
  await expect(room.ledger.row('sense')).toBeVisible();
  await expect(room.ledger.row('out')).toHaveCount(0);
});
