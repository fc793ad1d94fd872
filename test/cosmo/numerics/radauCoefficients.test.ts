import { describe, expect, it } from "vitest";
import {
  complexEigenvalues,
  endSlopeWeights,
  inverseTransformation,
  LARGEST_SLOPE_BUBBLE,
  LARGEST_STAGE_BUBBLE,
  nodes,
  realEigenvalue,
  STAGES,
  slopeBubble,
  stageBubble,
  stageWeights,
  startSlopeWeights,
  transformation,
} from "../../../cosmo/numerics/radauCoefficients";

/** The Runge-Kutta matrix A = T L^-1 T^-1, row by row. */
function rungeKuttaMatrix(): number[][] {
  const block = Array.from({ length: STAGES }, () => new Array<number>(STAGES).fill(0));
  block[0][0] = 1 / realEigenvalue;
  complexEigenvalues.forEach(({ alpha, beta }, p) => {
    const size = alpha * alpha + beta * beta;
    const at = 1 + 2 * p;
    block[at][at] = alpha / size;
    block[at + 1][at + 1] = alpha / size;
    block[at][at + 1] = -beta / size;
    block[at + 1][at] = beta / size;
  });
  return Array.from({ length: STAGES }, (_, i) =>
    Array.from({ length: STAGES }, (_, j) => {
      let sum = 0;
      for (let k = 0; k < STAGES; k++) {
        for (let l = 0; l < STAGES; l++) {
          sum += transformation[i * STAGES + k] * block[k][l] * inverseTransformation[l * STAGES + j];
        }
      }
      return sum;
    }),
  );
}

describe("the Radau IIA coefficients", () => {
  const matrix = rungeKuttaMatrix();
  const weights = matrix[STAGES - 1];

  it("fulfil the simplifying condition C(5): the stages integrate polynomials of degree 4", () => {
    for (let k = 1; k <= 5; k++) {
      for (let i = 0; i < STAGES; i++) {
        const sum = nodes.reduce((total, c, j) => total + matrix[i][j] * c ** (k - 1), 0);
        expect(Math.abs(sum - nodes[i] ** k / k)).toBeLessThan(2e-14); // measured 2e-15
      }
    }
  });

  it("fulfil B(9), and not B(10): the weights integrate polynomials of degree 8", () => {
    for (let k = 1; k <= 9; k++) {
      const sum = nodes.reduce((total, c, j) => total + weights[j] * c ** (k - 1), 0);
      expect(Math.abs(sum - 1 / k)).toBeLessThan(2e-14); // measured 2e-15
    }
    const tenth = nodes.reduce((total, c, j) => total + weights[j] * c ** 9, 0);
    expect(Math.abs(tenth - 1 / 10)).toBeGreaterThan(1e-6);
  });

  it("have the weights that Hairer & Wanner's definition gives at the last node, 1/25", () => {
    // b_s = 1/s^2 for the right Radau rule (Abramowitz & Stegun 1964, 25.4.31)
    expect(weights[4]).toBeCloseTo(1 / 25, 14);
    expect(nodes[4]).toBe(1);
  });

  it("have T and T^-1 that are inverse to each other", () => {
    for (let i = 0; i < STAGES; i++) {
      for (let j = 0; j < STAGES; j++) {
        let sum = 0;
        for (let k = 0; k < STAGES; k++) {
          sum += transformation[i * STAGES + k] * inverseTransformation[k * STAGES + j];
        }
        expect(Math.abs(sum - (i === j ? 1 : 0))).toBeLessThan(3e-14); // measured 4e-15
      }
    }
  });

  it("have stage weights that reproduce polynomials of degree 5 without a constant, inside and outside the step", () => {
    const out = new Float64Array(STAGES);
    for (const tau of [-0.4, 0, 0.2, nodes[2], 0.9, 1, 1.7]) {
      stageWeights(tau, out);
      for (let degree = 1; degree <= 5; degree++) {
        const sum = nodes.reduce((total, c, i) => total + out[i] * c ** degree, 0);
        expect(Math.abs(sum - tau ** degree)).toBeLessThan(5e-14); // measured 7e-15
      }
    }
    stageWeights(1, out);
    expect(out[4]).toBeCloseTo(1, 15);
  });

  it("have slope weights that differentiate polynomials of degree 5 at both ends", () => {
    for (let degree = 1; degree <= 5; degree++) {
      const atStart = nodes.reduce((total, c, i) => total + startSlopeWeights[i] * c ** degree, 0);
      const atEnd = nodes.reduce((total, c, i) => total + endSlopeWeights[i] * c ** degree, 0);
      expect(Math.abs(atStart - (degree === 1 ? 1 : 0))).toBeLessThan(1e-13); // measured 1e-14
      expect(Math.abs(atEnd - degree)).toBeLessThan(1e-13); // measured 7e-15
    }
  });

  it("have a slope bubble with slope 1 at the start, 0 at the nodes, and a stage bubble that vanishes at all", () => {
    const slope = (f: (x: number) => number, x: number) => (f(x + 1e-5) - f(x - 1e-5)) / 2e-5;
    expect(slope(slopeBubble, 0)).toBeCloseTo(1, 7);
    for (const c of nodes) {
      expect(Math.abs(slope(slopeBubble, c))).toBeLessThan(1e-8); // measured 5e-9, the difference's own error
      expect(Math.abs(stageBubble(c))).toBe(0);
    }
    expect(Math.abs(slopeBubble(0)) + Math.abs(stageBubble(0))).toBe(0);
    expect(Math.abs(slopeBubble(1))).toBeLessThan(1e-16);
    let slopes = 0;
    let stages = 0;
    for (let tau = 0; tau <= 1; tau += 1e-4) {
      slopes = Math.max(slopes, Math.abs(slopeBubble(tau)));
      stages = Math.max(stages, Math.abs(stageBubble(tau)));
    }
    expect(slopes / LARGEST_SLOPE_BUBBLE).toBeCloseTo(1, 2);
    expect(slopes).toBeLessThanOrEqual(LARGEST_SLOPE_BUBBLE);
    expect(stages / LARGEST_STAGE_BUBBLE).toBeCloseTo(1, 2);
    expect(stages).toBeLessThanOrEqual(LARGEST_STAGE_BUBBLE);
  });
});
