import { capacitor, resistor } from '../../solver/support/networks';
import type { Circuit } from '../support/records';

/**
 * Capacitors that have to be discharged when a plug is drawn: the largest bleeder across 1 µF charged to the crest of
 * 230 V [computed]. Limits [found: texts that cite IEC 60335-1, IEC 62368-1 and IEC 60950-1; the standards themselves
 * were not opened].
 */
const CREST = 230 * Math.SQRT2;

function bleeder(id: string, source: string, ohms: number, to: number, printed: string): Circuit {
  return {
    id,
    title: 'V(t) = V₀·exp(−t/RC)',
    source,
    mark: 'computed',
    elements: [capacitor('C1', '1', '0', 1e-6), resistor('R1', '1', '0', ohms)],
    figures: [{ kind: 'decay', node: '1', from: CREST, to, printed }],
  };
}

export const DISCHARGES: readonly Circuit[] = [
  bleeder('442.8 kΩ', 'IEC 60335-1, 22.5: 34 V within 1 s', 442.8e3, 34, '1.000'),
  bleeder('1.183 MΩ', 'IEC 62368-1, 5.5.2.2: 60 V within 2 s', 1.183e6, 60, '2.00'),
  bleeder('1.006 MΩ', 'IEC 60950-1, 2.1.1.7: 37 % within 1 s', 1.006e6, 0.37 * CREST, '1.000'),
];
