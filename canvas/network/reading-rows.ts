import type { SheetDocument } from '../document/types';
import { withoutRounding, type ReadingConvention } from './format-reading';
import { angleDegrees, magnitude, type Phasor } from './phasor';
import type { Readings } from './readings';

/** The quantities of the table of readings, one shown at a time. */
export const READING_QUANTITIES = ['current', 'voltage', 'power', 'node'] as const;
export type ReadingQuantity = (typeof READING_QUANTITIES)[number];

/** A line of the table: a part or a node, and its rms phasor, or null where it is not determined. */
export type ReadingRow = {
  /** The part's id, or the node's name. */
  readonly id: string;
  readonly name: string;
  readonly phasor: Phasor | null;
};

/** By name, or by the first or the second figure of the line. */
export type ReadingOrder = { readonly by: 'name' | 'first' | 'second'; readonly descending: boolean };

/** Every part that is an element, or every node that touches one, in drawing order. */
export function readingRows(document: SheetDocument, readings: Readings, quantity: ReadingQuantity): readonly ReadingRow[] {
  const { network } = readings;
  if (quantity === 'node') {
    return network.nodes.all
      .filter((node) => node.pins.some((pin) => network.elementOfPart.has(pin.part)))
      .map(({ name }) => ({ id: name, name, phasor: readings.nodes.get(name) ?? null }));
  }
  return document.parts
    .filter((part) => part.designator !== '')
    .map((part) => ({ id: part.id, name: part.designator, phasor: readings.parts.get(part.id)?.[quantity] ?? null }));
}

const natural = new Intl.Collator('en', { numeric: true });

/** Designators and node names as people order them: R2 before R10. */
export function compareNames(a: string, b: string): number {
  return natural.compare(a, b);
}

/**
 * What the two figures of a line are: of a power its active and reactive part, of a direct value the value alone, of
 * any other phasor its magnitude and angle, in whichever form it is shown.
 */
export function figuresOf(phasor: Phasor, quantity: ReadingQuantity, convention: ReadingConvention): readonly [number, number] {
  if (quantity === 'power') {
    // As it is shown: what rounding left must not decide the order of zeros.
    const { re, im } = withoutRounding(phasor);
    return [re, im];
  }
  if (convention === 'direct') return [phasor.re, phasor.im];
  return [magnitude(phasor), angleDegrees(phasor)];
}

/** The lines in order; lines without a figure come last either way, and equal ones stand by name. */
export function orderRows(
  rows: readonly ReadingRow[],
  order: ReadingOrder,
  quantity: ReadingQuantity,
  convention: ReadingConvention,
): readonly ReadingRow[] {
  const sign = order.descending ? -1 : 1;
  if (order.by === 'name') return [...rows].sort((a, b) => sign * compareNames(a.name, b.name));
  const column = order.by === 'first' ? 0 : 1;
  const keyed = rows.map((row) => ({ row, key: row.phasor ? figuresOf(row.phasor, quantity, convention)[column] : null }));
  keyed.sort((a, b) => {
    if (a.key === null || b.key === null) {
      if (a.key === b.key) return compareNames(a.row.name, b.row.name);
      return a.key === null ? 1 : -1;
    }
    return sign * (a.key - b.key) || compareNames(a.row.name, b.row.name);
  });
  return keyed.map(({ row }) => row);
}

/** The lines whose name holds the text, in either case. */
export function filterRows(rows: readonly ReadingRow[], text: string): readonly ReadingRow[] {
  const wanted = text.trim().toLocaleLowerCase('en');
  return wanted === '' ? rows : rows.filter(({ name }) => name.toLocaleLowerCase('en').includes(wanted));
}
