import { dividerSheet } from '../support/sample-sheets';
import { Room } from './support/room';
import { fillSignIn, fillSignUp, listening, signIn } from './support/session';
import { importSheet, SheetList } from './support/sheet-list';
import { expect, test } from './support/test';

const document = dividerSheet();
const NOT_FOUND = /the server responded with a status of 404/;
const UNAUTHORIZED = /the server responded with a status of 401/;

test('the address of another team’s sheet leads nowhere, as one that never was', async ({ makeTeam, visit, watch }) => {
  watch.allow(NOT_FOUND);
  const [ours, others] = [await makeTeam('designer'), await makeTeam('owner')];
  const id = await importSheet(await visit(ours.person('designer')), 'Ours', document);
  const stranger = await visit(others.person('owner'));
  const answers = new Map<string, string>();
  for (const address of [id, 'AAAAAAAAAAAAAAAAAAAA']) {
    const response = await stranger.goto(`/sheets/${address}`);
    expect(response?.status()).toBe(404);
    await expect(stranger.getByRole('heading', { name: 'There is no such sheet' })).toBeVisible();
    answers.set(address, await stranger.locator('main').innerText());
    for (const path of [`/api/sheets/${address}`, `/api/sheets/${address}/export`, `/api/sheets/${address}/notes`]) {
      expect((await stranger.request.get(path)).status(), path).toBe(404);
    }
  }
  expect(new Set(answers.values()).size).toBe(1);
  await expect((await SheetList.open(stranger)).sheets).toHaveCount(0);
});

test('without a session every page leads to signing in, and from there to where one wanted to go', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const id = await importSheet(await visit(team.person('designer')), 'Behind the door', document);
  const page = await visit();
  for (const path of ['/sheets', `/sheets/${id}`, '/team', '/account']) {
    await page.goto(path);
    await expect(page).toHaveURL(new RegExp(`/sign-in\\?next=${encodeURIComponent(path)}$`));
  }
  await page.goto(`/sheets/${id}`);
  await fillSignIn(page, team.person('designer'));
  await page.waitForURL(`**/sheets/${id}`);
  await expect(page.getByRole('heading', { name: 'Behind the door' })).toBeVisible();
});

test('a reviewer has no Shelf, and no key changes the network', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer', 'reviewer');
  const id = await importSheet(await visit(team.person('designer')), 'Not to be touched', document);
  const room = await Room.open(await visit(team.person('reviewer')), id);
  room.drawing.know(document);
  await expect(room.drawing.parts).toHaveCount(document.parts.length);
  await expect(room.page.getByRole('navigation', { name: 'Shelf' })).toHaveCount(0);
  await expect(room.page.getByRole('button', { name: 'Snapshot', exact: true })).toHaveCount(0);

  await room.drawing.select('R2');
  await expect(room.ledger.field('Resistance')).not.toBeEditable();
  await room.drawing.keys('Delete', 'Backspace', 't', 'm', 'r', 'Enter', 'ArrowRight', 'Control+d', 'Control+x', 'Control+z');
  await room.drawing.doublePress('R1');
  await expect(room.drawing.editor('Resistance', 'R1')).toHaveCount(0);
  await room.drawing.move('R2', { x: 60, y: 0 }).catch(() => undefined);
  await expect(room.drawing.parts).toHaveCount(document.parts.length);
  // Looking is free: the frequency turns for the one who looks, and for nobody else.
  await room.drawing.keys('}');
  expect(await room.band.hertz()).toBe(1259);
  expect(await room.onServer()).toEqual(document);
  await room.page.reload();
  await room.ready();
  expect(await room.band.hertz()).toBe(1000);
});

test('a viewer reads the figures and the list, and is offered nothing that changes them', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer', 'viewer');
  const id = await importSheet(await visit(team.person('designer')), 'For the lab', document);
  const page = await visit(team.person('viewer'));
  const list = await SheetList.open(page);
  await expect(list.sheets).toHaveText(['For the lab']);
  await expect(page.getByRole('button', { name: 'New sheet' })).toHaveCount(0);
  await expect(page.getByRole('button', { name: 'Import' })).toHaveCount(0);
  const room = await Room.open(page, id);
  await room.ledger.show('node');
  await expect.poll(() => room.ledger.reading('out')).toMatch(/0\.500\sV/);
  await expect(page.getByRole('navigation', { name: 'Shelf' })).toHaveCount(0);
});

test('an owner changes a role, and it holds at once in the other’s browser', async ({ makeTeam, visit }) => {
  const team = await makeTeam('owner', 'reviewer');
  const reviewer = team.person('reviewer');
  const theirs = await visit(reviewer);
  await expect((await SheetList.open(theirs)).page.getByRole('button', { name: 'New sheet' })).toHaveCount(0);

  const page = await visit(team.person('owner'));
  await page.goto('/team');
  const role = page.getByRole('combobox', { name: `Role of ${reviewer.name}` });
  await listening(role);
  await role.selectOption({ label: 'Designer' });
  await expect(page.getByRole('region', { name: 'Messages' })).toContainText(`${reviewer.name} is designer now.`);
  await theirs.reload();
  await (await SheetList.open(theirs)).begin('Now I may');

  // A team is never without an owner.
  const own = page.getByRole('combobox', { name: `Role of ${team.person('owner').name}` });
  await own.selectOption({ label: 'Viewer' });
  await expect(page.getByRole('region', { name: 'Messages' })).toContainText('A team keeps at least one owner.');
  await expect(own).toHaveValue('owner');
});

