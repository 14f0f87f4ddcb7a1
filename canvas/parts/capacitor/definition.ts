import type { PartDefinition } from '../definition';
import { readQuantity, setQuantity } from '../read-values';
import { nodePair, twoPins } from '../two-pin';

export const capacitor: PartDefinition = {
  name: 'Capacitor',
  group: 'Store',
  about: 'Stores charge; open at 0 Hz',
  letters: 'C',
  key: 'c',
  pins: twoPins(),
  body: { left: -8, top: -17, right: 8, bottom: 17 },
  strokes: [{ d: 'M-30 0H-4.5M4.5 0H30M-4.5-16V16M4.5-16V16' }],
  fields: [{ type: 'quantity', key: 'capacitance', label: 'Capacitance', unit: 'F', initial: '100n' }],
  describe: (values) => setQuantity(values, 'capacitance', 'F'),
  element(id, nodes, values) {
    const read = readQuantity(values, 'capacitance', 'F');
    if (!read.ok) return { ok: false, field: 'capacitance', message: read.message };
    return { ok: true, element: { kind: 'capacitor', id, nodes: nodePair(nodes), capacitance: read.value } };
  },
};
