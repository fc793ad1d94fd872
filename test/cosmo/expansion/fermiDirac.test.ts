import { readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { fermiDiracEnergy, fermiDiracPressure } from "../../../cosmo/expansion";
import { evaluateModel } from "../../../cosmo/solve";
import { relative } from "../exactModels";

// mpmath at 30 digits; remade by python3 test/reference/neutrinos/fermiDirac.py
const reference = JSON.parse(readFileSync(join(__dirname, "../../reference/neutrinos/fermiDirac.json"), "utf8")) as {
  rows: [number, number, number, number, number][];
};

// Measured 1.8e-15.
const bound = 1.5e-14;

describe("fermiDiracEnergy(y) and fermiDiracPressure(y)", () => {
  it("meet mpmath from y = 1e-5 to 1e5, across the joints of series and table", () => {
    expect(reference.rows.length).toBeGreaterThan(15);
    for (const [y, energy, looserEnergy, pressure, looserPressure] of reference.rows) {
      expect(relative(looserEnergy, energy), `the reference at y = ${y}`).toBeLessThan(bound / 10);
      expect(relative(looserPressure, pressure), `the reference at y = ${y}`).toBeLessThan(bound / 10);
      expect(relative(fermiDiracEnergy(y), energy), `energy at y = ${y}`).toBeLessThan(bound);
      expect(relative(fermiDiracPressure(y), pressure), `pressure at y = ${y}`).toBeLessThan(bound);
      expect(relative(fermiDiracEnergy(y), energy * (1 + 10 * bound))).toBeGreaterThan(bound);
      expect(relative(fermiDiracPressure(y), pressure * (1 + 10 * bound))).toBeGreaterThan(bound);
    }
  });

  it("are 1 for a massless species", () => {
    expect(fermiDiracEnergy(0)).toBe(1);
    expect(fermiDiracPressure(0)).toBe(1);
  });

  it("keep energy conservation: d(energy)/d ln y = energy - pressure", () => {
    for (const y of [0.01, 0.5, 3, 40, 700]) {
      const h = 1e-3;
      const slope = (step: number) =>
        (fermiDiracEnergy(y * Math.exp(step)) - fermiDiracEnergy(y * Math.exp(-step))) / (2 * step);
      const derivative = (4 * slope(h) - slope(2 * h)) / 3;
      const expected = fermiDiracEnergy(y) - fermiDiracPressure(y);
      // Measured 1.2e-12 of the energy: what the difference quotient loses.
      expect(Math.abs(derivative - expected) / fermiDiracEnergy(y)).toBeLessThan(1e-11);
    }
  });
});

describe("neutrinoDensity", () => {
  it("of 0.06 eV at N_eff 3.046 is 6.4522e-4", () => {
    // The check value of the project's physics contract, made with mpmath; the rule of thumb m/94.07 eV gives 6.4514e-4.
    const numbers = evaluateModel({
      hubble: 67.36,
      baryonDensity: 0.02237,
      coldMatterDensity: 0.12,
      neutrinos: { effectiveNumber: 3.046, masses: [0.06] },
    });
    expect(numbers.value("neutrinoDensity").toExponential(4)).toBe("6.4522e-4");
  });
});
