import type { PartDefinition } from '../definition';
import { readQuantity, setQuantity } from '../read-values';
import { nodePair, twoPins } from '../two-pin';

export const resistor: PartDefinition = {
  name: 'Resistor',
  group: 'Resist',
  about: 'Opposes current; turns it into heat',
  letters: 'R',
  key: 'r',
  pins: twoPins(),
  body: { left: -22, top: -8, right: 22, bottom: 8 },
  strokes: [{ d: 'M-30 0H-22M22 0H30M-22-8H22V8H-22Z' }],
  fields: [{ type: 'quantity', key: 'resistance', label: 'Resistance', unit: 'Ω', initial: '1k' }],
  describe: (values) => setQuantity(values, 'resistance', 'Ω'),
  element(id, nodes, values) {
    const read = readQuantity(values, 'resistance', 'Ω');
    if (!read.ok) return { ok: false, field: 'resistance', message: read.message };
    return { ok: true, element: { kind: 'resistor', id, nodes: nodePair(nodes), resistance: read.value } };
  },
};
