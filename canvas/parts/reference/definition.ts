import type { PartDefinition } from '../definition';

export const reference: PartDefinition = {
  name: 'Reference',
  group: 'Join',
  about: 'The node that counts as 0 V',
  letters: '',
  key: 'g',
  pins: [{ name: 'a', label: 'pin', at: { x: 0, y: 0 }, outward: 'up' }],
  body: { left: -14, top: 0, right: 14, bottom: 26 },
  // One bar and its value: the three-bar mark means earth, and a reference node need not be earthed.
  strokes: [{ d: 'M0 0V14' }, { d: 'M-14 14H14', style: 'line' }],
  marks: [{ text: '0 V', at: { x: 0, y: 23 } }],
  fields: [],
  describe: () => '',
};
