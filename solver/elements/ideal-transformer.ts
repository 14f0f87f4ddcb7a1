import type { ElementDefinition } from './element-definition';
import { faultOfNumber, firstFault, twoPorts } from './element-definition';
import type { IdealTransformer } from './element-list';
import { constant } from './law';

/** v₁ = n·v₂ and n·i₁ + i₂ = 0, both currents entering at the dots: what one side absorbs the other delivers. */
export const idealTransformer: ElementDefinition<IdealTransformer> = {
  name: 'ideal transformer',
  nodeCount: 4,
  faultOf: (fields) =>
    firstFault(
      faultOfNumber(fields, 'ratio', ''),
      fields['ratio'] === 0 ? 'needs a ratio that is not zero' : undefined,
    ),
  ports: twoPorts,
  laws: ({ ratio }) => [
    {
      law: 'equation',
      terms: [
        { port: 0, of: 'voltage', coefficient: constant(1) },
        { port: 1, of: 'voltage', coefficient: constant(-ratio) },
      ],
    },
    {
      law: 'equation',
      terms: [
        { port: 0, of: 'current', coefficient: constant(ratio) },
        { port: 1, of: 'current', coefficient: constant(1) },
      ],
    },
  ],
};
