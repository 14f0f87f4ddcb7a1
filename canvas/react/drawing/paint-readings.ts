import type { Showing } from '../../commands/command';
import type { Convention, PartId, SheetDocument } from '../../document/types';
import { place } from '../../geometry/placement';
import type { Point } from '../../geometry/point';
import { READING_LINE, type Align, type LabelLayout } from '../../labels/label-layout';
import { conventionAt, formatPower, formatReading, type ReadingConvention } from '../../network/format-reading';
import { angleDegrees, magnitude, type Phasor } from '../../network/phasor';
import type { PartReading, Readings } from '../../network/readings';

/*
 * Readings are painted on one canvas over the drawing: hundreds of them change together at every move of the frequency
 * or a value, and as elements of the page each would be laid out again. The same values stand as text in the Ledger.
 */

export type Ink = {
  readonly voltage: string;
  readonly current: string;
  readonly power: string;
  readonly ink: string;
  readonly raised: string;
  readonly rule: string;
  readonly muted: string;
  readonly figures: string;
  readonly words: string;
};

export type Scene = {
  readonly document: SheetDocument;
  readonly readings: Readings;
  readonly layout: LabelLayout;
  readonly showing: Showing;
  /** Parts that a gesture carries, and how far: their readings go with them. */
  readonly carried: { readonly parts: ReadonlySet<PartId>; readonly by: Point } | null;
};

export type View = { readonly x: number; readonly y: number; readonly zoom: number };

const FIGURE_SIZE = 11.5;
const DIAL_RADIUS = 8;
const DIAL_ROOM = 2 * DIAL_RADIUS + 6;
/** Below this zoom text is too small to read; only dials are drawn. */
const LEAST_ZOOM_FOR_TEXT = 0.4;

type Line = { readonly text: string; readonly phasor: Phasor; readonly share: number; readonly colour: string };

/** The largest magnitude of each kind on the sheet: what the hands of the dials are measured by. */
type Largest = { readonly current: number; readonly voltage: number; readonly power: number; readonly node: number };

const largestOf = new WeakMap<Readings, Largest>();

function largest(readings: Readings): Largest {
  const known = largestOf.get(readings);
  if (known) return known;
  const made = { current: 0, voltage: 0, power: 0, node: 0 };
  for (const { current, voltage, power } of readings.parts.values()) {
    if (current) made.current = Math.max(made.current, magnitude(current));
    if (voltage) made.voltage = Math.max(made.voltage, magnitude(voltage));
    if (power) made.power = Math.max(made.power, magnitude(power));
  }
  for (const voltage of readings.nodes.values()) made.node = Math.max(made.node, magnitude(voltage));
  largestOf.set(readings, made);
  return made;
}

/** Paints every reading of the scene. The context is in CSS pixels, cleared, untransformed. */
export function paintReadings(context: CanvasRenderingContext2D, scene: Scene, view: View, ink: Ink): void {
  const { document, readings, layout, showing, carried } = scene;
  const convention = conventionAt(document.convention, readings.frequencyHz);
  const most = largest(readings);
  context.save();
  context.translate(view.x, view.y);
  context.scale(view.zoom, view.zoom);
  context.textBaseline = 'middle';
  const offset = (part: PartId): Point => (carried?.parts.has(part) ? carried.by : { x: 0, y: 0 });
  const withText = view.zoom >= LEAST_ZOOM_FOR_TEXT;

  for (const part of document.parts) {
    const by = offset(part.id);
    if (part.kind === 'nodeName') {
      const node = readings.network.nodes.byPin.get(`${part.id}/a`);
      const voltage = node ? readings.nodes.get(node.name) : undefined;
      paintName(context, part.values['name'] ?? '', {
        pin: { x: part.at.x + by.x, y: part.at.y + by.y },
        middle: add(place(part, { x: 0, y: -40 }), by),
        line: showing.nodes && voltage ? voltageLine(voltage, convention, most.node, ink) : null,
        ink,
      });
      continue;
    }
    const block = layout.readings.get(part.id);
    const reading = readings.parts.get(part.id);
    if (!block || !reading) continue;
    const lines = partLines(reading, showing, document.convention, convention, most, ink);
    lines.forEach((line, index) => {
      paintLine(context, line, withText, block.align, {
        x: part.at.x + by.x + block.at.x,
        y: part.at.y + by.y + block.at.y + (index + 0.5) * READING_LINE,
      }, ink);
    });
  }
  if (showing.nodes) {
    for (const [name, block] of layout.nodes) {
      const voltage = readings.nodes.get(name);
      if (!voltage) continue;
      const line = voltageLine(voltage, convention, most.node, ink);
      paintLine(context, { ...line, text: `${name}\u2002${line.text}` }, withText, block.align, { x: block.at.x, y: block.at.y + READING_LINE / 2 }, ink);
    }
  }
  context.restore();
}

