/** Eigenvalues by real and imaginary parts. */
export interface Spectrum {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/**
 * After so many steps for one eigenvalue the shift is taken at random, in case the iteration goes in circles. It usually
 * takes two or three; beside a multiple one it gains only some two bits a step, and must not be disturbed before it is
 * through.
 */
export const ASIDE_EVERY = 40;

/** So many steps without an eigenvalue, and the iteration is given up. */
export const NO_CONVERGENCE_AFTER = 120;
