import { describe, it } from 'vitest';
import type { PortNodes } from '@/solver';
import { noise, noiseTotal } from '@/solver';
import { network } from '../solver/support/networks';
import { figuresOf } from './support/describe-figure';
import { expectPrinted } from './support/expect-figure';
import type { NoiseBandwidthFigure, NoiseFigure, Output, TotalNoiseFigure } from './support/records';

/** Every published thermal noise. "All frequencies" end so far up that no digit of the figure is beyond. */
const ALL = { from: 0, to: 1e12 } as const;

/** What a noise bandwidth is a quotient of has the same temperature. */
const ANY_TEMPERATURE = 300;

function pairOf(output: Output): PortNodes {
  if (output.of !== 'voltage') throw new Error('only voltages have noise in the data');
  return [output.node, output.over ?? '0'];
}

const KINDS = ['noise', 'totalNoise', 'noiseBandwidth'] as const;

describe.each(figuresOf<NoiseFigure | TotalNoiseFigure | NoiseBandwidthFigure>(KINDS))('%s', (_title, { elements }, figures) => {
  const list = network(...elements);

  it.each(figures)('%s', (_words, figure) => {
    const pair = pairOf(figure.output);
    switch (figure.kind) {
      case 'noise': {
        const found = noise(list, pair, { frequencies: [figure.frequency], temperature: figure.temperature });
        if (!found.ok) throw new Error(found.message);
        const density =
          figure.from === undefined
            ? found.density
            : found.contributions.find(({ element }) => element === figure.from)?.density;
        expectPrinted(density?.[0] ?? NaN, figure);
        break;
      }
      case 'totalNoise': {
        const found = noiseTotal(list, pair, { ...ALL, temperature: figure.temperature });
        if (!found.ok) throw new Error(found.message);
        expectPrinted(found.total, figure);
        break;
      }
      case 'noiseBandwidth': {
        const found = noiseTotal(list, pair, { ...ALL, temperature: ANY_TEMPERATURE });
        const still = noise(list, pair, { frequencies: [0], temperature: ANY_TEMPERATURE });
        if (!found.ok || !still.ok) throw new Error('no noise was found');
        expectPrinted(found.total ** 2 / (still.density[0] ?? NaN) ** 2, figure);
      }
    }
  });
});
