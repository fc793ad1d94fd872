import { factorComplex, factorReal, solveComplex, solveReal } from "./luDecomposition";
import { complexEigenvalues, realEigenvalue, STAGES } from "./radauCoefficients";

/**
 * The linear systems of the five-stage Radau IIA method, taken apart by the eigenvalues of A^-1: one real of size n and
 * two complex ones in place of a real one of size 5n.
 *
 * Source: Hairer & Wanner 1996, Solving Ordinary Differential Equations II, IV.8.
 */
export class RadauMatrices {
  /** J, row by row; after a change `factor` must be called. */
  readonly jacobian: Float64Array;
  private readonly n: number;
  private readonly real: Float64Array;
  private readonly complexRe: Float64Array[];
  private readonly complexIm: Float64Array[];
  private readonly pivots: Int32Array[];

  constructor(n: number) {
    const pairs = complexEigenvalues.length;
    this.n = n;
    this.jacobian = new Float64Array(n * n);
    this.real = new Float64Array(n * n);
    this.complexRe = Array.from({ length: pairs }, () => new Float64Array(n * n));
    this.complexIm = Array.from({ length: pairs }, () => new Float64Array(n * n));
    this.pivots = Array.from({ length: 1 + pairs }, () => new Int32Array(n));
  }

  /** Factors gamma/h I - J and (alpha - i beta)/h I - J; false if one is singular or holds NaN. */
  factor(h: number): boolean {
    const { n, real, jacobian } = this;
    for (let k = 0; k < n * n; k++) real[k] = -jacobian[k];
    for (let k = 0; k < n; k++) real[k * n + k] += realEigenvalue / h;
    if (!factorReal(real, n, this.pivots[0])) return false;
    for (let p = 0; p < complexEigenvalues.length; p++) {
      const re = this.complexRe[p];
      const im = this.complexIm[p];
      const { alpha, beta } = complexEigenvalues[p];
      for (let k = 0; k < n * n; k++) {
        re[k] = -jacobian[k];
        im[k] = 0;
      }
      for (let k = 0; k < n; k++) {
        re[k * n + k] += alpha / h;
        im[k * n + k] = -beta / h;
      }
      if (!factorComplex(re, im, n, this.pivots[1 + p])) return false;
    }
    return true;
  }

  /** Solves (gamma/h I - J) x = b in place. */
  solveReal(b: Float64Array): void {
    solveReal(this.real, this.n, this.pivots[0], b);
  }

  /** Solves for the five transformed vectors of the stages in place. */
  solve(vectors: Float64Array[]): void {
    solveReal(this.real, this.n, this.pivots[0], vectors[0]);
    for (let p = 0, k = 1; k < STAGES; p++, k += 2) {
      solveComplex(this.complexRe[p], this.complexIm[p], this.n, this.pivots[1 + p], vectors[k], vectors[k + 1]);
    }
  }
}
