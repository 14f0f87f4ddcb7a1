import type { ElementDefinition } from './element-definition';
import { faultOfNumber, onePort } from './element-definition';
import type { Capacitor } from './element-list';

/** i = jωC·v. At 0 Hz, and with C = 0, it is open. */
export const capacitor: ElementDefinition<Capacitor> = {
  name: 'capacitor',
  nodeCount: 2,
  faultOf: (fields) => faultOfNumber(fields, 'capacitance', 'farads'),
  ports: onePort,
  laws: ({ capacitance }) => [capacitance === 0 ? { law: 'open' } : { law: 'capacitance', capacitance }],
};
