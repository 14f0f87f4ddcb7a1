import type { ElementDefinition } from './element-definition';
import { onePort } from './element-definition';
import type { VoltageSource } from './element-list';
import { faultOfSourceValue } from './source-value';

/** v = E, with E = 0 (an ideal connection) at every frequency but its own. */
export const voltageSource: ElementDefinition<VoltageSource> = {
  name: 'voltage source',
  nodeCount: 2,
  faultOf: faultOfSourceValue,
  ports: onePort,
  laws: ({ value }) => [{ law: 'voltage', value }],
};
