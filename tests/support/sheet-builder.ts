import { freeDesignator } from '@/canvas/document/designators';
import { emptySheetDocument } from '@/canvas/document/schema';
import type { Part, PinRef, SheetDocument, Wire } from '@/canvas/document/types';
import type { Turn } from '@/canvas/geometry/placement';
import type { Point } from '@/canvas/geometry/point';
import { initialValues, type PartKind } from '@/canvas/parts/registry';

export type PartOptions = {
  readonly turn?: Turn;
  readonly mirrored?: boolean;
  readonly designator?: string;
  readonly values?: Readonly<Record<string, string>>;
};

/**
 * Draws a sheet in code, for tests and samples: `const r1 = sheet.part('resistor', 340, 200)`, then
 * `sheet.wire([r1, 'b'], [c1, 'a'])`. Ids tell what they are (`resistor-2`, `wire-5`), so that a failure can be read.
 */
export class SheetBuilder {
  private readonly parts: Part[] = [];
  private readonly wires: Wire[] = [];

  part(kind: PartKind, x: number, y: number, options: PartOptions = {}): string {
    const taken = new Set(this.parts.map(({ designator }) => designator));
    const number = this.parts.filter((part) => part.kind === kind).length + 1;
    const id = `${kind}-${number}`;
    this.parts.push({
      id,
      kind,
      at: { x, y },
      turn: options.turn ?? 0,
      mirrored: options.mirrored ?? false,
      designator: options.designator ?? freeDesignator(kind, taken),
      values: { ...initialValues(kind), ...options.values },
    });
    return id;
  }

  resistor(x: number, y: number, resistance: string, turn: Turn = 0): string {
    return this.part('resistor', x, y, { turn, values: { resistance } });
  }

  capacitor(x: number, y: number, capacitance: string, turn: Turn = 0): string {
    return this.part('capacitor', x, y, { turn, values: { capacitance } });
  }

  inductor(x: number, y: number, inductance: string, turn: Turn = 0): string {
    return this.part('inductor', x, y, { turn, values: { inductance } });
  }

  junction(x: number, y: number): string {
    return this.part('junction', x, y);
  }

  reference(x: number, y: number): string {
    return this.part('reference', x, y);
  }

  name(x: number, y: number, name: string, turn: Turn = 0): string {
    return this.part('nodeName', x, y, { turn, values: { name } });
  }

  /** Joins two pins; a pin is a part and its pin's name, or a part alone for pin `a`. Answers the wire's id. */
  wire(from: string | readonly [string, string], to: string | readonly [string, string], corners: readonly Point[] = []): string {
    const id = `wire-${this.wires.length + 1}`;
    this.wires.push({ id, from: pinOf(from), to: pinOf(to), corners });
    return id;
  }

  document(change: Partial<SheetDocument> = {}): SheetDocument {
    return { ...emptySheetDocument(), parts: [...this.parts], wires: [...this.wires], ...change };
  }
}

function pinOf(pin: string | readonly [string, string]): PinRef {
  return typeof pin === 'string' ? { part: pin, pin: 'a' } : { part: pin[0], pin: pin[1] };
}
