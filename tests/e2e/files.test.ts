import { readFile } from 'node:fs/promises';
import { dividerSheet, ladderSheet } from '../support/sample-sheets';
import { parseSheetFile, writeSheetFile } from '@/canvas/document/export-file';
import type { SheetDocument } from '@/canvas/document/types';
import { Room, serverDocument } from './support/room';
import { importSheet, SheetList } from './support/sheet-list';
import { expect, test } from './support/test';

async function downloaded(room: Room): Promise<string> {
  const [download] = await Promise.all([room.page.waitForEvent('download'), room.menu('Export file')]);
  return readFile(await download.path(), 'utf8');
}

test('a sheet that is exported and imported again is the same sheet', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const document = ladderSheet(20);
  const room = await Room.open(page, await importSheet(page, 'Ladder “nach Maß”, 20 Teile', document));
  const file = await downloaded(room);
  expect(parseSheetFile(file)).toEqual({ ok: true, name: 'Ladder “nach Maß”, 20 Teile', document });

  const list = await SheetList.open(page);
  await list.choose('again.json', file);
  await expect(list.sheets).toHaveCount(2);
  for (const id of await list.sheets.evaluateAll((links) => links.map((link) => link.getAttribute('data-sheet-link') ?? ''))) {
    expect(await serverDocument(page, id)).toEqual(document);
  }
});

test('a file is exported as it stands on this machine when the server does not have it yet', async ({ makeTeam, visit, watch }) => {
  watch.allow(/net::ERR_INTERNET_DISCONNECTED/);
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const document = dividerSheet();
  const room = await Room.open(page, await importSheet(page, 'Far from shore', document));
  room.drawing.know(document);
  await page.context().setOffline(true);
  await room.drawing.select('R2');
  await room.ledger.field('Resistance').fill('7k5');
  await room.ledger.field('Resistance').press('Enter');
  await room.expectKeeping('local');
  const read = parseSheetFile(await downloaded(room));
  expect(read.ok && read.document.parts.find(({ designator }) => designator === 'R2')?.values['resistance']).toBe('7k5');
  await page.context().setOffline(false);
  await room.expectKeeping('saved');
});

const whole = (change: object) => JSON.stringify({ ...JSON.parse(writeSheetFile({ name: 'Tampered', document: dividerSheet() })), ...change });
const inside = (change: object) => whole({ document: { ...dividerSheet(), ...change } });
const [part] = dividerSheet().parts;
const wires = dividerSheet().wires;

/** What people drop by mistake, and what someone might send on purpose. */
const REFUSED: readonly { readonly what: string; readonly text: string | (() => string); readonly says: RegExp }[] = [
  { what: 'an empty file', text: '', says: /not JSON, or it was cut short/ },
  { what: 'a file that was cut short', text: writeSheetFile({ name: 'Cut', document: dividerSheet() }).slice(0, 900), says: /cut short/ },
  { what: 'a picture', text: '\u0089PNG\r\n\u001a\n\u0000\u0000', says: /not JSON/ },
  { what: 'JSON of something else', text: '{"name":"package","version":"1.0.0"}', says: /not a sheet file/ },
  { what: 'a list', text: '[]', says: /not a sheet file/ },
  { what: 'null', text: 'null', says: /not a sheet file/ },
  { what: 'a file of a newer version', text: whole({ fileVersion: 2 }), says: /newer version of Ohmstead/ },
  { what: 'a document of a newer version', text: inside({ version: 7 }), says: /newer version of Ohmstead/ },
  { what: 'a document without parts', text: inside({ parts: undefined }), says: /not a sheet document/ },
  { what: 'a part of no known kind', text: inside({ parts: [{ ...part, kind: 'flux-thing' }] }), says: /not a sheet document/ },
  { what: 'a part beyond the edge of the world', text: inside({ parts: [{ ...part, at: { x: 1e300, y: 0 } }] }), says: /not a sheet document/ },
  { what: 'an identifier that is markup', text: inside({ parts: [{ ...part, id: '"><script>alert(1)</script>' }] }), says: /not a sheet document/ },
  { what: 'a prototype in the place of an identifier', text: inside({ wires: [{ ...wires[0], from: { part: '__proto__.polluted', pin: 'a' } }] }), says: /not a sheet document/ },
  { what: 'more parts than a sheet has', text: () => inside({ parts: Array.from({ length: 20_000 }, (_, index) => ({ ...part, id: `p${index}` , values: {} })) }), says: /too large|larger|not a sheet document/i },
  { what: 'a file nested as deep as it can be', text: () => `${'['.repeat(400_000)}${']'.repeat(400_000)}`, says: /not a sheet file|not JSON/ },
  { what: 'a file that is too large', text: () => whole({ padding: 'x'.repeat(2_100_000) }), says: /larger than a sheet can be/ },
];

test('a broken, foreign, hostile or too large file is refused in a sentence, and nothing has changed', async ({ makeTeam, visit }) => {
  test.setTimeout(120_000);
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  await importSheet(page, 'The only sheet', dividerSheet());
  for (const { what, text, says } of REFUSED) {
    await test.step(what, async () => {
      const list = await SheetList.open(page);
      await list.choose('given.json', typeof text === 'string' ? text : text());
      await expect(list.said).toContainText('“given.json” was not imported. ');
      await expect(list.said).toContainText(says);
      await expect(list.sheets).toHaveText(['The only sheet']);
    });
  }
  await page.reload();
  await expect(new SheetList(page).sheets).toHaveText(['The only sheet']);
});

test('what is written in a file is shown as text, whatever it looks like', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const name = `<img src=x onerror="document.title='taken'"> & “R”`;
  const document: SheetDocument = { ...dividerSheet(), purpose: '<script>document.title="taken"</script>' };
  const room = await Room.open(page, await importSheet(page, name, document));
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(name);
  await expect(room.ledger.region.getByLabel('Purpose')).toHaveValue(document.purpose);
  await expect(page).not.toHaveTitle('taken');
  expect(await page.locator('img[src="x"]').count()).toBe(0);
});
