import type { PartDefinition } from '../definition';
import { describeSource, readSource, sourceFields } from '../source-values';
import { nodePair, twoPins } from '../two-pin';

export const voltageSource: PartDefinition = {
  name: 'Voltage source',
  group: 'Drive',
  about: 'Holds a voltage, whatever the current',
  letters: 'VS',
  key: 'v',
  pins: twoPins('plus', 'minus'),
  body: { left: -20, top: -20, right: 20, bottom: 20 },
  strokes: [
    { d: 'M-30 0H-20M20 0H30' },
    { d: 'M-20 0A20 20 0 1 1 20 0A20 20 0 1 1-20 0Z' },
    // The wave lies across the pins, so that it stands upright in a source drawn upright.
    { d: 'M0 10C7 10 7 0 0 0C-7 0-7-10 0-10' },
  ],
  marks: [{ text: '+', at: { x: -27, y: -12 } }],
  fields: sourceFields('V'),
  describe: (values) => describeSource(values, 'V'),
  element(id, nodes, values) {
    const read = readSource(values, 'V');
    if (!read.ok) return read;
    return { ok: true, element: { kind: 'voltageSource', id, nodes: nodePair(nodes), value: read.value } };
  },
};
