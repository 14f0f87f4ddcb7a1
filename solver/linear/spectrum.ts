/** Eigenvalues by real and imaginary parts. */
export interface Spectrum {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** So many steps without an eigenvalue, and the iteration is given up; it usually takes two or three. */
export const NO_CONVERGENCE_AFTER = 60;
