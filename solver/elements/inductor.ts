import type { ElementDefinition } from './element-definition';
import { faultOfNumber } from './element-definition';
import type { Inductor } from './element-list';

/** v = jωL·i. At 0 Hz, and with L = 0, it is an ideal connection. */
export const inductor: ElementDefinition<Inductor> = {
  name: 'inductor',
  faultOf: (fields) => faultOfNumber(fields, 'inductance', 'henries'),
  stamp: ({ inductance }, { omega }, branches, row) => {
    if (inductance === 0 || omega === 0) branches.setVoltage(row, 0, 0);
    else branches.setReactance(row, omega * inductance, 1 / (omega * inductance));
  },
};
