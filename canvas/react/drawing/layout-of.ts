import { layOutLabels, type LabelLayout } from '../../labels/label-layout';
import type { SheetState } from '../../store/sheet-store';

type Made = { readonly key: readonly unknown[]; readonly layout: LabelLayout };

let last: Made | null = null;

/**
 * The label layout of the open sheet, made again only when the drawing, or what is shown on it, has changed. One is
 * kept, since one sheet is open.
 */
export function layoutOf({ document, readings, showing }: Pick<SheetState, 'document' | 'readings' | 'showing'>): LabelLayout {
  const key = [document.parts, document.wires, showing, document.convention.form];
  if (last && last.key.every((item, index) => item === key[index])) return last.layout;
  const layout = layOutLabels(document, readings.network.nodes, showing, document.convention.form);
  last = { key, layout };
  return layout;
}
