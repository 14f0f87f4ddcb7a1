import type { CommandContext } from '../../commands/command';
import { extentOf, findPin, partsById } from '../../document/lookup';
import type { PartId, PinRef, SheetDocument, WireId } from '../../document/types';
import { boxOfPoints, centreOf, unite, type Box } from '../../geometry/box';

/** Things on the drawing that a line of the Ledger speaks of. */
export type Place = {
  readonly parts: readonly PartId[];
  readonly pins?: readonly PinRef[];
  readonly wires?: readonly WireId[];
};

/** Selects what a line speaks of and brings it into view. Pins cannot be selected: where only they are known, their parts are. */
export function showOnDrawing(context: CommandContext, { parts, pins = [], wires = [] }: Place): void {
  const named = parts.length > 0 || wires.length > 0 ? parts : [...new Set(pins.map(({ part }) => part))];
  context.select({ parts: new Set(named), wires: new Set(wires) });
  const box = boxOf(context.document, named, pins);
  if (box) context.screen.reveal(centreOf(box));
}

function boxOf(document: SheetDocument, parts: readonly PartId[], pins: readonly PinRef[]): Box | null {
  const byId = partsById(document);
  const extents = parts.flatMap((id) => {
    const part = byId.get(id);
    return part ? [extentOf(part)] : [];
  });
  return unite(extents) ?? boxOfPoints(pins.flatMap((ref) => findPin(document, ref)?.at ?? []));
}
