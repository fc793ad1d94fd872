import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { richardsonDerivative } from "../../../cosmo/numerics";

describe("richardsonDerivative", () => {
  it("finds the derivatives of exp, sin, ln and a power within its error estimate", () => {
    const cases: [(x: number) => number, number, number, number][] = [
      [Math.exp, 1, 0.5, Math.E],
      [Math.sin, 0.3, 1, Math.cos(0.3)],
      [Math.log, 2, 0.5, 0.5],
      [(x) => x ** -3, 2, 0.4, -3 / 16],
      [(x) => 1e9 * Math.cos(x * 1e-3), 700, 500, -1e6 * Math.sin(0.7)],
    ];
    for (const [f, x, step, exact] of cases) {
      const result = richardsonDerivative(f, x, step);
      expect(Math.abs(result.value / exact - 1)).toBeLessThan(5e-14); // measured 4.7e-15
      expect(Math.abs(result.value - exact)).toBeLessThanOrEqual(result.error);
      expect(result.error).toBeLessThan(6e-13 * Math.abs(exact)); // measured 5.9e-14
      expect(result.converged).toBe(true);
    }
  });

  it("is exact to round-off for polynomials", () => {
    const result = richardsonDerivative((x) => x ** 7 - 4 * x ** 2, 1, 0.5);
    expect(Math.abs(result.value + 1)).toBeLessThan(1e-12);
  });

  it("holds its error estimate over a family of smooth functions in at least 99%", () => {
    let held = 0;
    let total = 0;
    fc.assert(
      fc.property(
        fc.double({ min: 0.2, max: 5, noNaN: true }),
        fc.double({ min: 0.05, max: 0.9, noNaN: true }),
        fc.double({ min: -2, max: 2, noNaN: true }),
        (a, step, x) => {
          const result = richardsonDerivative((t) => Math.sin(a * t) / (2 + t * t), x, step);
          const exact = (a * Math.cos(a * x)) / (2 + x * x) - (2 * x * Math.sin(a * x)) / (2 + x * x) ** 2;
          total++;
          if (Math.abs(result.value - exact) <= result.error) held++;
        },
      ),
      { numRuns: 500, seed: 5 },
    );
    expect(held / total).toBeGreaterThanOrEqual(0.99); // measured 0.999
  });

  it("does not claim convergence at a vertical tangent or in noise", () => {
    expect(richardsonDerivative(Math.cbrt, 0, 0.5).converged).toBe(false);
    // noise of 1e-4 from the digits that a sine of a large argument scrambles
    const noisy = (x: number) => Math.exp(x) + 1e-4 * Math.sin(1e9 * x);
    expect(richardsonDerivative(noisy, 0, 0.5).converged).toBe(false);
  });

  it("refuses bad arguments and values that are not finite", () => {
    expect(() => richardsonDerivative(Math.exp, Number.NaN, 1)).toThrow("x must be finite, got NaN");
    expect(() => richardsonDerivative(Math.exp, 1, 0)).toThrow("step must be finite, above 0 and change x, got 0");
    expect(() => richardsonDerivative(Math.exp, 1, 1e-18)).toThrow("step must be");
    expect(() => richardsonDerivative(Math.log, 1, 2)).toThrow("the function is NaN at x = -1");
  });
});
