import type { PartDefinition } from '../definition';
import { readQuantity, setQuantity } from '../read-values';
import { nodePair, twoPins } from '../two-pin';

export const inductor: PartDefinition = {
  name: 'Inductor',
  group: 'Store',
  about: 'Stores flux; closed at 0 Hz',
  letters: 'L',
  key: 'l',
  pins: twoPins(),
  body: { left: -24, top: -9, right: 24, bottom: 6 },
  strokes: [{ d: 'M-30 0H-24A6 7 0 0 1-12 0A6 7 0 0 1 0 0A6 7 0 0 1 12 0A6 7 0 0 1 24 0H30' }],
  fields: [{ type: 'quantity', key: 'inductance', label: 'Inductance', unit: 'H', initial: '10m' }],
  describe: (values) => setQuantity(values, 'inductance', 'H'),
  element(id, nodes, values) {
    const read = readQuantity(values, 'inductance', 'H');
    if (!read.ok) return { ok: false, field: 'inductance', message: read.message };
    return { ok: true, element: { kind: 'inductor', id, nodes: nodePair(nodes), inductance: read.value } };
  },
};
