import type { PartDefinition } from '../definition';

export const nodeName: PartDefinition = {
  name: 'Node name',
  group: 'Join',
  about: 'Names a node; equal names are one node',
  letters: '',
  key: 'n',
  pins: [{ name: 'a', label: 'pin', at: { x: 0, y: 0 }, outward: 'down' }],
  body: { left: -50, top: -53, right: 50, bottom: -27 },
  strokes: [],
  fields: [{ type: 'nodeName', key: 'name', label: 'Name', initial: 'out' }],
  describe: (values) => values['name'] ?? '',
};
