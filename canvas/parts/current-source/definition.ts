import type { PartDefinition } from '../definition';
import { describeSource, readSource, sourceFields } from '../source-values';
import { nodePair, twoPins } from '../two-pin';

export const currentSource: PartDefinition = {
  name: 'Current source',
  group: 'Drive',
  about: 'Holds a current, whatever the voltage',
  letters: 'CS',
  key: 'i',
  pins: twoPins('where the current enters', 'where the current leaves'),
  body: { left: -20, top: -20, right: 20, bottom: 20 },
  strokes: [
    { d: 'M-30 0H-20M20 0H30' },
    { d: 'M-20 0A20 20 0 1 1 20 0A20 20 0 1 1-20 0Z' },
    // IEC 60617: the line across the conductor's direction. The arrow beside it gives the sense of the current.
    { d: 'M0-20V20' },
    { d: 'M-12-27H12M6-31L12-27L6-23', style: 'thin' },
  ],
  fields: sourceFields('A'),
  describe: (values) => describeSource(values, 'A'),
  element(id, nodes, values) {
    const read = readSource(values, 'A');
    if (!read.ok) return read;
    return { ok: true, element: { kind: 'currentSource', id, nodes: nodePair(nodes), value: read.value } };
  },
};
