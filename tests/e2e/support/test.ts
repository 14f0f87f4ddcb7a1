import { test as base, expect, type BrowserContext, type BrowserContextOptions, type Page } from '@playwright/test';
import type { Role } from '@/app/_shared/roles';
import { Records, type Person, type Team } from './records';
import { signInQuietly } from './session';
import { createWatch, type Watch } from './watch';

export { expect };

export type Fixtures = {
  /** Holds every browser of the test to its manners, and fails the test at its end if one was without. */
  readonly watch: Watch;
  /** A team of the test's own. */
  readonly makeTeam: (...roles: readonly Role[]) => Promise<Team>;
  /** Opens a browser of its own, with no cookie and no storage of another; signed in when a person is given. */
  readonly visit: (person?: Pick<Person, 'email' | 'password'> | null, options?: BrowserContextOptions) => Promise<Page>;
};

export const test = base.extend<Fixtures & { readonly guarded: void }, { readonly records: Records }>({
  records: [
    async ({}, provide) => {
      const records = await Records.open();
      await provide(records);
      await records.close();
    },
    { scope: 'worker' },
  ],

  watch: async ({ baseURL }, provide) => {
    const watch = createWatch(baseURL ?? '');
    await provide(watch);
    expect(watch.troubles, 'no error in the console, no exception, no request to another host').toEqual([]);
  },

  context: async ({ context, watch }, provide) => {
    watch.over(context);
    await provide(context);
  },

  guarded: [
    async ({ records, watch: _watch }, provide) => {
      await records.forgetAddress();
      await provide();
    },
    { auto: true },
  ],

  makeTeam: async ({ records }, provide) => {
    await provide((...roles) => records.team(...roles));
  },

  visit: async ({ browser, watch }, provide) => {
    const open: BrowserContext[] = [];
    await provide(async (person = null, options = {}) => {
      const context = await browser.newContext(options);
      open.push(context);
      watch.over(context);
      if (person !== null) await signInQuietly(context, person);
      return context.newPage();
    });
    for (const context of open) await context.close();
  },
});
