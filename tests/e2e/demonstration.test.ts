import demonstration from '@/db/seeds/accounts.json' with { type: 'json' };
import { Room } from './support/room';
import { signIn } from './support/session';
import { SheetList } from './support/sheet-list';
import { expect, test } from './support/test';

const SHEETS = [
  'Hydrophone anti-alias low-pass',
  'Hydrophone preamplifier',
  'Mains inlet filter',
  'Pump-motor power-factor bank',
  '40 kHz transducer match',
  'Two-way monitor crossover',
];

// What stands there for whoever starts the application for the first time. Nothing here changes it.
for (const { email, name, role } of demonstration.accounts) {
  test(`the printed account of ${name}, ${role}, opens the demonstration`, async ({ page }) => {
    await signIn(page, { email, password: demonstration.password });
    const list = new SheetList(page);
    await expect(list.sheets).toHaveCount(SHEETS.length);
    await expect(page.getByRole('button', { name: `Signed in as ${name}` })).toBeVisible();
    await expect(page.getByRole('button', { name: 'New sheet' })).toHaveCount(role === 'owner' || role === 'designer' ? 1 : 0);
  });
}

test('every sheet of the demonstration is solved, in balance, and without a problem', async ({ page }) => {
  test.setTimeout(120_000);
  const viewer = demonstration.accounts.find(({ role }) => role === 'viewer');
  await signIn(page, { email: viewer?.email ?? '', password: demonstration.password });
  for (const name of SHEETS) {
    await test.step(name, async () => {
      const list = await SheetList.open(page);
      const room = await Room.open(page, (await list.sheet(name).getAttribute('data-sheet-link')) ?? '');
      await expect(page.getByRole('heading', { level: 1 })).toHaveText(name);
      await expect(page.getByRole('list', { name: 'How to read the figures' })).toContainText(/Power balances/);
      await expect(room.ledger.problems).toHaveCount(0);
      for (const quantity of ['current', 'node'] as const) {
        await room.ledger.show(quantity);
        await expect(room.ledger.region.locator('tbody tr').first()).toContainText(/\d/);
        await expect(room.ledger.region.getByText('not determined')).toHaveCount(0);
      }
    });
  }
});

test('the low-pass of the demonstration has a snapshot, and a note that waits for an answer', async ({ page }) => {
  const reviewer = demonstration.accounts.find(({ role }) => role === 'reviewer');
  await signIn(page, { email: reviewer?.email ?? '', password: demonstration.password });
  const list = new SheetList(page);
  const room = await Room.open(page, (await list.sheet('Hydrophone anti-alias low-pass').getAttribute('data-sheet-link')) ?? '');
  await expect(room.ledger.note(1)).toContainText('Major · at node out');
  await expect(room.ledger.note(1).getByRole('list', { name: 'Replies to note 1' })).toContainText('3.07 kHz');
  await expect(room.ledger.note(1).getByRole('button', { name: 'Resolve' })).toBeVisible();
  await room.menu('Snapshots…');
  await expect(room.dialog('Snapshots').getByRole('listitem')).toContainText('First values, for review');
});
