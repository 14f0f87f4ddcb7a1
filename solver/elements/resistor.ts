import type { ElementDefinition } from './element-definition';
import { faultOfNumber, onePort } from './element-definition';
import type { Resistor } from './element-list';

/** v = R·i. R = 0 is an ideal connection; R < 0 is a legal linear element that delivers power. */
export const resistor: ElementDefinition<Resistor> = {
  name: 'resistor',
  nodeCount: 2,
  faultOf: (fields) => faultOfNumber(fields, 'resistance', 'ohms'),
  ports: onePort,
  laws: ({ resistance }) => [resistance === 0 ? { law: 'short' } : { law: 'resistance', resistance }],
};
