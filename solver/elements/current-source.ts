import type { ElementDefinition } from './element-definition';
import { onePort } from './element-definition';
import type { CurrentSource } from './element-list';
import { faultOfSourceValue } from './source-value';

/** i = J, with J = 0 (open) at every frequency but its own. */
export const currentSource: ElementDefinition<CurrentSource> = {
  name: 'current source',
  nodeCount: 2,
  faultOf: faultOfSourceValue,
  ports: onePort,
  laws: ({ value }) => [{ law: 'current', value }],
};
