import { expect, type Locator, type Page } from '@playwright/test';
import type { SheetDocument } from '@/canvas/document/types';
import { parseSheetFile } from '@/canvas/document/export-file';
import { Band } from './band';
import { Drawing } from './drawing';
import { Ledger } from './ledger';
import { listening } from './session';

export type KeepingState = 'saved' | 'saving' | 'local' | 'conflict' | 'unavailable';

/** An open sheet. */
export class Room {
  readonly drawing: Drawing;
  readonly ledger: Ledger;
  readonly band: Band;

  constructor(readonly page: Page) {
    this.drawing = new Drawing(page);
    this.ledger = new Ledger(page);
    this.band = new Band(page);
  }

  /** Opens a sheet by its address. */
  static async open(page: Page, id: string): Promise<Room> {
    await page.goto(`/sheets/${id}`);
    const room = new Room(page);
    await room.ready();
    return room;
  }

  /** Waits until the sheet answers to the hand. */
  async ready(): Promise<void> {
    await expect(this.drawing.surface).toBeVisible();
    await listening(this.drawing.surface);
    // As long as it is being found out who writes here, the sheet takes no hand.
    await expect(this.page.locator('[inert] [data-drawing]')).toHaveCount(0);
  }

  get id(): string {
    const id = /\/sheets\/([\w-]+)/.exec(this.page.url())?.[1];
    if (id === undefined) throw new Error(`${this.page.url()} is not the address of a sheet`);
    return id;
  }

  /** Where the keeping stands, as the masthead says it. */
  get keeping(): Locator {
    return this.page.locator('[data-keeping]');
  }

  async expectKeeping(state: KeepingState, timeout = 10_000): Promise<void> {
    await expect(this.keeping).toHaveAttribute('data-keeping', state, { timeout });
  }

  /** Chooses from the sheet's menu. */
  async menu(entry: string | RegExp): Promise<void> {
    await this.page.getByRole('button', { name: 'More', exact: true }).click();
    await this.page.getByRole('menuitem', { name: entry }).click();
  }

  dialog(title: string | RegExp): Locator {
    return this.page.getByRole('dialog', { name: title });
  }

  /** What the server has of the sheet. */
  async onServer(): Promise<SheetDocument> {
    return serverDocument(this.page, this.id);
  }

  /** Pins a note to what a press hits. */
  async pinNote(press: () => Promise<void>, text: string, noteClass?: string): Promise<void> {
    await this.ledger.region.getByRole('button', { name: 'Pin a note' }).click();
    await press();
    const form = this.ledger.region.getByRole('form', { name: /^New note/ });
    if (noteClass !== undefined) await form.getByLabel('Class').selectOption({ label: noteClass });
    await form.getByLabel('Note', { exact: true }).fill(text);
    await form.getByRole('button', { name: 'Pin note' }).click();
    await expect(form).toBeHidden();
  }
}

/** The document of a sheet as the server would export it now. */
export async function serverDocument(page: Page, id: string): Promise<SheetDocument> {
  const answer = await page.request.get(`/api/sheets/${id}/export`);
  const read = parseSheetFile(await answer.text());
  if (!read.ok) throw new Error(`the server's file of sheet ${id}: ${read.message}`);
  return read.document;
}
