import { chromium, type Browser, type BrowserContext } from '@playwright/test';
import demonstration from '@/db/seeds/accounts.json' with { type: 'json' };
import { signInQuietly } from '../../e2e/support/session';

/** A fresh browser's view of the application, signed in as a designer of the demonstration: nothing in its cache. */
export async function freshContext(browser: Browser): Promise<BrowserContext> {
  const context = await browser.newContext({ baseURL: process.env.BASE_URL, viewport: { width: 1440, height: 900 }, locale: 'en-GB' });
  context.setDefaultTimeout(60_000);
  const designer = demonstration.accounts.find(({ role }) => role === 'designer');
  await signInQuietly(context, { email: designer?.email ?? '', password: demonstration.password });
  return context;
}

/** Measures in a browser of its own, and closes it whatever happens. */
export async function inBrowser(measure: (browser: Browser) => Promise<void>): Promise<void> {
  const browser = await chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-background-networking', '--disable-component-update', '--disable-sync', '--no-first-run'],
  });
  try {
    await measure(browser);
  } finally {
    await browser.close();
  }
}
