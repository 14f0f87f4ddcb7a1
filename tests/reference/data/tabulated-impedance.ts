import { phase, reading, size } from '../support/figures';
import type { Circuit, Figure, Output } from '../support/records';

/**
 * An impedance known at five frequencies: the example of the Touchstone specification, version 2, of one port, in ohms
 * [found], and the same normalised to 75 Ω as version 1 has it [memory; its first three rows found].
 */
const ROWS: readonly (readonly [megahertz: number, ohms: number, degrees: number, normalised: string])[] = [
  [100, 74.25, -4, '0.990'],
  [200, 60, -22, '0.800'],
  [300, 53.025, -45, '0.707'],
  [400, 30, -62, '0.400'],
  [500, 0.75, -89, '0.010'],
];

const Z: Output = { of: 'impedance', node: '1' };

export const TABULATED: readonly Circuit[] = [
  {
    id: 'tabulated impedance',
    title: 'one port, five frequencies',
    source: 'Touchstone file format, version 2 (IBIS Open Forum)',
    mark: 'found',
    elements: [
      {
        id: 'Z1',
        kind: 'impedance',
        nodes: ['1', '0'],
        points: ROWS.map(([megahertz, ohms, degrees]) => ({
          frequency: megahertz * 1e6,
          resistance: ohms * Math.cos((degrees * Math.PI) / 180),
          reactance: ohms * Math.sin((degrees * Math.PI) / 180),
        })),
      },
    ],
    figures: ROWS.flatMap(([megahertz, ohms, degrees, normalised]): Figure[] => [
      { ...size(Z, megahertz * 1e6, String(ohms)), within: ohms * 4 * Number.EPSILON },
      { ...phase(Z, megahertz * 1e6, String(degrees)), within: Math.abs(degrees) * 8 * Number.EPSILON },
      { ...reading('magnitude', Z, megahertz * 1e6, normalised, 75), mark: 'memory' },
    ]),
  },
];
