import type { ElementDefinition } from './element-definition';
import { onePort } from './element-definition';
import type { Impedance } from './element-list';
import { faultOfPoints, isFiniteNumber, tabulated } from './tabulated';

/** v = Z(f)·i, with Z from a table. */
export const impedance: ElementDefinition<Impedance> = {
  name: 'tabulated impedance',
  nodeCount: 2,
  faultOf: (fields) =>
    faultOfPoints(
      fields,
      ({ resistance, reactance }) => isFiniteNumber(resistance) && isFiniteNumber(reactance),
      'a frequency, a resistance and a reactance, all finite,',
    ),
  ports: onePort,
  laws: ({ points }) => [
    {
      law: 'impedance',
      at: tabulated(
        points.map(({ frequency }) => frequency),
        points.map(({ resistance, reactance }) => [resistance, reactance] as const),
      ),
    },
  ],
};
