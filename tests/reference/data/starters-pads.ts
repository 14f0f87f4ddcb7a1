import type { Element } from '@/solver';
import { resistor, voltageSource } from '../../solver/support/networks';
import { level } from '../support/figures';
import type { Circuit, Figure } from '../support/records';

/**
 * Starter networks of the library: attenuators. The values are the project's own; each figure was computed with an
 * independent modified-nodal phasor solver [computed]. What a pad passes and reflects is the same at all frequencies.
 */
const FREQUENCY = 1e6;

interface Pad {
  readonly id: string;
  readonly title: string;
  readonly source: string;
  readonly from?: number;
  readonly elements: readonly Element[];
  readonly figures: readonly Figure[];
}

function pad({ from = 50, elements, ...circuit }: Pad): Circuit {
  return {
    ...circuit,
    mark: 'computed',
    elements: [
      voltageSource('V1', 's', '0', 2),
      resistor('Rs', 's', 'in', from),
      ...elements,
      resistor('RL', 'out', '0', 50),
    ],
  };
}

function pi(shunt: number, series: number): readonly Element[] {
  return [resistor('R1', 'in', '0', shunt), resistor('R2', 'in', 'out', series), resistor('R3', 'out', '0', shunt)];
}

function tee(series: number, shunt: number): readonly Element[] {
  return [resistor('R1', 'in', 'x', series), resistor('R2', 'x', '0', shunt), resistor('R3', 'x', 'out', series)];
}

function minimumLoss(series: number, shunt: number): readonly Element[] {
  return [resistor('R1', 'in', 'out', series), resistor('R2', 'out', '0', shunt)];
}

function loss(printed: string, from = 50): Figure {
  return level('out', FREQUENCY, printed, Math.sqrt(50 / from));
}

function reflected(printed: string, reference = 50): Figure {
  return level({ of: 'reflection', source: 'V1', reference }, FREQUENCY, printed);
}

function matched(reference = 50): Figure {
  return {
    kind: 'exact',
    output: { of: 'reflection', source: 'V1', reference },
    frequency: FREQUENCY,
    value: { re: 0, im: 0 },
    units: 8,
  };
}

function valued(element: string, printed: string): Figure {
  return { kind: 'value', element, printed };
}

const K = 10 ** (10 / 20);
const ATTENUATOR = 'k = 10^(A/20)';
const MINIMUM = 'Rs = √(Z₁(Z₁ − Z₂))';
const SERIES_38 = Math.sqrt(75 * 25);

export const PAD_STARTERS: readonly Circuit[] = [
  pad({
    id: 'ST-37 π',
    title: '10 dB pad, 50 Ω',
    source: ATTENUATOR,
    elements: pi(95.3, 71.5),
    figures: [loss('-10.067'), reflected('-53.8')],
  }),
  pad({
    id: 'ST-37 T',
    title: '10 dB pad, 50 Ω',
    source: ATTENUATOR,
    elements: tee(26.1, 35.7),
    figures: [loss('-9.950'), reflected('-48.0')],
  }),
  pad({
    id: 'ST-37 π ideal',
    title: '10 dB pad, 50 Ω, ideal',
    source: ATTENUATOR,
    elements: pi((50 * (K + 1)) / (K - 1), (50 * (K * K - 1)) / (2 * K)),
    figures: [valued('R1', '96.25'), valued('R2', '71.15'), matched(), loss('-10.000000000000')],
  }),
  pad({
    id: 'ST-37 T ideal',
    title: '10 dB pad, 50 Ω, ideal',
    source: ATTENUATOR,
    elements: tee((50 * (K - 1)) / (K + 1), (100 * K) / (K * K - 1)),
    figures: [valued('R1', '25.97'), valued('R2', '35.14'), matched(), loss('-10.000000000000')],
  }),
  pad({
    id: 'ST-38',
    title: 'minimum-loss pad, 75 to 50 Ω',
    source: MINIMUM,
    from: 75,
    elements: minimumLoss(43.2, 86.6),
    figures: [loss('-5.714', 75), reflected('-63', 75)],
  }),
  pad({
    id: 'ST-38 ideal',
    title: 'minimum-loss pad, 75 to 50 Ω, ideal',
    source: MINIMUM,
    from: 75,
    elements: minimumLoss(SERIES_38, (50 * 75) / SERIES_38),
    figures: [matched(75), loss('-5.7195', 75)],
  }),
  pad({
    id: 'ST-40',
    title: 'bridged-T attenuator, 6 dB, 50 Ω',
    source: 'Z₀(k − 1), Z₀/(k − 1)',
    elements: [...tee(49.9, 49.9), resistor('R4', 'in', 'out', 49.9)],
    figures: [loss('-6.021'), reflected('-62.5')],
  }),
];
