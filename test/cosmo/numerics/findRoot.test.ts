import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError, NotConvergedError } from "../../../cosmo/errors";
import { findRoot } from "../../../cosmo/numerics";
import reference from "../../reference/numerics/quadrature.json";

describe("findRoot", () => {
  it("finds mpmath's roots to the last digit", () => {
    const { dottie, wien } = reference.roots;
    const cosine = findRoot((x) => Math.cos(x) - x, 0, 2);
    expect(Math.abs(cosine.value - Number(dottie))).toBeLessThan(2e-16); // measured 1e-16
    const displacement = findRoot((x) => (x - 5) * Math.exp(x) + 5, 1, 10);
    expect(Math.abs(displacement.value - Number(wien))).toBeLessThan(3e-15); // measured 9e-16
    expect(cosine.converged && displacement.converged).toBe(true);
  });

  it("leaves the sign change within its error estimate, for any bracket", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 100, noNaN: true }),
        fc.double({ min: 1e-3, max: 50, noNaN: true }),
        fc.double({ min: 1e-3, max: 50, noNaN: true }),
        (root, below, above) => {
          const f = (x: number) => Math.atan(3 * (x - root)) + 0.1 * (x - root) ** 3;
          const result = findRoot(f, root - below, root + above);
          expect(result.converged).toBe(true);
          expect(Math.abs(result.value - root)).toBeLessThanOrEqual(result.error + 2.3e-16 * root);
          expect(result.error).toBeLessThanOrEqual(1e-15 * root);
          expect(result.evaluations).toBeLessThan(60);
          expect(findRoot(f, root + above, root - below).value).toBeCloseTo(result.value, 13);
        },
      ),
    );
  });

  it("meets a looser tolerance with fewer evaluations and an honest error", () => {
    const tight = findRoot((x) => x * x - 2, 0, 2);
    const loose = findRoot((x) => x * x - 2, 0, 2, { relative: 1e-4 });
    expect(loose.evaluations).toBeLessThan(tight.evaluations);
    expect(Math.abs(loose.value - Math.SQRT2)).toBeLessThanOrEqual(loose.error);
    expect(loose.error).toBeLessThanOrEqual(1.5e-4);
  });

  it("bisects its way through a jump and a triple root", () => {
    expect(findRoot((x) => (x < 0.7 ? -1 : 1e9), 0, 1).value).toBeCloseTo(0.7, 15);
    const triple = findRoot((x) => (x - 1) ** 3, 0, 3.7);
    expect(Math.abs(triple.value - 1)).toBeLessThanOrEqual(triple.error + 1e-15);
  });

  it("accepts a root at either end", () => {
    expect(findRoot((x) => x, 0, 1).value).toBe(0);
    expect(findRoot((x) => x - 1, 0, 1)).toMatchObject({ value: 1, evaluations: 2, converged: true });
  });

  it("refuses a bracket without a change of sign, and shows both values", () => {
    expect(() => findRoot((x) => x * x + 1, -1, 2)).toThrow(DomainError);
    expect(() => findRoot((x) => x * x + 1, -1, 2)).toThrow(
      "findRoot: f must change its sign between -1 and 2, got [2, 5]",
    );
  });

  it("says so when its iterations run out", () => {
    const result = findRoot((x) => Math.cos(x) - x, 0, 2, { maximumIterations: 2 });
    expect(result.converged).toBe(false);
    expect(Math.abs(result.value - 0.7390851332151607)).toBeLessThanOrEqual(result.error);
  });

  it("throws at NaN and refuses bad arguments", () => {
    expect(() => findRoot((x) => Math.log(x), -1, 2)).toThrow(NotConvergedError);
    expect(() => findRoot((x) => Math.log(x), -1, 2)).toThrow("the function is NaN at x = -1");
    expect(() => findRoot((x) => x, Number.NaN, 2)).toThrow("lower must be finite, got NaN");
    expect(() => findRoot((x) => x, 0, Number.POSITIVE_INFINITY)).toThrow("upper must be finite, got Infinity");
    expect(() => findRoot((x) => x, -1, 1, { relative: Number.NaN })).toThrow("relative must be >= 0, got NaN");
    expect(() => findRoot((x) => x, -1, 1, { absolute: -1 })).toThrow("absolute must be >= 0, got -1");
  });
});
