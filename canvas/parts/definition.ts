import type { Box } from '../geometry/box';
import type { Direction } from '../geometry/placement';
import type { Point } from '../geometry/point';
import type { Element, Unit } from '@/solver';

/** The Shelf's groups, in its order. */
export const SHELF_GROUPS = ['Resist', 'Store', 'Drive', 'Join'] as const;
export type ShelfGroup = (typeof SHELF_GROUPS)[number];

/** A pin in the part's own frame: mirrored and turned with the part. */
export type PinDefinition = {
  readonly name: string;
  /** What the pin is called aloud ("first pin", "plus"). */
  readonly label: string;
  readonly at: Point;
  readonly outward: Direction;
};

export type FieldDefinition =
  | {
      readonly type: 'quantity';
      readonly key: string;
      readonly label: string;
      readonly unit: Unit;
      readonly initial: string;
      readonly hint?: string;
    }
  /** A frequency in hertz or radians a second, by its unit; empty for the sheet's operating frequency. */
  | { readonly type: 'frequency'; readonly key: string; readonly label: string; readonly initial: string }
  /** An angle in degrees, or with `rad`, in radians. */
  | { readonly type: 'angle'; readonly key: string; readonly label: string; readonly initial: string }
  | {
      readonly type: 'choice';
      readonly key: string;
      readonly label: string;
      readonly options: readonly { readonly value: string; readonly label: string }[];
      readonly initial: string;
    }
  | { readonly type: 'nodeName'; readonly key: string; readonly label: string; readonly initial: string };

/** Field values as typed, by field key. */
export type PartValues = Readonly<Record<string, string>>;

/** What a part gives the solver, or the field that cannot be read and why. */
export type ElementOutcome =
  | { readonly ok: true; readonly element: Element }
  | { readonly ok: false; readonly field: string; readonly message: string };

/** One stroke of a symbol, in the part's own frame: an SVG path, thin or of the drawing's line weight, or filled. */
export type Stroke = { readonly d: string; readonly style?: 'line' | 'thin' | 'dot' };

/** A mark of a symbol that stays upright however the part is turned. */
export type Mark = { readonly text: string; readonly at: Point };

/** All there is to know of a kind of part: adding one is a folder with this, and a line in the registry. */
export type PartDefinition = {
  readonly name: string;
  readonly group: ShelfGroup;
  /** What the part is for, in a line, on the Shelf. */
  readonly about: string;
  /** The letters of its reference designator (IEEE 315 / IEC 81346-2); empty for parts that have none. */
  readonly letters: string;
  /** The key that takes it from the Shelf. */
  readonly key: string;
  readonly pins: readonly PinDefinition[];
  /** The body: what is hit, outlined when selected, and kept clear by its own wires. */
  readonly body: Box;
  readonly strokes: readonly Stroke[];
  readonly marks?: readonly Mark[];
  readonly fields: readonly FieldDefinition[];
  /** What stands beside the designator on the drawing. */
  describe(values: PartValues): string;
  /** Absent for parts that only join or name nodes. */
  element?(id: string, nodes: readonly string[], values: PartValues): ElementOutcome;
};
