import { SheetBuilder } from '../support/sheet-builder';
import { openImported } from './support/sheet-list';
import { expect, test } from './support/test';

/** 230 V, 50 Hz across 47 µF: ½·C·(√2·230 V)² is 2.49 J. */
function mains() {
  const sheet = new SheetBuilder();
  const source = sheet.part('voltageSource', 200, 320, { turn: 90, values: { amplitude: '230' } });
  const capacitor = sheet.capacitor(460, 320, '47µ', 90);
  sheet.wire(source, capacitor);
  sheet.wire([source, 'b'], [capacitor, 'b']);
  sheet.wire([source, 'b'], sheet.reference(200, 420));
  return sheet.document({ operatingFrequency: '50 Hz' });
}

test('a dangerous voltage and a dangerous charge are said at the part, once at the top, and on a print', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const room = await openImported(page, 'From the mains', mains());

  // At the part: the triangle is drawn, and the words are read aloud.
  await expect.poll(() => room.drawing.words('C1')).toMatch(/caution: .*230\sV AC \(rms\), above 50 V.*C1 stores up to 2\.49\sJ/);
  await expect(room.drawing.part('C1').locator('.text-caution')).toBeVisible();
  // Once at the top: with the limit's source and the advice.
  const { cautions } = room.ledger;
  await expect(cautions).toHaveCount(1);
  await expect(cautions).toContainText('IEC 61140');
  await expect(cautions).toContainText('common practice');
  for (const advice of ['Isolate', 'discharge', 'local codes', 'licensed practice']) await expect(cautions).toContainText(advice);

  const words = cautions.getByText(/C1 stores up to 2\.49\sJ/);
  await expect(words).toBeVisible();
  await cautions.getByRole('button', { name: /^Take care/ }).click();
  await expect(words).toBeHidden();
  await expect(cautions.getByRole('button', { name: /^Take care/ })).toBeVisible();

  // Folded or not, scrolled or not: a print has them in full.
  await page.emulateMedia({ media: 'print' });
  await expect(words).toBeVisible();
  await expect(cautions.getByText(/licensed practice/)).toBeVisible();
  await expect(room.drawing.part('C1').locator('.text-caution')).toBeVisible();
});

test('a harmless sheet says nothing of dangers', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const sheet = mains();
  const harmless = { ...sheet, parts: sheet.parts.map((part) => (part.designator === 'VS1' ? { ...part, values: { ...part.values, amplitude: '5' } } : part)) };
  const room = await openImported(page, 'From a battery', harmless);
  await expect.poll(() => room.drawing.words('C1')).toContain('current');
  expect(await room.drawing.words('C1')).not.toContain('caution');
  await expect(room.ledger.cautions).toHaveCount(0);
});
