import { expect, type Locator, type Page } from '@playwright/test';

/** The strip along the bottom, with the operating frequency. */
export class Band {
  readonly handle: Locator;
  private readonly region: Locator;

  constructor(private readonly page: Page) {
    this.handle = page.getByRole('slider', { name: 'Operating frequency' });
    this.region = page.getByRole('contentinfo', { name: 'Band' });
  }

  /** The operating frequency in hertz, to its last digit. */
  async hertz(): Promise<number> {
    return Number(await this.handle.getAttribute('aria-valuenow'));
  }

  /** Drags the handle by a way in pixels, to the right for a higher frequency. */
  async drag(pixels: number): Promise<void> {
    const box = await this.handle.boundingBox();
    if (box === null) throw new Error('the handle is not on the screen');
    const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
    await this.page.mouse.move(x, y);
    await this.page.mouse.down();
    await this.page.mouse.move(x + pixels, y, { steps: 12 });
    await this.page.mouse.up();
  }

  /** The length of the axis in pixels. */
  async length(): Promise<number> {
    const box = await this.handle.locator('xpath=ancestor::*[contains(@class, "inset-x-0")][1]').boundingBox();
    if (box === null) throw new Error('the axis is not on the screen');
    return box.width;
  }

  /** Types the operating frequency. */
  async type(text: string): Promise<void> {
    await this.handle.focus();
    await this.page.keyboard.press('Enter');
    const field = this.page.getByRole('textbox', { name: 'Operating frequency' });
    await field.fill(text);
    await field.press('Enter');
    await expect(field).toBeHidden();
  }

  get shown(): Locator {
    return this.region;
  }
}
