import { describe, expect, it } from "vitest";
import { gaussLegendre } from "../../../cosmo/numerics";
import reference from "../../reference/numerics/quadrature.json";

describe("gaussLegendre", () => {
  it("agrees with mpmath's nodes and weights for n from 2 to 200", () => {
    for (const { n, index, node, weight } of reference.gaussLegendre) {
      const rule = gaussLegendre(n);
      expect(Math.abs(rule.nodes[n - 1 - index] - Number(node))).toBeLessThan(5e-16); // measured 1.1e-16
      expect(Math.abs(rule.weights[n - 1 - index] / Number(weight) - 1)).toBeLessThan(1e-14); // measured 2.3e-15
    }
  });

  it("integrates polynomials up to degree 2n - 1 exactly, and not x^(2n)", () => {
    for (const n of [1, 2, 3, 4, 7, 16, 33]) {
      const { nodes, weights } = gaussLegendre(n);
      for (let degree = 0; degree <= 2 * n - 1; degree++) {
        const sum = nodes.reduce((total, x, i) => total + weights[i] * x ** degree, 0);
        const exact = degree % 2 === 0 ? 2 / (degree + 1) : 0;
        expect(Math.abs(sum - exact)).toBeLessThan(5e-15); // measured 7e-16
      }
      if (n < 10) {
        const beyond = nodes.reduce((total, x, i) => total + weights[i] * x ** (2 * n), 0);
        expect(Math.abs(beyond - 2 / (2 * n + 1))).toBeGreaterThan(1e-5);
      }
    }
  });

  it("is symmetric, ascending, and returns the same arrays again", () => {
    const { nodes, weights } = gaussLegendre(31);
    for (let i = 0; i < 31; i++) {
      expect(nodes[i] + nodes[30 - i]).toBe(0);
      expect(weights[i]).toBe(weights[30 - i]);
      if (i > 0) expect(nodes[i]).toBeGreaterThan(nodes[i - 1]);
    }
    expect(nodes[15]).toBe(0);
    expect(gaussLegendre(31).nodes).toBe(nodes);
  });

  it("refuses n that is no positive integer", () => {
    for (const n of [0, -1, 2.5, Number.NaN, 20000]) {
      expect(() => gaussLegendre(n)).toThrow(`gaussLegendre: n must be an integer from 1 to 10000, got ${n}`);
    }
  });
});
