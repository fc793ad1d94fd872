/**
 * LU decomposition with partial pivoting of small dense matrices, real and complex, in place and without allocation.
 * Source: Golub & Van Loan 1996, Matrix Computations, algorithm 3.4.1.
 */

/**
 * Factors a real matrix in place.
 *
 * @param a - the n x n matrix, row by row; becomes L (unit diagonal, below) and U
 * @param n - its size
 * @param pivots - receives the row exchanged with row k
 * @returns false if the matrix is singular or holds NaN
 */
export function factorReal(a: Float64Array, n: number, pivots: Int32Array): boolean {
  for (let k = 0; k < n; k++) {
    let pivot = k;
    let largest = Math.abs(a[k * n + k]);
    for (let i = k + 1; i < n; i++) {
      const size = Math.abs(a[i * n + k]);
      if (size > largest) {
        largest = size;
        pivot = i;
      }
    }
    pivots[k] = pivot;
    if (!(largest > 0)) return false;
    if (pivot !== k) {
      for (let j = 0; j < n; j++) {
        const held = a[k * n + j];
        a[k * n + j] = a[pivot * n + j];
        a[pivot * n + j] = held;
      }
    }
    const inverse = 1 / a[k * n + k];
    for (let i = k + 1; i < n; i++) {
      const factor = a[i * n + k] * inverse;
      a[i * n + k] = factor;
      for (let j = k + 1; j < n; j++) a[i * n + j] -= factor * a[k * n + j];
    }
  }
  return true;
}

/** Solves with the factors of `factorReal`; b becomes the solution. */
export function solveReal(a: Float64Array, n: number, pivots: Int32Array, b: Float64Array): void {
  for (let k = 0; k < n; k++) {
    const pivot = pivots[k];
    const held = b[pivot];
    b[pivot] = b[k];
    b[k] = held;
  }
  for (let i = 1; i < n; i++) {
    let sum = b[i];
    for (let j = 0; j < i; j++) sum -= a[i * n + j] * b[j];
    b[i] = sum;
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = b[i];
    for (let j = i + 1; j < n; j++) sum -= a[i * n + j] * b[j];
    b[i] = sum / a[i * n + i];
  }
}

/**
 * Factors a complex matrix in place.
 *
 * @param re - real parts of the n x n matrix, row by row
 * @param im - imaginary parts
 * @param n - its size
 * @param pivots - receives the row exchanged with row k
 * @returns false if the matrix is singular or holds NaN
 */
export function factorComplex(re: Float64Array, im: Float64Array, n: number, pivots: Int32Array): boolean {
  for (let k = 0; k < n; k++) {
    let pivot = k;
    let largest = Math.abs(re[k * n + k]) + Math.abs(im[k * n + k]);
    for (let i = k + 1; i < n; i++) {
      const size = Math.abs(re[i * n + k]) + Math.abs(im[i * n + k]);
      if (size > largest) {
        largest = size;
        pivot = i;
      }
    }
    pivots[k] = pivot;
    if (!(largest > 0)) return false;
    if (pivot !== k) {
      for (let j = 0; j < n; j++) {
        const heldRe = re[k * n + j];
        const heldIm = im[k * n + j];
        re[k * n + j] = re[pivot * n + j];
        im[k * n + j] = im[pivot * n + j];
        re[pivot * n + j] = heldRe;
        im[pivot * n + j] = heldIm;
      }
    }
    const pr = re[k * n + k];
    const pi = im[k * n + k];
    const size = pr * pr + pi * pi;
    for (let i = k + 1; i < n; i++) {
      const ar = re[i * n + k];
      const ai = im[i * n + k];
      const fr = (ar * pr + ai * pi) / size;
      const fi = (ai * pr - ar * pi) / size;
      re[i * n + k] = fr;
      im[i * n + k] = fi;
      for (let j = k + 1; j < n; j++) {
        re[i * n + j] -= fr * re[k * n + j] - fi * im[k * n + j];
        im[i * n + j] -= fr * im[k * n + j] + fi * re[k * n + j];
      }
    }
  }
  return true;
}

/** Solves with the factors of `factorComplex`; (br, bi) becomes the solution. */
export function solveComplex(
  re: Float64Array,
  im: Float64Array,
  n: number,
  pivots: Int32Array,
  br: Float64Array,
  bi: Float64Array,
): void {
  for (let k = 0; k < n; k++) {
    const pivot = pivots[k];
    const heldRe = br[pivot];
    const heldIm = bi[pivot];
    br[pivot] = br[k];
    bi[pivot] = bi[k];
    br[k] = heldRe;
    bi[k] = heldIm;
  }
  for (let i = 1; i < n; i++) {
    let sumRe = br[i];
    let sumIm = bi[i];
    for (let j = 0; j < i; j++) {
      sumRe -= re[i * n + j] * br[j] - im[i * n + j] * bi[j];
      sumIm -= re[i * n + j] * bi[j] + im[i * n + j] * br[j];
    }
    br[i] = sumRe;
    bi[i] = sumIm;
  }
  for (let i = n - 1; i >= 0; i--) {
    let sumRe = br[i];
    let sumIm = bi[i];
    for (let j = i + 1; j < n; j++) {
      sumRe -= re[i * n + j] * br[j] - im[i * n + j] * bi[j];
      sumIm -= re[i * n + j] * bi[j] + im[i * n + j] * br[j];
    }
    const pr = re[i * n + i];
    const pi = im[i * n + i];
    const size = pr * pr + pi * pi;
    br[i] = (sumRe * pr + sumIm * pi) / size;
    bi[i] = (sumIm * pr - sumRe * pi) / size;
  }
}
