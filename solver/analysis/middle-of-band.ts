import type { Law } from '../elements/law';

/**
 * The middle of the band and of the impedances, by least squares over the logarithms: log R = r for resistances,
 * log L + w = r for inductances, −log C − w = r for capacitances.
 */
export class MiddleOfBand {
  private resistances = 0;
  private sumR = 0;
  private inductances = 0;
  private sumL = 0;
  private capacitances = 0;
  private sumC = 0;

  see(law: Law): void {
    switch (law.law) {
      case 'resistance':
        this.resistances += 1;
        this.sumR += logOf(law.resistance);
        break;
      case 'inductance':
        this.seeInductance(law.inductance);
        break;
      case 'capacitance':
        this.capacitances += 1;
        this.sumC += logOf(law.capacitance);
        break;
      case 'equation':
        // The coefficients of s before currents are inductances.
        for (const { of, coefficient } of law.terms) {
          if (of === 'current' && 'slope' in coefficient && coefficient.slope !== 0) this.seeInductance(coefficient.slope);
        }
        break;
      case 'impedance':
      case 'voltage':
      case 'current':
      case 'short':
      case 'open':
        break;
    }
  }

  private seeInductance(inductance: number): void {
    this.inductances += 1;
    this.sumL += logOf(inductance);
  }

  /** rad/s, a power of two; 1 where nothing tells. */
  omega(): number {
    const { resistances, sumR, inductances, sumL, capacitances, sumC } = this;
    // Normal equations in r and w: unknowns of slope (1, 0), (1, −1), (1, 1) and values log R, log L, −log C.
    const count = resistances + inductances + capacitances;
    const skew = capacitances - inductances;
    const reactive = inductances + capacitances;
    const determinant = count * reactive - skew * skew;
    if (determinant === 0) return 1;
    const total = sumR + sumL - sumC;
    const w = (count * (-sumC - sumL) - skew * total) / determinant;
    return 2 ** Math.round(w);
  }
}

function logOf(value: number): number {
  return Math.log2(Math.abs(value));
}
