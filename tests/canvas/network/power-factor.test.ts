import { describe, expect, it } from 'vitest';
import { powerFactor } from '@/canvas/network/power-factor';

describe('the power factor', () => {
  it('lags where an absorbing part takes reactive power, and leads where it gives it', () => {
    expect(powerFactor({ re: 3, im: 4 })).toEqual({ value: 0.6, sense: 'lagging' });
    expect(powerFactor({ re: 3, im: -4 })).toEqual({ value: 0.6, sense: 'leading' });
  });

  it('of a source is that of the load it feeds', () => {
    expect(powerFactor({ re: -3, im: -4 })).toEqual({ value: 0.6, sense: 'lagging' });
    expect(powerFactor({ re: -3, im: 4 })).toEqual({ value: 0.6, sense: 'leading' });
  });

  it('is 1 without a sense for a resistor, whatever rounding left of Q', () => {
    expect(powerFactor({ re: 2, im: 1e-17 })).toEqual({ value: 1, sense: null });
  });

  it('is 0 with a sense for a lossless part, whatever rounding left of P', () => {
    expect(powerFactor({ re: -1e-18, im: 1 })).toEqual({ value: 0, sense: 'lagging' });
    expect(powerFactor({ re: 1e-18, im: -1 })).toEqual({ value: 0, sense: 'leading' });
  });

  it('is none where there is no power', () => {
    expect(powerFactor({ re: 0, im: 0 })).toBeNull();
  });
});
