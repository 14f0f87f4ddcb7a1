import type { ElementDefinition } from './element-definition';
import { faultOfNumber } from './element-definition';
import type { Capacitor } from './element-list';

/** i = jωC·v. At 0 Hz, and with C = 0, it is open. */
export const capacitor: ElementDefinition<Capacitor> = {
  name: 'capacitor',
  faultOf: (fields) => faultOfNumber(fields, 'capacitance', 'farads'),
  stamp: ({ capacitance }, { omega }, branches, row) => {
    if (capacitance === 0 || omega === 0) branches.setCurrent(row, 0, 0);
    else branches.setReactance(row, -1 / (omega * capacitance), -(omega * capacitance));
  },
};
