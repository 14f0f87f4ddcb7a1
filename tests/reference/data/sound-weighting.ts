import type { Element } from '@/solver';
import { capacitor, resistor, voltageSource } from '../../solver/support/networks';
import { level } from '../support/figures';
import { buffer } from '../support/parts';
import type { Circuit, Figure } from '../support/records';

/**
 * The A- and C-weighting of IEC 61672-1:2013. Pole frequencies by Annex E, the table and its limits by table 3 [found:
 * three public libraries that quote them; the standard itself was not opened]; decibels to three places [computed].
 */

/** Hertz, unrounded, and as the annex prints them. */
export const POLES = [20.598997057618316, 107.65264864304629, 737.8622307362901, 12194.217147998012] as const;
export const PRINTED_POLES = ['20.60', '107.7', '737.9', '12194'] as const;

type Row = readonly [
  nominal: number,
  a: number,
  c: number,
  upper: number,
  lower: number | null,
  aComputed: number,
  cComputed: number,
];

/** Nominal frequency; decibels of A and C; class 1 limits, null for none below; the decibels computed. */
export const WEIGHTING_ROWS: readonly Row[] = [
  [10, -70.4, -14.3, 3, null, -70.43, -14.33],
  [12.5, -63.4, -11.2, 2.5, null, -63.371, -11.249],
  [16, -56.7, -8.5, 2, -4, -56.688, -8.531],
  [20, -50.5, -6.2, 2, -2, -50.452, -6.24],
  [25, -44.7, -4.4, 2, -1.5, -44.703, -4.405],
  [31.5, -39.4, -3, 1.5, -1.5, -39.44, -3.01],
  [40, -34.6, -2, 1, -1, -34.63, -1.999],
  [50, -30.2, -1.3, 1, -1, -30.228, -1.294],
  [63, -26.2, -0.8, 1, -1, -26.194, -0.818],
  [80, -22.5, -0.5, 1, -1, -22.504, -0.504],
  [100, -19.1, -0.3, 1, -1, -19.143, -0.3],
  [125, -16.1, -0.2, 1, -1, -16.098, -0.169],
  [160, -13.4, -0.1, 1, -1, -13.35, -0.085],
  [200, -10.9, 0, 1, -1, -10.87, -0.033],
  [250, -8.6, 0, 1, -1, -8.63, 0],
  [315, -6.6, 0, 1, -1, -6.611, 0.019],
  [400, -4.8, 0, 1, -1, -4.808, 0.029],
  [500, -3.2, 0, 1, -1, -3.233, 0.033],
  [630, -1.9, 0, 1, -1, -1.9, 0.029],
  [800, -0.8, 0, 1, -1, -0.824, 0.019],
  [1000, 0, 0, 0.7, -0.7, 0, 0],
  [1250, 0.6, 0, 1, -1, 0.591, -0.033],
  [1600, 1, -0.1, 1, -1, 0.981, -0.085],
  [2000, 1.2, -0.2, 1, -1, 1.2, -0.169],
  [2500, 1.3, -0.3, 1, -1, 1.271, -0.3],
  [3150, 1.2, -0.5, 1, -1, 1.199, -0.504],
  [4000, 1, -0.8, 1, -1, 0.97, -0.818],
  [5000, 0.5, -1.3, 1.5, -1.5, 0.549, -1.294],
  [6300, -0.1, -2, 1.5, -2, -0.121, -1.999],
  [8000, -1.1, -3, 1.5, -2.5, -1.111, -3.01],
  [10000, -2.5, -4.4, 2, -3, -2.492, -4.405],
  [12500, -4.3, -6.2, 2, -5, -4.318, -6.24],
  [16000, -6.6, -8.5, 2.5, -16, -6.603, -8.531],
  [20000, -9.3, -11.2, 3, null, -9.317, -11.249],
];

/** The exact frequencies of the rows: 10 Hz and each tenth of a decade above [memory]. */
export function exactFrequency(row: number): number {
  return 1000 * 10 ** ((row - 20) / 10);
}

const RESISTANCE = 10e3;

function capacitanceAt(pole: number): number {
  return 1 / (2 * Math.PI * pole * RESISTANCE);
}

/** Single sections one behind the other, each followed by a buffer. */
function cascade(highPasses: readonly number[], lowPasses: readonly number[]): { elements: Element[]; out: string } {
  const elements: Element[] = [voltageSource('V1', 'b0', '0', 1)];
  const sections = [...highPasses.map((pole) => [pole, true] as const), ...lowPasses.map((pole) => [pole, false] as const)];
  sections.forEach(([pole, isHighPass], k) => {
    const [from, middle, to] = [`b${k}`, `m${k}`, `b${k + 1}`];
    const [r, c] = [`R${k}`, `C${k}`];
    if (isHighPass) elements.push(capacitor(c, from, middle, capacitanceAt(pole)), resistor(r, middle, '0', RESISTANCE));
    else elements.push(resistor(r, from, middle, RESISTANCE), capacitor(c, middle, '0', capacitanceAt(pole)));
    elements.push(buffer(`B${k}`, middle, to));
  });
  return { elements, out: `b${sections.length}` };
}

const [F1, F2, F3, F4] = POLES;

function weighting(
  id: string,
  highPasses: readonly number[],
  column: (row: Row) => readonly [printed: number, computed: number],
  loss: string,
  printedLoss: string,
): Circuit {
  const { elements, out } = cascade(highPasses, [F4, F4]);
  return {
    id,
    title: 'sections of one pole each, buffered',
    source: 'IEC 61672-1:2013, table 3 and Annex E',
    mark: 'found',
    elements,
    figures: [
      { ...level(out, 1000, loss), mark: 'computed' },
      level(out, 1000, printedLoss),
      ...WEIGHTING_ROWS.flatMap((row, k): Figure[] => {
        const [printed, computed] = column(row);
        return [
          level(out, exactFrequency(k), printed.toFixed(1), { frequency: 1000 }),
          { ...level(out, exactFrequency(k), computed.toFixed(3), { frequency: 1000 }), mark: 'computed' },
        ];
      }),
    ],
  };
}

export const WEIGHTING_CIRCUITS: readonly Circuit[] = [
  weighting('A-weighting', [F1, F1, F2, F3], ([, a, , , , computed]) => [a, computed], '-1.99966', '-2.000'),
  weighting('C-weighting', [F1, F1], ([, , c, , , , computed]) => [c, computed], '-0.06190', '-0.062'),
];
