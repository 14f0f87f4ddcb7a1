/** A product of many factors that does not leave the range of numbers on the way. */
export class ScaledProduct {
  private mantissa = 1;
  private exponent = 0;

  multiply(factor: number): void {
    this.mantissa *= factor;
    this.normalise();
  }

  divide(factor: number): void {
    this.mantissa /= factor;
    this.normalise();
  }

  value(): number {
    // In two halves, for 2^exponent may be out of range where the product is not.
    const half = Math.trunc(this.exponent / 2);
    return this.mantissa * 2 ** half * 2 ** (this.exponent - half);
  }

  private normalise(): void {
    const size = Math.abs(this.mantissa);
    if (size === 0 || (size > 1e-100 && size < 1e100)) return;
    const power = Math.round(Math.log2(size));
    this.mantissa *= 2 ** -power;
    this.exponent += power;
  }
}
