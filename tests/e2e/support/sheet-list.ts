import { expect, type Locator, type Page } from '@playwright/test';
import { writeSheetFile } from '@/canvas/document/export-file';
import type { SheetDocument } from '@/canvas/document/types';
import { Room } from './room';
import { listening } from './session';

/** The team's list of sheets. */
export class SheetList {
  constructor(readonly page: Page) {}

  static async open(page: Page): Promise<SheetList> {
    await page.goto('/sheets');
    const list = new SheetList(page);
    await list.ready();
    return list;
  }

  async ready(): Promise<void> {
    await expect(this.page.getByRole('heading', { name: 'Sheets', level: 1 })).toBeVisible();
    await listening(this.page.getByRole('searchbox', { name: 'Search the sheets' }));
  }

  /** The names of the sheets, as listed. */
  get sheets(): Locator {
    return this.page.locator('[data-sheet-link]');
  }

  sheet(name: string): Locator {
    return this.sheets.filter({ hasText: name });
  }

  /** What was last said at the edge of the page. */
  get said(): Locator {
    return this.page.getByRole('region', { name: 'Messages' });
  }

  /** Begins a new sheet and goes there. */
  async begin(name: string): Promise<Room> {
    await this.page.getByRole('button', { name: /New sheet|Begin the first sheet/ }).first().click();
    const dialog = this.page.getByRole('dialog', { name: 'New sheet' });
    await dialog.getByLabel('Name').fill(name);
    await dialog.getByRole('button', { name: 'Begin drawing' }).click();
    await this.page.waitForURL(/\/sheets\/[\w-]{10,}$/);
    const room = new Room(this.page);
    await room.ready();
    return room;
  }

  /** Hands a file to the page as its picker would. */
  async choose(name: string, text: string | Buffer): Promise<void> {
    await this.page
      .locator('input[type="file"]')
      .setInputFiles({ name, mimeType: 'application/json', buffer: Buffer.from(text) });
  }

  async act(sheet: string, entry: string): Promise<void> {
    await this.page.getByRole('button', { name: `Actions for ${sheet}` }).click();
    await this.page.getByRole('menuitem', { name: entry }).click();
  }
}

/** Brings a document into the team of whoever looks at the page, by importing it as a file. Answers the new sheet's id. */
export async function importSheet(page: Page, name: string, document: SheetDocument): Promise<string> {
  const list = await SheetList.open(page);
  await list.choose('sheet.json', writeSheetFile({ name, document }));
  const link = list.sheet(name);
  await expect(link).toBeVisible();
  return (await link.getAttribute('data-sheet-link')) ?? '';
}

/** Imports a document and opens it, with the hand knowing where its parts lie. */
export async function openImported(page: Page, name: string, document: SheetDocument): Promise<Room> {
  const room = await Room.open(page, await importSheet(page, name, document));
  room.drawing.know(document);
  await expect(room.drawing.parts).toHaveCount(document.parts.length);
  return room;
}
