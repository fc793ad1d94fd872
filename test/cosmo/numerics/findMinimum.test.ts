import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { findMinimum } from "../../../cosmo/numerics";

describe("findMinimum", () => {
  it("finds the minimum of the gamma function", () => {
    // Lanczos-free: ln Gamma by Stirling's series at x + 8 (Abramowitz & Stegun 1964, 6.1.41)
    const logGamma = (x: number) => {
      let shift = 0;
      let y = x;
      for (; y < x + 8; y++) shift -= Math.log(y);
      return (y - 0.5) * Math.log(y) - y + 0.5 * Math.log(2 * Math.PI) + 1 / (12 * y) - 1 / (360 * y ** 3) + shift;
    };
    const result = findMinimum((x) => Math.exp(logGamma(x)), 0.5, 3);
    // Abramowitz & Stegun 1964, 6.1.6: x_0 = 1.46163 21450, Gamma(x_0) = 0.88560 31944 (memory)
    expect(Math.abs(result.value - 1.461632145)).toBeLessThan(1e-6); // f is flat: half the digits
    expect(Math.abs(result.minimum - 0.8856031944)).toBeLessThan(2e-8); // Stirling's series stops at y^-3: measured 5e-9
    expect(result.converged).toBe(true);
  });

  it("finds the vertex of parabolas, also at an end of the interval, within its error", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -5, max: 5, noNaN: true }),
        fc.double({ min: 0.1, max: 9, noNaN: true }),
        (x0, c) => {
          const result = findMinimum((x) => c * (x - x0) ** 2 + 1, -4, 4);
          const vertex = Math.max(-4, Math.min(4, x0));
          expect(result.converged).toBe(true);
          // f itself cannot tell points closer than about sqrt(eps / c)
          expect(Math.abs(result.value - vertex)).toBeLessThanOrEqual(result.error + 3e-8 / Math.sqrt(c));
          expect(result.minimum).toBeLessThanOrEqual(
            c * (vertex - x0) ** 2 + 1 + 3e-6 * Math.abs(vertex - x0) * c + 1e-14,
          );
        },
      ),
    );
  });

  it("converges on a kink, where parabolas are no help", () => {
    const result = findMinimum((x) => Math.abs(x - 0.37), 0, 1);
    expect(Math.abs(result.value - 0.37)).toBeLessThan(3e-8);
    expect(result.evaluations).toBeLessThan(60);
  });

  it("says so when its iterations run out, refuses bad intervals and throws at NaN", () => {
    expect(findMinimum(Math.cos, 2, 5, { maximumIterations: 2 }).converged).toBe(false);
    expect(() => findMinimum(Math.cos, 2, 1)).toThrow("upper must be finite and above lower (2), got 1");
    expect(() => findMinimum(Math.cos, Number.NaN, 1)).toThrow("lower must be finite, got NaN");
    expect(() => findMinimum(Math.cos, 0, 1, { absolute: 0 })).toThrow("absolute must be > 0, got 0");
    expect(() => findMinimum((x) => Math.log(x - 3), 2, 3)).toThrow("the function is NaN at x = 2.38");
  });
});
