import type { PartDefinition } from '../definition';

export const junction: PartDefinition = {
  name: 'Junction',
  group: 'Join',
  about: 'Where wires meet',
  letters: '',
  key: 'j',
  pins: [{ name: 'a', label: 'pin', at: { x: 0, y: 0 }, outward: 'any' }],
  body: { left: -8, top: -8, right: 8, bottom: 8 },
  strokes: [{ d: 'M-3.5 0A3.5 3.5 0 1 1 3.5 0A3.5 3.5 0 1 1-3.5 0Z', style: 'dot' }],
  fields: [],
  describe: () => '',
};
