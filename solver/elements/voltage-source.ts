import type { ElementDefinition } from './element-definition';
import type { VoltageSource } from './element-list';
import { faultOfSourceValue, isLive, phasorIm, phasorRe } from './source-value';

/** v = E, with E = 0 (an ideal connection) at every frequency but its own. */
export const voltageSource: ElementDefinition<VoltageSource> = {
  name: 'voltage source',
  faultOf: faultOfSourceValue,
  stamp: ({ value }, excitation, branches, row) => {
    if (isLive(value, excitation)) branches.setVoltage(row, phasorRe(value), phasorIm(value));
    else branches.setVoltage(row, 0, 0);
  },
};
