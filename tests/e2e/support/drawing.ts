import { expect, type Locator, type Page } from '@playwright/test';
import type { SheetDocument } from '@/canvas/document/types';
import { place, type Placement, type Turn } from '@/canvas/geometry/placement';
import { snap, type Point } from '@/canvas/geometry/point';
import { definitionOf, type PartKind } from '@/canvas/parts/registry';

type Known = Placement & { readonly kind: PartKind; readonly id: string };

/** A pin as a person would say it, `R1.a`, or a part of no designator by the name it was given when it was placed. */
export type PinName = `${string}.${string}`;

/**
 * The hand on the drawing. It knows where it put things, in the sheet's own units, and finds them on the screen by the
 * view as it is at that moment.
 */
export class Drawing {
  readonly surface: Locator;
  private readonly known = new Map<string, Known>();

  constructor(private readonly page: Page) {
    this.surface = page.locator('[data-drawing]');
  }

  /** A part on the drawing, by designator; a part without one by its kind. */
  part(name: string): Locator {
    return this.surface.locator(`.react-flow__node[data-part="${name}"]`);
  }

  /** How many parts are drawn. */
  get parts(): Locator {
    return this.surface.locator('.react-flow__node');
  }

  /** Learns where the parts of a document lie: those with a designator by it, the others by their id. */
  know(document: SheetDocument): void {
    for (const { id, kind, at, turn, mirrored, designator } of document.parts) {
      this.known.set(designator === '' ? id : designator, { id, kind, at, turn, mirrored });
    }
  }

  /** Drags a part from the Shelf onto the drawing. Answers its designator, or `as` for a part that has none. */
  async place(kind: PartKind, at: Point, as?: string): Promise<string> {
    const before = await this.ids();
    await this.page.locator(`[data-shelf-group="${definitionOf(kind).group}"]`).click();
    const corner = await this.surface.boundingBox();
    if (corner === null) throw new Error('the drawing is not on the screen');
    const target = await this.screenOf(at);
    await this.page
      .locator(`[data-shelf-part="${kind}"]`)
      .dragTo(this.surface, { targetPosition: { x: target.x - corner.x, y: target.y - corner.y } });
    // As the Shelf hands them out: sources stand upright.
    const turn: Turn = kind === 'voltageSource' || kind === 'currentSource' ? 90 : 0;
    return this.learn(before, { kind, at, turn, mirrored: false }, as);
  }

  /** Learns of the one part that has come to those there were before. */
  private async learn(before: ReadonlySet<string>, placed: Omit<Known, 'id'>, as?: string): Promise<string> {
    await expect(this.parts).toHaveCount(before.size + 1);
    const id = [...(await this.ids())].find((one) => !before.has(one)) ?? '';
    const element = this.surface.locator(`.react-flow__node[data-id="${id}"]`);
    await expect(element).toHaveAttribute('data-part', /./);
    const name = as ?? (await element.getAttribute('data-part')) ?? '';
    this.known.set(name, { ...placed, id });
    return name;
  }

  private async ids(): Promise<ReadonlySet<string>> {
    return new Set(await this.parts.evaluateAll((nodes) => nodes.map((node) => node.getAttribute('data-id') ?? '')));
  }

  /** Turns the part a quarter clockwise. */
  async turn(name: string): Promise<void> {
    const part = this.at(name);
    await this.select(name);
    await this.page.keyboard.press('t');
    this.known.set(name, { ...part, turn: ((part.turn + 90) % 360) as Turn });
  }

  /** Draws a wire in one go, from a pin to a pin. */
  async wire(from: PinName, to: PinName): Promise<void> {
    await this.pull(await this.pinOnScreen(from), await this.pinOnScreen(to));
  }

  /** Draws a wire from a pin to a place, such as the middle of another wire. */
  async wireTo(from: PinName, place: Point): Promise<void> {
    await this.pull(await this.pinOnScreen(from), await this.screenOf(place));
  }

  private async pull(from: Point, to: Point): Promise<void> {
    await this.page.mouse.move(from.x, from.y);
    await this.page.mouse.down();
    await this.page.mouse.move((from.x + to.x) / 2, (from.y + to.y) / 2, { steps: 4 });
    await this.page.mouse.move(to.x, to.y, { steps: 4 });
    await this.page.mouse.up();
  }

  /** Presses on a part. */
  async select(name: string): Promise<void> {
    const { x, y } = await this.middleOf(name);
    await this.page.mouse.click(x, y);
  }

  async doublePress(name: string): Promise<void> {
    const { x, y } = await this.middleOf(name);
    await this.page.mouse.dblclick(x, y);
  }

  /** Presses on a place of the sheet. */
  async press(at: Point): Promise<void> {
    const { x, y } = await this.screenOf(at);
    await this.page.mouse.click(x, y);
  }

  async pressPin(pin: PinName): Promise<void> {
    const { x, y } = await this.pinOnScreen(pin);
    await this.page.mouse.click(x, y);
  }

