import type { Page } from '@playwright/test';
import { dividerSheet } from '../support/sample-sheets';
import type { Team } from './support/records';
import { Room } from './support/room';
import { importSheet } from './support/sheet-list';
import { expect, test } from './support/test';

/** The promise of the notes: they reach another open browser within this. */
const REACH_MS = 3_000;

const document = dividerSheet();

async function openFor(page: Page, id: string): Promise<Room> {
  const room = await Room.open(page, id);
  room.drawing.know(document);
  await expect(room.drawing.parts).toHaveCount(document.parts.length);
  return room;
}

async function begin(team: Team, visit: (person: ReturnType<Team['person']>) => Promise<Page>) {
  const designerPage = await visit(team.person('designer'));
  const id = await importSheet(designerPage, 'Level divider', document);
  return { id, designer: await openFor(designerPage, id), reviewer: await openFor(await visit(team.person('reviewer')), id) };
}

test('a reviewer pins notes to a part, a node and a place, and the designer sees them at once', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer', 'reviewer');
  const { designer, reviewer } = await begin(team, visit);

  await reviewer.pinNote(() => reviewer.drawing.select('R1'), 'Is 1 % enough here?', 'Query');
  await expect(designer.page.locator('[data-note="1"]')).toBeVisible({ timeout: REACH_MS });
  await expect(designer.ledger.note(1)).toContainText('Query · at R1');
  await expect(designer.ledger.note(1)).toContainText('Is 1 % enough here?');
  await expect(designer.ledger.note(1)).toContainText(team.person('reviewer').name);

  await reviewer.pinNote(() => reviewer.drawing.pressPin('R2.a'), 'What does the next stage draw from this node?', 'Major');
  await expect(designer.ledger.note(2)).toContainText('Major · at node out', { timeout: REACH_MS });

  // The wire from the source to R1 has no name: it is that of the node it belongs to.
  await reviewer.pinNote(async () => reviewer.drawing.press(await reviewer.drawing.middleOfWire(0)), 'This run is long.');
  await expect(designer.ledger.note(3)).toContainText(/Minor · at node (?!out)/, { timeout: REACH_MS });

  await reviewer.pinNote(() => reviewer.drawing.press({ x: 620, y: 320 }), 'Leave room for a connector.', 'Observation');
  await expect(designer.ledger.note(4)).toContainText('Observation · at a place', { timeout: REACH_MS });
  await expect(designer.page.locator('[data-note]')).toHaveCount(4);
});

test('a note is answered, resolved and reopened, each step in the other’s open sheet', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer', 'reviewer');
  const { designer, reviewer } = await begin(team, visit);
  await reviewer.pinNote(() => reviewer.drawing.select('R2'), 'What carries this resistor?');
  await expect(designer.ledger.note(1)).toBeVisible({ timeout: REACH_MS });

  await designer.ledger.note(1).getByRole('button', { name: 'Reply' }).click();
  await designer.ledger.note(1).getByRole('textbox', { name: 'Reply to note 1' }).fill('A quarter of a watt.\nIt is read on the sheet.');
  await designer.ledger.note(1).getByRole('button', { name: 'Reply' }).click();
  await expect(reviewer.ledger.note(1).getByRole('list', { name: 'Replies to note 1' })).toContainText('A quarter of a watt.', { timeout: REACH_MS });
  // Whoever draws does not close.
  await expect(designer.ledger.note(1).getByRole('button', { name: 'Resolve' })).toHaveCount(0);

  await reviewer.ledger.note(1).getByRole('button', { name: 'Resolve' }).click();
  const pin = designer.page.locator('[data-note="1"]');
  await expect(pin).toHaveAttribute('aria-label', /resolved/, { timeout: REACH_MS });
  await expect(designer.ledger.note(1)).toBeHidden();
  await pin.click();
  await expect(designer.ledger.note(1)).toContainText(`Resolved by ${team.person('reviewer').name}`);

  await reviewer.page.locator('[data-note="1"]').click();
  await reviewer.ledger.note(1).getByRole('button', { name: 'Reopen' }).click();
  await expect(pin).not.toHaveAttribute('aria-label', /resolved/, { timeout: REACH_MS });
});

test('a viewer reads the notes and writes none', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer', 'reviewer', 'viewer');
  const { id, reviewer } = await begin(team, visit);
  await reviewer.pinNote(() => reviewer.drawing.select('R1'), 'Read by everyone.');
  const viewer = await openFor(await visit(team.person('viewer')), id);
  await expect(viewer.ledger.note(1)).toContainText('Read by everyone.');
  await expect(viewer.ledger.region.getByRole('button', { name: 'Pin a note' })).toHaveCount(0);
  for (const act of ['Reply', 'Resolve', 'Reopen']) {
    await expect(viewer.ledger.note(1).getByRole('button', { name: act })).toHaveCount(0);
  }
  await viewer.drawing.surface.focus();
  await viewer.drawing.keys('q');
  await viewer.drawing.select('R2');
  await expect(viewer.ledger.region.getByRole('form')).toHaveCount(0);
});

test('what the designer draws comes to the reviewer’s open sheet', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer', 'reviewer');
  const { designer, reviewer } = await begin(team, visit);
  await reviewer.ledger.show('node');
  await expect.poll(() => reviewer.ledger.reading('out')).toMatch(/0\.500\sV/);

  await designer.drawing.select('R2');
  await designer.ledger.field('Resistance').fill('3k');
  await designer.ledger.field('Resistance').press('Enter');
  await designer.expectKeeping('saved');
  await expect.poll(() => reviewer.ledger.reading('out'), { timeout: 15_000 }).toMatch(/0\.750\sV/);
  await expect.poll(() => reviewer.drawing.words('R2'), { timeout: 15_000 }).toContain('3.00');
});
