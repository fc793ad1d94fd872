import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { factorComplex, factorReal, solveComplex, solveReal } from "../../../cosmo/numerics/luDecomposition";

const entry = fc.integer({ min: -1000, max: 1000 }).map((k) => k / 1000);

describe("the LU decompositions", () => {
  it("solve random real systems of every size up to 6, with a small residual", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 6 }).chain((n) => fc.array(entry, { minLength: n * n + n, maxLength: n * n + n })),
        (numbers) => {
          const n = Math.round((Math.sqrt(1 + 4 * numbers.length) - 1) / 2);
          const matrix = Float64Array.from(numbers.slice(0, n * n));
          const right = Float64Array.from(numbers.slice(n * n));
          const factors = matrix.slice();
          const pivots = new Int32Array(n);
          if (!factorReal(factors, n, pivots)) return;
          const x = right.slice();
          solveReal(factors, n, pivots, x);
          const size = Math.max(...x.map(Math.abs), 1);
          for (let i = 0; i < n; i++) {
            let sum = -right[i];
            for (let j = 0; j < n; j++) sum += matrix[i * n + j] * x[j];
            expect(Math.abs(sum)).toBeLessThan(2e-14 * size); // backward stable; measured 1e-15
          }
        },
      ),
    );
  });

  it("solve random complex systems", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 5 }).chain((n) => {
          const length = 2 * (n * n + n);
          return fc.array(entry, { minLength: length, maxLength: length });
        }),
        (numbers) => {
          const half = numbers.length / 2;
          const n = Math.round((Math.sqrt(1 + 4 * half) - 1) / 2);
          const take = (from: number, count: number) => Float64Array.from(numbers.slice(from, from + count));
          const re = take(0, n * n);
          const im = take(n * n, n * n);
          const br = take(2 * n * n, n);
          const bi = take(2 * n * n + n, n);
          const [fr, fi, xr, xi] = [re.slice(), im.slice(), br.slice(), bi.slice()];
          const pivots = new Int32Array(n);
          if (!factorComplex(fr, fi, n, pivots)) return;
          solveComplex(fr, fi, n, pivots, xr, xi);
          const size = Math.max(...xr.map(Math.abs), ...xi.map(Math.abs), 1);
          for (let i = 0; i < n; i++) {
            let sumRe = -br[i];
            let sumIm = -bi[i];
            for (let j = 0; j < n; j++) {
              sumRe += re[i * n + j] * xr[j] - im[i * n + j] * xi[j];
              sumIm += re[i * n + j] * xi[j] + im[i * n + j] * xr[j];
            }
            expect(Math.hypot(sumRe, sumIm)).toBeLessThan(3e-14 * size); // measured 2e-15
          }
        },
      ),
    );
  });

  it("report a singular matrix and one with NaN", () => {
    expect(factorReal(Float64Array.of(1, 2, 2, 4), 2, new Int32Array(2))).toBe(false);
    expect(factorReal(Float64Array.of(Number.NaN), 1, new Int32Array(1))).toBe(false);
    const zero = new Float64Array(1);
    expect(factorComplex(zero, zero.slice(), 1, new Int32Array(1))).toBe(false);
  });

  it("exchange rows where the first pivot vanishes", () => {
    const a = Float64Array.of(0, 1, 2, 0);
    const pivots = new Int32Array(2);
    const b = Float64Array.of(3, 8);
    expect(factorReal(a, 2, pivots)).toBe(true);
    solveReal(a, 2, pivots, b);
    expect(Array.from(b)).toEqual([4, 3]);
  });
});
