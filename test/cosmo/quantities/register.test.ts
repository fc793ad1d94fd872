import { describe, expect, it } from "vitest";
import { findQuantity, modelQuantities, quantityRegister } from "../../../cosmo/quantities";
import { evaluateModel } from "../../../cosmo/solve";
import { sources } from "../../../cosmo/sources";
import { plain, relative } from "../exactModels";

describe("the register", () => {
  it("holds each name once, and every name of the expansion, distances and times in the vocabulary", () => {
    const names = [...quantityRegister.keys()];
    expect(new Set(names).size).toBe(names.length);
    for (const name of [
      "age",
      "lookbackTime",
      "ageAt",
      "lightTravelDistance",
      "conformalTime",
      "particleHorizon",
      "eventHorizon",
      "hubbleRate",
      "hubbleDistance",
      "criticalDensity",
      "matterFractionAt",
      "comovingDistance",
      "transverseDistance",
      "angularDiameterDistance",
      "luminosityDistance",
      "volumeDistance",
      "distanceModulus",
      "comovingVolume",
      "comovingVolumeElement",
      "properScale",
      "alcockPaczynskiRatio",
      "equalityRedshift",
      "equalityWavenumber",
      "accelerationRedshift",
      "matterFractionTimesCubedHubble",
    ]) {
      expect(names, name).toContain(name);
    }
  });

  it("describes each quantity fully: a sentence, an equation, a method, an accuracy, sources that exist", () => {
    const model = evaluateModel(plain).model;
    for (const quantity of quantityRegister.values()) {
      expect(quantity.name).toMatch(/^[a-z][A-Za-z0-9.]*$/);
      expect(quantity.symbol, quantity.name).not.toBe("");
      expect(quantity.description, quantity.name).toMatch(/^[A-Z0-9].*[^.]$/);
      expect(quantity.equation, quantity.name).not.toBe("");
      expect(quantity.method, quantity.name).not.toBe("");
      expect(quantity.accuracy, quantity.name).toBeGreaterThan(0);
      expect(quantity.accuracy, quantity.name).toBeLessThan(1e-3);
      const keys = typeof quantity.sources === "function" ? quantity.sources(model) : quantity.sources;
      for (const key of keys) expect(sources[key], `${quantity.name}: ${key}`).toBeDefined();
    }
  });

  it("finds a quantity by name and suggests the one that was meant", () => {
    expect(findQuantity("age", "test").name).toBe("age");
    expect(() => findQuantity("luminosityDistanse", "derive")).toThrow(
      'derive: "luminosityDistanse" is not a known quantity',
    );
    try {
      findQuantity("luminosityDistanse", "derive");
    } catch (error) {
      expect((error as { hint: string }).hint).toBe('did you mean "luminosityDistance"?');
    }
  });
});

describe("today's numbers of the model", () => {
  it("are read off the closed model", () => {
    const numbers = evaluateModel(plain);
    for (const { name } of modelQuantities) {
      if (name in numbers.model) {
        expect(numbers.value(name), name).toBe(numbers.model[name as "hubble"]);
      }
    }
    expect(
      relative(numbers.value("matterFractionTimesCubedHubble"), numbers.value("matterFraction") * 0.674 ** 3),
    ).toBeLessThan(1e-15 * 4);
    expect(numbers.value("neutrinos.massSum")).toBe(0.06);
    expect(numbers.value("darkEnergy.w0")).toBe(-1);
  });

  it("Omega_m h^3 of Planck's last column is 0.09633, as printed", () => {
    // Planck 2018 VI, Table 2, TT,TE,EE+lowE+lensing: omega_b 0.02237, omega_c 0.1200, H0 67.36; Omega_m h^3 0.09633 +- 0.00030.
    const numbers = evaluateModel({
      hubble: 67.36,
      baryonDensity: 0.02237,
      coldMatterDensity: 0.12,
      neutrinos: { effectiveNumber: 3.046 },
      conventions: { constants: "codata2018" },
    });
    expect(Math.abs(numbers.value("matterFractionTimesCubedHubble") - 0.09633)).toBeLessThan(0.00004);
  });
});
