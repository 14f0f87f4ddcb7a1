import { expect, type BrowserContext, type Locator, type Page } from '@playwright/test';

/** Gives a browser the session of a person, by the application's own door, without the form in front of it. */
export async function signInQuietly(
  context: BrowserContext,
  person: { readonly email: string; readonly password: string },
): Promise<void> {
  const csrf = await context.request.get('/api/auth/csrf');
  const { csrfToken } = (await csrf.json()) as { csrfToken: string };
  const answer = await context.request.post('/api/auth/callback/credentials', {
    form: { csrfToken, email: person.email, password: person.password, json: 'true' },
  });
  expect(answer.ok(), `signing in as ${person.email}`).toBe(true);
}

/** Signs in by the form, as a person does. */
export async function signIn(page: Page, person: { readonly email: string; readonly password: string }): Promise<void> {
  await page.goto('/sign-in');
  await fillSignIn(page, person);
  await expect(page.getByRole('heading', { name: 'Sheets', level: 1 })).toBeVisible();
}

export async function fillSignIn(page: Page, person: { readonly email: string; readonly password: string }): Promise<void> {
  await listening(page.locator('form'));
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByLabel('Password', { exact: true }).fill(person.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
}

export type NewAccount = { readonly name: string; readonly team: string; readonly email: string; readonly password: string };

/** Makes an account and a team by the form. Does not wait for what comes of it. */
export async function fillSignUp(page: Page, account: NewAccount): Promise<void> {
  await page.goto('/sign-up');
  await listening(page.locator('form'));
  await page.getByLabel('Your name').fill(account.name);
  await page.getByLabel('Team', { exact: true }).fill(account.team);
  await page.getByLabel('E-mail').fill(account.email);
  await page.getByLabel('Password', { exact: true }).fill(account.password);
  await page.getByRole('button', { name: 'Make the account' }).click();
}

/**
 * Waits until an element that came with the page answers to the hand. A person is slower than that; a test would press
 * a button that does nothing yet. React marks what it has taken over.
 */
export async function listening(element: Locator): Promise<void> {
  await expect
    .poll(() => element.evaluate((node) => Object.keys(node).some((key) => key.startsWith('__reactProps'))))
    .toBe(true);
}
