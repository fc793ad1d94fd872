import { describe, expect, it } from "vitest";
import {
  addedNodeKronrodWeights,
  addedNodes,
  centerKronrodWeight,
  gaussNodeKronrodWeights,
  gaussNodes,
  gaussWeights,
} from "../../../cosmo/numerics/gaussKronrod";

const gauss = (f: (x: number) => number) => gaussNodes.reduce((sum, x, i) => sum + gaussWeights[i] * (f(x) + f(-x)), 0);
const kronrod = (f: (x: number) => number) =>
  gaussNodes.reduce((sum, x, i) => sum + gaussNodeKronrodWeights[i] * (f(x) + f(-x)), 0) +
  addedNodes.reduce((sum, x, i) => sum + addedNodeKronrodWeights[i] * (f(x) + f(-x)), 0) +
  centerKronrodWeight * f(0);

describe("the Gauss-Kronrod pair", () => {
  it("has a Gauss rule exact to degree 19 and not to degree 20", () => {
    for (let degree = 0; degree <= 18; degree += 2) {
      expect(Math.abs(gauss((x) => x ** degree) - 2 / (degree + 1))).toBeLessThan(2e-15); // measured 2e-16
    }
    // the error constant 2^21 (10!)^4 / (21 (20!)^2) of x^20, Abramowitz & Stegun 1964, 25.4.29: 2.93e-6
    expect(2 / 21 - gauss((x) => x ** 20)).toBeCloseTo(2.9255e-6, 9);
  });

  it("has a Kronrod rule exact to degree 31 and not to degree 32", () => {
    for (let degree = 0; degree <= 30; degree += 2) {
      expect(Math.abs(kronrod((x) => x ** degree) - 2 / (degree + 1))).toBeLessThan(2e-15); // measured 4e-16
    }
    expect(Math.abs(kronrod((x) => x ** 32) - 2 / 33)).toBeGreaterThan(1e-12);
  });

  it("interlaces the added nodes with the Gauss nodes", () => {
    for (let i = 0; i < 5; i++) {
      expect(addedNodes[i]).toBeGreaterThan(gaussNodes[i]);
      if (i < 4) expect(addedNodes[i + 1]).toBeLessThan(gaussNodes[i]);
    }
  });
});