test('a removed member is out at once, and what they drew stays', async ({ makeTeam, visit, watch }) => {
  watch.allow(UNAUTHORIZED);
  const team = await makeTeam('owner', 'designer');
  const designer = team.person('designer');
  const theirs = await visit(designer);
  await importSheet(theirs, 'Drawn before leaving', document);

  const page = await visit(team.person('owner'));
  await page.goto('/team');
  const remove = page.getByRole('button', { name: `Remove ${designer.name} from the team` });
  await listening(remove);
  await remove.click();
  await page.getByRole('alertdialog').getByRole('button', { name: 'Remove' }).click();
  await expect(remove).toHaveCount(0);

  await theirs.goto('/sheets');
  await expect(theirs).toHaveURL(/\/sign-in/);
  await fillSignIn(theirs, designer);
  await expect(theirs.getByRole('alert').filter({ hasText: 'This account is in no team any more.' })).toBeVisible();
  await expect((await SheetList.open(page)).sheets).toHaveText(['Drawn before leaving']);
});

test('signing out ends the session in this browser', async ({ makeTeam, visit }) => {
  const team = await makeTeam('viewer');
  const page = await visit();
  await signIn(page, team.person('viewer'));
  const menu = page.getByRole('button', { name: `Signed in as ${team.person('viewer').name}` });
  await listening(menu);
  await menu.click();
  await page.getByRole('menuitem', { name: 'Sign out' }).click();
  await page.waitForURL('**/sign-in');
  await page.goto('/sheets');
  await expect(page).toHaveURL(/\/sign-in\?next=/);
});

test('a change of password ends every other session, and the old one opens nothing', async ({ makeTeam, visit, watch }) => {
  watch.allow(UNAUTHORIZED);
  const team = await makeTeam('designer');
  const person = team.person('designer');
  const [here, elsewhere] = [await visit(person), await visit(person)];
  await SheetList.open(elsewhere);

  await here.goto('/account');
  await listening(here.locator('form'));
  const change = async (current: string, next: string) => {
    await here.getByLabel('Present password').fill(current);
    await here.getByLabel('New password').fill(next);
    await here.getByRole('button', { name: 'Change the password' }).click();
  };
  await change('not my password', 'another-tide-table-8');
  await expect(here.getByText('That is not your present password.')).toBeVisible();
  await change(person.password, 'short');
  await expect(here.getByText('A password has at least 10 characters.')).toBeVisible();
  await change(person.password, 'another-tide-table-8');
  await expect(here.getByRole('region', { name: 'Messages' })).toContainText('Your password is changed.');

  await here.goto('/sheets');
  await expect(here.getByRole('heading', { name: 'Sheets', level: 1 })).toBeVisible();
  await elsewhere.goto('/sheets');
  await expect(elsewhere).toHaveURL(/\/sign-in/);
  await fillSignIn(elsewhere, person);
  await expect(elsewhere.getByRole('alert').filter({ hasText: 'The address or the password is not right.' })).toBeVisible();
  await fillSignIn(elsewhere, { ...person, password: 'another-tide-table-8' });
  await expect(elsewhere.getByRole('heading', { name: 'Sheets', level: 1 })).toBeVisible();
});

test('a wrong password and an unknown address get the same sentence, and too many tries another', async ({ makeTeam, visit, watch }) => {
  watch.allow(UNAUTHORIZED);
  const team = await makeTeam('designer');
  const person = team.person('designer');
  const page = await visit();
  await page.goto('/sign-in');
  const refusal = page.locator('form').getByRole('alert');
  await fillSignIn(page, { email: 'nobody@nowhere.example', password: 'whatever-it-is' });
  await expect(refusal).toHaveText('The address or the password is not right. Check both and try again.');

  for (let tries = 0; tries < 10; tries += 1) {
    await page.getByLabel('E-mail').fill(person.email);
    const answer = page.waitForResponse(/\/api\/auth\/callback\/credentials/);
    await page.getByLabel('Password', { exact: true }).fill(`guess number ${tries}`);
    await page.getByRole('button', { name: 'Sign in' }).click();
    await answer;
    await expect(refusal).toHaveText('The address or the password is not right. Check both and try again.');
  }
  // Now not even the right one: whoever guesses learns nothing from it.
  await fillSignIn(page, person);
  await expect(refusal).toHaveText(/^That was tried too often\. Try again in (a minute|\d+ minutes)\.$/);
});

test('signing up says what is wrong beside the field, and a taken address is said to be taken', async ({ makeTeam, page }) => {
  const team = await makeTeam('owner');
  await fillSignUp(page, { name: '', team: 'A team', email: 'not an address', password: 'short' });
  await expect(page.getByText('Say what colleagues call you.')).toBeVisible();
  await expect(page.getByText('That is not an e-mail address.')).toBeVisible();
  await expect(page.getByText('A password has at least 10 characters.')).toBeVisible();
  await fillSignUp(page, { name: 'Double', team: 'A team', email: team.person('owner').email, password: 'long-enough-now' });
  await expect(page.getByText('There is an account with this address already. Sign in instead.')).toBeVisible();
  await expect(page).toHaveURL(/\/sign-up$/);
});
