import fc from 'fast-check';
import { freeDesignator } from '@/canvas/document/designators';
import { emptySheetDocument } from '@/canvas/document/schema';
import type { Part, PinRef, SheetDocument, Wire } from '@/canvas/document/types';
import type { Turn } from '@/canvas/geometry/placement';
import { GRID, type Point } from '@/canvas/geometry/point';
import { definitionOf, initialValues, PART_KINDS } from '@/canvas/parts/registry';

export const gridPoint: fc.Arbitrary<Point> = fc
  .tuple(fc.integer({ min: -60, max: 60 }), fc.integer({ min: -40, max: 40 }))
  .map(([x, y]) => ({ x: x * GRID, y: y * GRID }));

export const anyTurn: fc.Arbitrary<Turn> = fc.constantFrom(0, 90, 180, 270);

const bare = fc.record({ kind: fc.constantFrom(...PART_KINDS), at: gridPoint, turn: anyTurn, mirrored: fc.boolean() });
const NODE_NAMES = ['in', 'mid', 'out'];

type Bare = { readonly kind: Part['kind']; readonly at: Point; readonly turn: Turn; readonly mirrored: boolean };

function dress(parts: readonly Bare[]): Part[] {
  const taken = new Set<string>();
  return parts.map((part, index): Part => {
    const designator = freeDesignator(part.kind, taken);
    if (designator !== '') taken.add(designator);
    const values =
      part.kind === 'nodeName' ? { name: NODE_NAMES[index % NODE_NAMES.length] ?? 'out' } : initialValues(part.kind);
    return { ...part, id: `p${index}`, designator, values };
  });
}

/**
 * Sheets as a hand could leave them, good and bad: parts anywhere on the grid, turned and mirrored, on top of one
 * another now and then, wired at random, with corners.
 */
export function anySheet(most: { readonly parts?: number; readonly wires?: number } = {}): fc.Arbitrary<SheetDocument> {
  return fc.array(bare, { minLength: 1, maxLength: most.parts ?? 12 }).chain((bares) => {
    const parts = dress(bares);
    const pins = parts.flatMap((part) => definitionOf(part.kind).pins.map((pin): PinRef => ({ part: part.id, pin: pin.name })));
    const pin = fc.constantFrom(...pins);
    const wires = fc.array(fc.tuple(pin, pin, fc.array(gridPoint, { maxLength: 2 })), { maxLength: most.wires ?? 14 });
    return wires.map((drawn): SheetDocument => {
      const good = drawn.filter(([from, to]) => from.part !== to.part || from.pin !== to.pin);
      return {
        ...emptySheetDocument(),
        parts,
        wires: good.map(([from, to, corners], index): Wire => ({ id: `w${index}`, from, to, corners })),
      };
    });
  });
}
