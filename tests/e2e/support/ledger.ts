import { expect, type Locator, type Page } from '@playwright/test';
import { expectPolar, type Polar } from './figures';

const QUANTITIES = { current: 'Current', voltage: 'Voltage', power: 'Power', node: 'Nodes' } as const;
export type Quantity = keyof typeof QUANTITIES;

/** The column at the right of the open sheet. */
export class Ledger {
  readonly region: Locator;

  constructor(page: Page) {
    this.region = page.getByRole('complementary', { name: 'Ledger' });
  }

  /** Chooses which readings the table shows. */
  async show(quantity: Quantity): Promise<void> {
    await this.region.getByRole('radiogroup', { name: 'Quantity' }).getByRole('radio', { name: QUANTITIES[quantity] }).check();
  }

  row(name: string): Locator {
    return this.region.getByRole('row').filter({ has: this.region.page().getByRole('button', { name, exact: true }) });
  }

  /** The reading of a line of the table, `532 µA ∠ 57.9°`, of the quantity that is shown. */
  async reading(name: string): Promise<string> {
    return (await this.row(name).getByRole('cell').allInnerTexts()).join(' ');
  }

  /** Holds a reading of the table to a computed value, to every digit that is shown. */
  async expectReading(quantity: Quantity, name: string, expected: Polar): Promise<void> {
    await this.show(quantity);
    await expect(async () => expectPolar(await this.reading(name), expected, `${quantity} of ${name}`)).toPass({ timeout: 15_000 });
  }

  /** The field of the selected part. */
  field(label: string): Locator {
    return this.region.getByRole('textbox', { name: label, exact: true });
  }

  /** Why there are no readings, or not all. */
  get problems(): Locator {
    return this.region.getByRole('region', { name: 'Problems' });
  }

  get cautions(): Locator {
    return this.region.getByRole('region', { name: /^Take care/ });
  }

  note(number: number): Locator {
    return this.region.locator(`[data-note-thread="${number}"]`);
  }
}
