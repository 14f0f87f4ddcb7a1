import type { ElementDefinition, UnknownFields } from './element-definition';
import { faultOfPositive, firstFault, twoPorts } from './element-definition';
import type { Line } from './element-list';
import { waveLaw } from './two-port';

const NEPERS_PER_DECIBEL = Math.LN10 / 20;

/**
 * The waves of a matched line (Bergeron): nothing is reflected at a port, and what enters at one comes out of the other
 * e^(−θ) times as large, θ = loss (nepers, as the square root of the frequency) + jω·delay. Regular at every frequency,
 * also where the impedance matrix of the line has a pole.
 */
export const line: ElementDefinition<Line> = {
  name: 'line',
  nodeCount: 4,
  faultOf: (fields) =>
    firstFault(faultOfPositive(fields, 'impedance', 'ohms'), faultOfDelay(fields), faultOfLoss(fields)),
  ports: twoPorts,
  laws: ({ impedance, delay, loss = 0, lossFrequency = 1 }) => {
    const through = (frequency: number): readonly [number, number] => {
      const size = Math.exp(-loss * NEPERS_PER_DECIBEL * Math.sqrt(frequency / lossFrequency));
      // Whole turns are taken off first, where that is exact: a long line's angle would lose its digits in 2π.
      const turns = frequency * delay;
      const angle = -2 * Math.PI * (turns - Math.round(turns));
      return [size * Math.cos(angle), size * Math.sin(angle)];
    };
    const nothing = (): readonly [number, number] => [0, 0];
    return [waveLaw(impedance, 0, nothing, through), waveLaw(impedance, 1, nothing, through)];
  },
};

function faultOfDelay({ delay }: UnknownFields): string | undefined {
  if (typeof delay === 'number' && Number.isFinite(delay) && delay >= 0) return undefined;
  return 'needs a number of seconds, zero or more, as its delay';
}

function faultOfLoss(fields: UnknownFields): string | undefined {
  const { loss, lossFrequency } = fields;
  if (loss === undefined && lossFrequency === undefined) return undefined;
  if (typeof loss !== 'number' || !Number.isFinite(loss) || loss < 0) {
    return 'needs a number of decibels, zero or more, as its loss';
  }
  return loss === 0 && lossFrequency === undefined ? undefined : faultOfPositive(fields, 'lossFrequency', 'hertz');
}
