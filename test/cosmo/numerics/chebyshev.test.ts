import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { buildChebyshev } from "../../../cosmo/numerics";

describe("buildChebyshev", () => {
  it("reproduces a polynomial of its degree, and its derivative, to round-off", () => {
    const series = buildChebyshev((x) => 3 - 2 * x + x ** 5, -1, 3, { pieces: 3, degree: 5 });
    for (const x of [-1, -0.3, 0.333, 1, 2.999, 3]) {
      // measured 4e-16 and 8e-16 of the largest value
      expect(Math.abs(series.evaluate(x) - (3 - 2 * x + x ** 5))).toBeLessThan(5e-15 * 240);
      expect(Math.abs(series.derivative(x) - (-2 + 5 * x ** 4))).toBeLessThan(1e-14 * 405);
    }
  });

  it("meets sin and cos within its own error estimate, which is not absurd", () => {
    for (const [pieces, degree] of [
      [1, 10],
      [2, 10],
      [4, 8],
      [4, 14],
      [16, 6],
    ]) {
      const series = buildChebyshev(Math.sin, -2, 4, { pieces, degree });
      let worst = 0;
      for (let x = -2; x <= 4; x += 0.0037) worst = Math.max(worst, Math.abs(series.evaluate(x) - Math.sin(x)));
      expect(worst).toBeLessThan(series.error);
      expect(series.error).toBeLessThan(50 * worst);
    }
    const fine = buildChebyshev(Math.sin, -2, 4, { pieces: 6, degree: 14 });
    for (let x = -2; x <= 4; x += 0.01) {
      expect(Math.abs(fine.derivative(x) - Math.cos(x))).toBeLessThan(3e-12); // measured 2.8e-13: round-off times degree squared
    }
  });

  it("estimates its error honestly for a family of functions with poles near the range", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.05, max: 2, noNaN: true }), fc.integer({ min: 4, max: 24 }), (gap, degree) => {
        const f = (x: number) => 1 / (x + gap);
        const series = buildChebyshev(f, 0, 1, { pieces: 2, degree });
        for (let x = 0; x <= 1; x += 1 / 128) {
          expect(Math.abs(series.evaluate(x) - f(x))).toBeLessThanOrEqual(series.error);
        }
      }),
    );
  });

  it("gains a factor of two to the power degree + 1 from halving the pieces", () => {
    const worst = (pieces: number) => {
      const series = buildChebyshev(Math.exp, 0, 2, { pieces, degree: 5 });
      let error = 0;
      for (let x = 0; x <= 2; x += 0.001) error = Math.max(error, Math.abs(series.evaluate(x) - Math.exp(x)));
      return error;
    };
    const order = Math.log2(worst(4) / worst(8));
    expect(order).toBeGreaterThan(5.7); // measured 5.9
    expect(order).toBeLessThan(6.3);
  });

  it("refuses x outside its range instead of clamping, and names it", () => {
    const series = buildChebyshev(Math.exp, 0, 1, { pieces: 2, degree: 8 });
    expect(series.evaluate(0)).toBeCloseTo(1, 8);
    expect(series.evaluate(1)).toBeCloseTo(Math.E, 8);
    for (const x of [-1e-15, 1.0000000001, Number.NaN]) {
      expect(() => series.evaluate(x)).toThrow(`x must lie between 0 and 1, got ${x}`);
      expect(() => series.derivative(x)).toThrow("must lie between 0 and 1");
    }
  });

  it("refuses bad ranges, options and functions", () => {
    const options = { pieces: 1, degree: 4 };
    expect(() => buildChebyshev(Math.exp, Number.NaN, 1, options)).toThrow("lower must be finite, got NaN");
    expect(() => buildChebyshev(Math.exp, 1, 1, options)).toThrow("upper must be finite and above lower (1), got 1");
    expect(() => buildChebyshev(Math.exp, 0, 1, { pieces: 0, degree: 4 })).toThrow("pieces must be");
    expect(() => buildChebyshev(Math.exp, 0, 1, { pieces: 1, degree: 1.5 })).toThrow("degree must be");
    expect(() => buildChebyshev(Math.log, -1, 1, options)).toThrow("the function is NaN at x = -");
  });
});
