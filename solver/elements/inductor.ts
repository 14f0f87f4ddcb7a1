import type { ElementDefinition } from './element-definition';
import { faultOfNumber, onePort } from './element-definition';
import type { Inductor } from './element-list';

/** v = jωL·i. At 0 Hz, and with L = 0, it is an ideal connection. */
export const inductor: ElementDefinition<Inductor> = {
  name: 'inductor',
  nodeCount: 2,
  faultOf: (fields) => faultOfNumber(fields, 'inductance', 'henries'),
  ports: onePort,
  laws: ({ inductance }) => [inductance === 0 ? { law: 'short' } : { law: 'inductance', inductance }],
};
