import { setDesignator, setValues, type EditResult } from '../../commands/edits/values';
import type { Part, PartId } from '../../document/types';
import type { SheetStore } from '../../store/sheet-store';

function applyResult(store: SheetStore, result: EditResult, label: string): void {
  const { document, apply, say } = store.getState();
  if (!result.ok) say(result.message);
  else if (result.document !== document) apply({ label, document: result.document });
}

/** Gives fields of a part new text, as one step for undo. */
export function commitValues(store: SheetStore, id: PartId, values: Readonly<Record<string, string>>, label: string): void {
  applyResult(store, setValues(store.getState().document, id, values), label);
}

export function commitDesignator(store: SheetStore, part: Part, designator: string): void {
  const result = setDesignator(store.getState().document, part.id, designator);
  applyResult(store, result, `Rename ${part.designator} to ${designator.trim()}`);
}