  /** Presses on a place of the sheet with a finger. */
  async tap(at: Point): Promise<void> {
    const { x, y } = await this.screenOf(at);
    await this.page.touchscreen.tap(x, y);
  }

  async tapPin(pin: PinName): Promise<void> {
    const { x, y } = await this.pinOnScreen(pin);
    await this.page.touchscreen.tap(x, y);
  }

  /** Tells the hand of a part that was placed in another way than by `place`. */
  learnPlace(name: string, kind: PartKind, at: Point, turn: Turn = 0): void {
    this.known.set(name, { id: '', kind, at, turn, mirrored: false });
  }

  /** Drags a part by a way in the sheet's units; the sheet takes it to the grid. */
  async move(name: string, by: Point): Promise<void> {
    const part = this.at(name);
    await this.holdAndMove(name, by);
    await this.page.mouse.up();
    const at = snap({ x: part.at.x + by.x, y: part.at.y + by.y });
    this.known.set(name, { ...part, at });
  }

  /** Drags a part and does not let go of it. */
  async holdAndMove(name: string, by: Point): Promise<void> {
    const middle = this.centreOf(name);
    const from = await this.screenOf(middle);
    const to = await this.screenOf({ x: middle.x + by.x, y: middle.y + by.y });
    await this.page.mouse.move(from.x, from.y);
    await this.page.mouse.down();
    await this.page.mouse.move((from.x + to.x) / 2, (from.y + to.y) / 2, { steps: 4 });
    await this.page.mouse.move(to.x, to.y, { steps: 4 });
  }

  /** Draws a box with the pointer, from corner to corner. */
  async box(from: Point, to: Point): Promise<void> {
    await this.pull(await this.screenOf(from), await this.screenOf(to));
  }

  /** Presses keys, one after the other. */
  async keys(...keys: readonly string[]): Promise<void> {
    for (const key of keys) await this.page.keyboard.press(key);
  }

  /** The field that opens beside a part on a double press or Enter. */
  editor(field: string, name: string): Locator {
    return this.surface.getByRole('textbox', { name: `${field} of ${name}` });
  }

  /** What was spoken last. */
  get spoken(): Locator {
    return this.page.locator('[data-spoken]');
  }

  /** What the part is called aloud: its value, its readings, what is wrong with it. */
  async words(name: string): Promise<string> {
    return (await this.part(name).getAttribute('aria-label')) ?? '';
  }

  /** The middle of the longest stretch of the wire that was drawn as the `index`th, in the sheet's units. */
  async middleOfWire(index: number): Promise<Point> {
    const path = (await this.page.locator('#resting-wires').getAttribute('d')) ?? '';
    const course = (path.split('M').slice(1)[index] ?? '')
      .split('L')
      .flatMap((pair) => {
        const [x, y] = pair.trim().split(/[\s,]+/).map(Number);
        return x === undefined || y === undefined || Number.isNaN(y) ? [] : [{ x, y }];
      });
    let best: { readonly length: number; readonly middle: Point } | null = null;
    for (const [at, start] of course.entries()) {
      const end = course[at + 1];
      if (!end) break;
      const length = Math.hypot(end.x - start.x, end.y - start.y);
      if (best === null || length > best.length) best = { length, middle: { x: (start.x + end.x) / 2, y: (start.y + end.y) / 2 } };
    }
    if (best === null) throw new Error(`there is no wire ${index} in “${path}”`);
    return best.middle;
  }

  private at(name: string): Known {
    const part = this.known.get(name);
    if (!part) throw new Error(`the hand has not placed ${name}`);
    return part;
  }

  private centreOf(name: string): Point {
    const part = this.at(name);
    const { left, right, top, bottom } = definitionOf(part.kind).body;
    return place(part, { x: (left + right) / 2, y: (top + bottom) / 2 });
  }

  private async middleOf(name: string): Promise<Point> {
    return this.screenOf(this.centreOf(name));
  }

  private async pinOnScreen(name: PinName): Promise<Point> {
    const dot = name.lastIndexOf('.');
    const part = this.at(name.slice(0, dot));
    const pin = definitionOf(part.kind).pins.find((one) => one.name === name.slice(dot + 1));
    if (!pin) throw new Error(`there is no pin ${name}`);
    return this.screenOf(place(part, pin.at));
  }

  /** A place of the sheet as a place of the page. */
  private async screenOf({ x, y }: Point): Promise<Point> {
    const view = await this.surface.evaluate((surface) => {
      const viewport = surface.querySelector('.react-flow__viewport');
      if (viewport === null) throw new Error('the drawing has no view yet');
      const { a: zoom, e: dx, f: dy } = new DOMMatrix(getComputedStyle(viewport).transform);
      const { left, top } = surface.getBoundingClientRect();
      return { zoom, dx: dx + left, dy: dy + top };
    });
    return { x: x * view.zoom + view.dx, y: y * view.zoom + view.dy };
  }
}
