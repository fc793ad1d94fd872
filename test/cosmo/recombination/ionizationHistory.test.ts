import { describe, expect, it } from "vitest";
import { NoAnswerError } from "../../../cosmo/errors";
import type { ModelGivens } from "../../../cosmo/model";
import { Evaluation } from "../../../cosmo/quantity";
import { equilibriumAt, gasPart, ionizationHistoryPart } from "../../../cosmo/recombination";
import { lymanAlphaCorrection } from "../../../cosmo/recombination/lymanAlphaCorrection";
import { closeModel, evaluateModel } from "../../../cosmo/solve";

const base: ModelGivens = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };

describe("the ionization history", () => {
  it("is computed once for all quantities of a model", () => {
    const numbers = evaluateModel(base);
    for (const name of ["lastScatteringRedshift", "dragSoundHorizon", "dampingWavenumber"]) numbers.value(name);
    const parts = numbers.evaluation.computedParts();
    expect(new Set(parts).size).toBe(parts.length);
    expect(parts.filter((part) => part === "ionization history")).toHaveLength(1);
  });

  for (const recombination of ["peebles", "calibrated"] as const) {
    it(`joins Saha equilibrium at its start without a step (${recombination})`, () => {
      const evaluation = new Evaluation(closeModel({ ...base, recombination }));
      const history = evaluation.once(ionizationHistoryPart);
      const start = history.mesh[history.mesh.length - 1]!;
      const gas = evaluation.once(gasPart);
      // Measured: 0 (peebles), 3.4e-13 (calibrated).
      expect(Math.abs(history.ionized(start) / equilibriumAt(start, gas).ionized - 1)).toBeLessThan(4e-12);
      expect(Math.abs(history.ionized(start - 0.02) / equilibriumAt(start - 0.02, gas).ionized - 1)).toBeLessThan(1e-5);
    });

    it(`falls monotonically in time and stays between 0 and 1 + 2 f_He (${recombination})`, () => {
      const numbers = evaluateModel({ ...base, recombination });
      let before = 0;
      for (let z = 0; z < 9000; z = 1.02 * z + 1) {
        const now = numbers.value("residualIonizedFraction", z);
        expect(now).toBeGreaterThan(before);
        expect(now).toBeLessThan(1.17);
        before = now;
      }
    });

    it(`gas cools with the radiation early and as (1+z)^2 late (${recombination})`, () => {
      const numbers = evaluateModel({ ...base, recombination });
      expect(numbers.value("matterTemperature", 1500) / numbers.value("radiationTemperature", 1500)).toBeCloseTo(1, 5);
      // Adiabatic cooling of a monatomic gas: T falls as a^-2 (common practice, no source).
      const slope =
        Math.log(numbers.value("matterTemperature", 5) / numbers.value("matterTemperature", 4)) / Math.log(6 / 5);
      expect(Math.abs(slope - 2)).toBeLessThan(0.02);
    });
  }

  it("leaves two free electrons in ten thousand today", () => {
    // Peebles 1968 finds a residue of this order for a dense model; common practice, no source for the figure near 2e-4.
    const residue = evaluateModel({ ...base, recombination: "peebles" }).value("residualIonizedFraction", 0);
    expect(residue).toBeGreaterThan(1.5e-4);
    expect(residue).toBeLessThan(3e-4);
  });

  it("works without helium, and helium then adds no electrons", () => {
    const numbers = evaluateModel({ ...base, helium: 0 });
    expect(numbers.value("residualIonizedFraction", 8000)).toBeCloseTo(1, 9);
    expect(numbers.value("lastScatteringRedshift")).toBeGreaterThan(1000);
  });

  it("refuses models in which nothing can recombine, and says why", () => {
    const refusal = (givens: ModelGivens) => {
      try {
        evaluateModel(givens).value("lastScatteringRedshift");
      } catch (error) {
        expect(error).toBeInstanceOf(NoAnswerError);
        return (error as Error).message;
      }
      throw new Error("no refusal");
    };
    expect(refusal({ ...base, baryonDensity: 0 })).toBe(
      "recombination: this model has no baryons (baryonDensity 0), so nothing recombines",
    );
    expect(refusal({ ...base, photonTemperature: 0 })).toBe(
      "recombination: this model has no radiation (photonTemperature 0), so it was never ionized by heat",
    );
    expect(refusal({ hubble: 70, baryonDensity: 0.022, coldMatterDensity: 0.02, darkEnergyFraction: 1.8 })).toMatch(
      /^recombination: this closed model never had a Big Bang: going back, H reaches zero at z = /,
    );
  });

  it("is the same at coarser settings to the error that is stated", () => {
    const numbers = evaluateModel(base);
    for (const z of [1, 100, 900, 1100, 1500, 2000]) {
      const { value, error } = numbers.quantity("residualIonizedFraction", z);
      expect(error / value).toBeLessThan(1e-7);
      expect(error / value).toBeGreaterThan(1e-16);
    }
  });
});

describe("lymanAlphaCorrection", () => {
  it("is 1 + c0 at z + 1 = 1090 and fades on both sides", () => {
    expect(lymanAlphaCorrection(1090, [0.04, -0.5, -2])).toBeCloseTo(1.04, 15);
    // d = 0.4: (c0 + 0.4 c1 + 0.16 c2) / e.
    expect(lymanAlphaCorrection(1090 * Math.exp(0.4), [0.04, -0.5, -2])).toBeCloseTo(
      1 + (0.04 - 0.2 - 0.32) / Math.E,
      14,
    );
    expect(lymanAlphaCorrection(5000)).toBeCloseTo(1, 4);
    expect(lymanAlphaCorrection(200)).toBeCloseTo(1, 4);
  });
});

describe("a background much hotter than ours", () => {
  it("is followed to today although every exponential of helium underflows on the way", () => {
    for (const photonTemperature of [1, 5, 10]) {
      const numbers = evaluateModel({ ...base, photonTemperature });
      // Last scattering is near 3000 K whatever the temperature today (common practice, no source).
      const temperature = numbers.value("radiationTemperature", numbers.value("lastScatteringRedshift"));
      expect(temperature).toBeGreaterThan(2500);
      expect(temperature).toBeLessThan(4200);
      expect(numbers.value("residualIonizedFraction", 0)).toBeGreaterThan(0);
    }
  });
});
