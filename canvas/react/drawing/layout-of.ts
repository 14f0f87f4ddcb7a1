import type { Part } from '../../document/types';
import { labelLines, layOutLabels, type LabelLayout } from '../../labels/label-layout';
import type { SheetState } from '../../store/sheet-store';

type Made = { readonly key: readonly unknown[]; readonly layout: LabelLayout };

let last: Made | null = null;

/**
 * The label layout of the open sheet, made again only when the drawing, or what is shown on it, has changed: a new
 * value of the same length leaves everything where it is. One layout is kept, since one sheet is open.
 */
export function layoutOf({ document, readings, showing }: Pick<SheetState, 'document' | 'readings' | 'showing'>): LabelLayout {
  const key = [shapeOf(document.parts), document.wires, showing, document.convention.form];
  if (last && last.key.every((item, index) => item === key[index])) return last.layout;
  const layout = layOutLabels(document, readings.network.nodes, showing, document.convention.form);
  last = { key, layout };
  return layout;
}

const shapes = new WeakMap<readonly Part[], string>();

/** All that the layout depends on of the parts: what and where they are, and the lengths of what stands beside them. */
function shapeOf(parts: readonly Part[]): string {
  const known = shapes.get(parts);
  if (known !== undefined) return known;
  const shape = parts
    .map((part) => {
      const lengths = labelLines(part).map(({ length }) => length);
      return `${part.id} ${part.at.x} ${part.at.y} ${part.turn} ${part.mirrored} ${lengths.join(',')} ${part.values['name'] ?? ''}`;
    })
    .join(';');
  shapes.set(parts, shape);
  return shape;
}