function add(a: Point, b: Point): Point {
  return { x: a.x + b.x, y: a.y + b.y };
}

function partLines(
  reading: PartReading,
  showing: Showing,
  sheet: Convention,
  convention: ReadingConvention,
  most: Largest,
  ink: Ink,
): Line[] {
  const lines: Line[] = [];
  if (showing.currents && reading.current) {
    lines.push({
      text: formatReading(reading.current, 'A', convention),
      phasor: reading.current,
      share: share(reading.current, most.current),
      colour: ink.current,
    });
  }
  if (showing.voltages && reading.voltage) {
    lines.push({
      text: formatReading(reading.voltage, 'V', convention),
      phasor: reading.voltage,
      share: share(reading.voltage, most.voltage),
      colour: ink.voltage,
    });
  }
  if (showing.powers && reading.power) {
    const text = sheet.form === 'polar' ? formatReading(reading.power, 'VA', convention) : formatPower(reading.power, convention);
    lines.push({ text, phasor: reading.power, share: share(reading.power, most.power), colour: ink.power });
  }
  return lines;
}

function voltageLine(voltage: Phasor, convention: ReadingConvention, most: number, ink: Ink): Line {
  return { text: formatReading(voltage, 'V', convention), phasor: voltage, share: share(voltage, most), colour: ink.voltage };
}

function share(phasor: Phasor, most: number): number {
  return most > 0 ? magnitude(phasor) / most : 0;
}

function paintLine(context: CanvasRenderingContext2D, line: Line, withText: boolean, align: Align, at: Point, ink: Ink): void {
  context.font = `500 ${FIGURE_SIZE}px ${ink.figures}`;
  const width = DIAL_ROOM + (withText ? context.measureText(line.text).width : 0);
  const left = align === 'start' ? at.x : align === 'end' ? at.x - width : at.x - width / 2;
  paintDial(context, line, { x: left + DIAL_RADIUS, y: at.y });
  if (!withText) return;
  context.fillStyle = line.colour;
  context.fillText(line.text, left + DIAL_ROOM, at.y + 0.5);
}

/** A circle with a hand: its angle is the phase (0° to the right, anticlockwise), its length the share of the largest. */
function paintDial(context: CanvasRenderingContext2D, { phasor, share: length, colour }: Line, centre: Point): void {
  context.strokeStyle = colour;
  context.lineWidth = 1.1;
  context.beginPath();
  context.arc(centre.x, centre.y, DIAL_RADIUS, 0, 2 * Math.PI);
  context.stroke();
  const radians = (angleDegrees(phasor) * Math.PI) / 180;
  // A hand is never quite nothing: a small reading still has a phase.
  const hand = (DIAL_RADIUS - 1.5) * (length === 0 ? 0 : Math.max(0.3, length));
  context.lineWidth = 1.9;
  context.lineCap = 'round';
  context.beginPath();
  context.moveTo(centre.x, centre.y);
  context.lineTo(centre.x + hand * Math.cos(radians), centre.y - hand * Math.sin(radians));
  context.stroke();
}

type NameAt = { readonly pin: Point; readonly middle: Point; readonly line: Line | null; readonly ink: Ink };

/** A node's name on a pill, tied to its node by a dotted line, its voltage behind it. */
function paintName(context: CanvasRenderingContext2D, name: string, { pin, middle, line, ink }: NameAt): void {
  context.font = `600 12px ${ink.words}`;
  const nameWidth = context.measureText(name).width;
  context.font = `500 ${FIGURE_SIZE}px ${ink.figures}`;
  const readingWidth = line ? context.measureText(line.text).width + DIAL_ROOM + 8 : 0;
  const width = nameWidth + readingWidth + 22;
  const left = middle.x - width / 2;
  context.strokeStyle = ink.voltage;
  context.lineWidth = 1.1;
  context.setLineDash([1.5, 3]);
  context.beginPath();
  context.moveTo(pin.x, pin.y);
  context.lineTo(middle.x, middle.y);
  context.stroke();
  context.setLineDash([]);
  context.fillStyle = ink.raised;
  context.strokeStyle = ink.rule;
  context.beginPath();
  context.roundRect(left, middle.y - 13, width, 26, 13);
  context.fill();
  context.stroke();
  let x = left + 11;
  if (line) {
    paintDial(context, line, { x: x + DIAL_RADIUS - 3, y: middle.y });
    x += DIAL_ROOM - 2;
  }
  context.fillStyle = ink.voltage;
  context.font = `600 12px ${ink.words}`;
  context.fillText(name, x, middle.y + 0.5);
  if (!line) return;
  context.font = `500 ${FIGURE_SIZE}px ${ink.figures}`;
  context.fillText(line.text, x + nameWidth + 8, middle.y + 0.5);
}
