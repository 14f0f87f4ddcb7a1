import type { ElementDefinition } from './element-definition';
import { faultOfNumber } from './element-definition';
import type { Resistor } from './element-list';

/** v = R·i. R = 0 is an ideal connection; R < 0 is a legal linear element that delivers power. */
export const resistor: ElementDefinition<Resistor> = {
  name: 'resistor',
  faultOf: (fields) => faultOfNumber(fields, 'resistance', 'ohms'),
  stamp: ({ resistance }, _excitation, branches, row) => {
    if (resistance === 0) branches.setVoltage(row, 0, 0);
    else branches.setResistance(row, resistance);
  },
};
