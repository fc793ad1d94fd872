import { describe, expect, it } from "vitest";
import type { ModelGivens } from "../../../cosmo/model";
import { integrate } from "../../../cosmo/numerics";
import { evaluateModel } from "../../../cosmo/solve";

const base: ModelGivens = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };

describe("optical depth and visibility", () => {
  const numbers = evaluateModel(base);

  it("visibility is a probability: its integral over z is one", () => {
    const g = (z: number) => numbers.value("visibility", z);
    const { value } = integrate(g, 0, 3000, { breakpoints: [500, 900, 1000, 1100, 1300], relative: 1e-8 });
    // What is missing lies above z = 3000: e^-tau there is zero; what tau(0) = 0 says is exact.
    expect(value).toBeCloseTo(1, 7);
  });

  it("half of the last scatterings lie on either side of the median", () => {
    const z = numbers.value("visibilityMedianRedshift");
    expect(Math.exp(-numbers.value("opticalDepth", z))).toBeCloseTo(0.5, 9);
  });

  it("opticalDepth is one at z_*, dragDepth at z_drag", () => {
    expect(numbers.value("opticalDepth", numbers.value("lastScatteringRedshift"))).toBeCloseTo(1, 9);
    expect(numbers.value("dragDepth", numbers.value("dragRedshift"))).toBeCloseTo(1, 9);
  });

  it("the peak is higher than its neighbors and the width spans half its height", () => {
    const peak = numbers.value("visibilityPeakRedshift");
    const top = numbers.value("visibility", peak);
    for (const step of [-0.5, 0.5]) expect(numbers.value("visibility", peak + step)).toBeLessThan(top);
    // Symmetric enough that a parabola's maximum agrees: three values around the peak.
    const [left, right] = [numbers.value("visibility", peak - 0.5), numbers.value("visibility", peak + 0.5)];
    const offset = (0.25 * (left - right)) / (left - 2 * top + right);
    expect(Math.abs(offset)).toBeLessThan(1e-3);
  });

  it("is near Gaussian with mean 1065 and sigma 80 by the old approximation", () => {
    // Jones & Wyse 1985: tau = 0.37 (z/1000)^14.25, visibility near-Gaussian, mean z 1065, sigma 80 (a fit for other densities).
    expect(Math.abs(numbers.value("visibilityPeakRedshift") - 1065)).toBeLessThan(20);
    expect(Math.abs(numbers.value("visibilityWidth") / 2.3548 - 80)).toBeLessThan(8);
    expect(Math.abs(numbers.value("opticalDepth", 1000) / 0.37 - 1)).toBeLessThan(0.15);
  });

  it("joins smoothly above the integrated history", () => {
    const below = numbers.value("opticalDepth", 3490);
    const above = numbers.value("opticalDepth", 3510);
    const middle = numbers.value("opticalDepth", 3500);
    expect((above + below) / 2 / middle - 1).toBeCloseTo(0, 4);
    expect(numbers.value("opticalDepth", 6000)).toBeGreaterThan(above);
  });

  it("a redshift below zero is refused for depths, by name", () => {
    expect(() => numbers.value("opticalDepth", -0.5)).toThrow(
      "opticalDepth: redshift must be finite and not negative, got -0.5",
    );
  });
});
