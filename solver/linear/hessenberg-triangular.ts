import type { PencilMatrices } from './pencil-matrices';
import { PlaneRotation } from './plane-rotation';

/**
 * Brings A to upper Hessenberg and B to upper triangular form by rotations of rows and of columns, both matrices turned
 * alike, so that the eigenvalues stay (Moler and Stewart 1973, doi 10.1137/0710024; Golub and Van Loan 2013, algorithm
 * 7.7.1). Overwrites the pencil and leaves the bounds on the errors as they were. About 8n³ multiplications.
 */
export function toHessenbergTriangular({ size, aRe, aIm, bRe, bIm }: PencilMatrices): void {
  const rotation = new PlaneRotation();
  const turnRows = (upper: number, lower: number, from: number): void => {
    rotation.turn(aRe, aIm, upper * size + from, lower * size + from, 1, size - from);
    rotation.turn(bRe, bIm, upper * size, lower * size, 1, size);
  };
  for (let j = 0; j < size - 1; j++) {
    for (let i = size - 1; i > j; i--) {
      const below = i * size + j;
      rotation.aim(bRe[below - size] ?? 0, bIm[below - size] ?? 0, bRe[below] ?? 0, bIm[below] ?? 0);
      turnRows(i - 1, i, 0);
      bRe[below] = 0;
      bIm[below] = 0;
    }
  }
  for (let j = 0; j < size - 2; j++) {
    for (let i = size - 1; i > j + 1; i--) {
      const below = i * size + j;
      rotation.aim(aRe[below - size] ?? 0, aIm[below - size] ?? 0, aRe[below] ?? 0, aIm[below] ?? 0);
      turnRows(i - 1, i, 0);
      aRe[below] = 0;
      aIm[below] = 0;
      const left = i * size + i - 1;
      rotation.aim(bRe[left + 1] ?? 0, bIm[left + 1] ?? 0, bRe[left] ?? 0, bIm[left] ?? 0);
      rotation.turn(aRe, aIm, i, i - 1, size, size);
      rotation.turn(bRe, bIm, i, i - 1, size, i + 1);
      bRe[left] = 0;
      bIm[left] = 0;
    }
  }
}
