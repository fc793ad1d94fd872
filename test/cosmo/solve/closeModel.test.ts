import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { ModelGivens } from "../../../cosmo/model";
import { closeModel } from "../../../cosmo/solve";
import { plain, relative } from "../exactModels";
import { chainModels } from "../randomModels";

const base = closeModel({ ...plain, curvature: 0.02 });

const hubbles: ModelGivens[] = [{ hubble: base.hubble }, { reducedHubble: base.reducedHubble }];
const baryons: ModelGivens[] = [{ baryonDensity: base.baryonDensity }, { baryonFraction: base.baryonFraction }];
const matters: ModelGivens[] = [
  { coldMatterDensity: base.coldMatterDensity },
  { coldMatterFraction: base.coldMatterFraction },
  { matterDensity: base.matterDensity },
  { matterFraction: base.matterFraction },
];
const closers: ModelGivens[] = [
  { curvature: base.curvature },
  { darkEnergyDensity: base.darkEnergyDensity },
  { darkEnergyFraction: base.darkEnergyFraction },
];

describe("closeModel(givens)", () => {
  it("reaches the same model from every combination of densities and fractions", () => {
    let combinations = 0;
    for (const hubble of hubbles)
      for (const baryon of baryons)
        for (const matter of matters)
          for (const closer of closers) {
            const givens = { ...hubble, ...baryon, ...matter, ...closer };
            const model = closeModel(givens);
            for (const field of [
              "hubble",
              "reducedHubble",
              "baryonDensity",
              "baryonFraction",
              "coldMatterDensity",
              "coldMatterFraction",
              "matterDensity",
              "matterFraction",
              "neutrinoDensity",
              "darkEnergyDensity",
              "darkEnergyFraction",
            ] as const) {
              // Measured 5e-16; cold matter from the sum 7e-16.
              expect(relative(model[field], base[field]), `${field} from ${Object.keys(givens)}`).toBeLessThan(1e-14);
            }
            expect(Math.abs(model.curvature - base.curvature)).toBeLessThan(1e-15);
            combinations++;
          }
    expect(combinations).toBe(48);
  });

  it("sums to one: with radiation inside, without it on top", () => {
    fc.assert(
      fc.property(chainModels, (givens) => {
        const model = closeModel(givens);
        const sum = model.matterFraction + model.darkEnergyFraction + model.curvature;
        const inside = model.conventions.closure === "radiationInside";
        expect(Math.abs(sum + (inside ? model.radiationFraction : 0) - 1)).toBeLessThan(1e-15 * 4);
        const parts = model.baryonDensity + model.coldMatterDensity + model.neutrinoDensity;
        expect(relative(model.matterDensity, parts)).toBeLessThan(1e-15 * 4);
      }),
      { numRuns: 100 },
    );
  });

  it("takes its defaults: flat, a cosmological constant, N_eff 3.044, one neutrino of 0.06 eV, 2.7255 K, nucleosynthesis helium", () => {
    const model = closeModel(plain);
    expect(model.curvature).toBe(0);
    expect(model.darkEnergy).toEqual({ w0: -1, wa: 0 });
    expect(model.neutrinos.effectiveNumber).toBe(3.044);
    expect(model.neutrinos.masses).toEqual([0.06]);
    expect(model.photonTemperature).toBe(2.7255);
    expect(model.heliumSource).toBe("nucleosynthesis");
    expect(model.recombination).toBe("calibrated");
    expect(model.conventions).toEqual({
      constants: "codata2022",
      closure: "radiationInside",
      equalityMatter: "baryonsAndCold",
      lastScattering: "full",
      drag: "full",
      soundHorizon: "full",
    });
  });

  it("gives photons omega = 2.473e-5 at 2.7255 K", () => {
    // Planck 2018 VI and common practice: omega_gamma = 2.4728e-5 (T/2.7255 K)^4.
    expect(closeModel(plain).photonDensity.toExponential(3)).toBe("2.473e-5");
  });

  it("does not take rounding for curvature: fractions that sum to one are flat", () => {
    const flat = closeModel(plain);
    const again = closeModel({ ...plain, darkEnergyFraction: flat.darkEnergyFraction });
    expect(again.curvature).toBe(0);
  });

  it("leaves radiation and neutrinos out at temperature 0, and massless neutrinos out of the matter", () => {
    const cold = closeModel({ ...plain, photonTemperature: 0 });
    expect(cold.radiationDensity).toBe(0);
    expect(cold.neutrinos.masses).toEqual([]);
    const massless = closeModel({ ...plain, neutrinos: { masses: [0, 0, 0] } });
    expect(massless.neutrinoDensity).toBe(0);
    expect(
      relative(massless.radiationDensity, massless.photonDensity + 3 * massless.neutrinos.masslessSpeciesDensity),
    ).toBeLessThan(1e-15);
  });

  it("gives light neutrinos the density of radiation and heavy ones that of m/93.14 eV at N_eff = 3.044", () => {
    // Mangano et al. 2005 (hep-ph/0506164): sum m/93.14 eV for N_eff 3.046 with its own spectrum; within 1% of any spectrum.
    const heavy = closeModel({ ...plain, neutrinos: { masses: [0.2, 0.2, 0.2] } });
    expect(relative(heavy.neutrinoDensity, 0.6 / 93.14)).toBeLessThan(0.01);
    const light = closeModel({ ...plain, neutrinos: { masses: [1e-9] } });
    expect(relative(light.neutrinoDensity, light.neutrinos.masslessSpeciesDensity)).toBeLessThan(1e-9);
  });
});
