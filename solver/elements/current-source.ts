import type { ElementDefinition } from './element-definition';
import type { CurrentSource } from './element-list';
import { faultOfSourceValue, isLive, phasorIm, phasorRe } from './source-value';

/** i = J, with J = 0 (open) at every frequency but its own. */
export const currentSource: ElementDefinition<CurrentSource> = {
  name: 'current source',
  faultOf: faultOfSourceValue,
  stamp: ({ value }, excitation, branches, row) => {
    if (isLive(value, excitation)) branches.setCurrent(row, phasorRe(value), phasorIm(value));
    else branches.setCurrent(row, 0, 0);
  },
};
