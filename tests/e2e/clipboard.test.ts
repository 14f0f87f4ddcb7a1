import { dividerSheet } from '../support/sample-sheets';
import { importSheet, openImported } from './support/sheet-list';
import { Room } from './support/room';
import { expect, test } from './support/test';

const document = dividerSheet();
const CLIPBOARD = { permissions: ['clipboard-read', 'clipboard-write'] };

test('parts go from one sheet to another with their wires, and get designators of their own there', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'), CLIPBOARD);
  const source = await openImported(page, 'From here', document);
  const { drawing } = source;
  await drawing.surface.focus();
  await drawing.keys('Control+a', 'Control+c');
  await expect(drawing.spoken).toContainText('Copied');

  const target = await openImported(page, 'To there', document);
  await target.drawing.surface.focus();
  await target.drawing.keys('Control+v');
  await expect(target.drawing.parts).toHaveCount(2 * document.parts.length);
  for (const name of ['R1', 'R2', 'R3', 'R4', 'VS1', 'VS2']) await expect(target.drawing.part(name)).toHaveCount(1);
  await target.expectKeeping('saved');
  const pasted = await target.onServer();
  expect(pasted.wires).toHaveLength(2 * document.wires.length);
  expect(new Set(pasted.parts.map(({ id }) => id)).size).toBe(2 * document.parts.length);

  // One step for undo, and what was cut comes back with it too.
  await target.drawing.keys('Control+z');
  await expect(target.drawing.parts).toHaveCount(document.parts.length);
  await target.drawing.keys('Control+a', 'Control+x');
  await expect(target.drawing.parts).toHaveCount(0);
  await target.drawing.keys('Control+v');
  await expect(target.drawing.parts).toHaveCount(document.parts.length);
  await target.ledger.show('node');
  await expect.poll(() => target.ledger.reading('out')).toMatch(/0\.500\sV/);
});

test('what is not ours on the clipboard is refused softly, and changes nothing', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'), CLIPBOARD);
  const id = await importSheet(page, 'Unmoved', document);
  const room = await Room.open(page, id);
  await expect(room.drawing.parts).toHaveCount(document.parts.length);
  for (const text of ['a line from a letter', '{"format":"ohmstead-parts","version":1,"parts":[{"kind":"bomb"}],"wires":[]}', '<b>R1</b>']) {
    await page.evaluate((words) => navigator.clipboard.writeText(words), text);
    await room.drawing.surface.focus();
    await room.drawing.keys('Escape', 'Control+v');
    await expect(room.drawing.spoken).toContainText('There are no parts on the clipboard to paste.');
    await expect(room.drawing.parts).toHaveCount(document.parts.length);
  }
  await room.expectKeeping('saved');
  expect(await room.onServer()).toEqual(document);
});

test('the readings are copied as a table that a spreadsheet reads', async ({ makeTeam, visit }) => {
  const team = await makeTeam('viewer', 'designer');
  const id = await importSheet(await visit(team.person('designer')), 'To a spreadsheet', document);
  const page = await visit(team.person('viewer'), CLIPBOARD);
  const room = await Room.open(page, id);
  await room.ledger.region.getByRole('button', { name: 'Copy all readings as CSV' }).click();
  await expect(room.drawing.spoken).toContainText('Copied.');
  const lines = (await page.evaluate(() => navigator.clipboard.readText())).trim().split(/\r?\n/);
  expect(lines[0]).toBe('kind,name,quantity,real,imaginary,magnitude,angle_deg,unit,convention,frequency_Hz');
  const cells = lines.find((line) => line.startsWith('part,R2,current,'))?.split(',') ?? [];
  // 1 V over two resistors of 1 kΩ.
  expect(Number(cells[3])).toBeCloseTo(0.0005, 15);
  expect(cells.slice(7)).toEqual(['A', 'rms', '1000']);
});
