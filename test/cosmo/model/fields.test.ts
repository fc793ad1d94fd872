import { describe, expect, it } from "vitest";
import { modelFields, validateGivens } from "../../../cosmo/model";
import { closeModel } from "../../../cosmo/solve";
import { plain } from "../exactModels";

describe("validateGivens(givens)", () => {
  it("flattens nested groups with dots and leaves undefined out", () => {
    const flat = validateGivens(
      { hubble: 70, darkEnergy: { w0: -0.9, wa: undefined }, neutrinos: { masses: [0.06, 0] }, helium: undefined },
      "model",
    );
    expect([...flat.entries()]).toEqual([
      ["hubble", 70],
      ["darkEnergy.w0", -0.9],
      ["neutrinos.masses", [0.06, 0]],
    ]);
  });
});

describe("every field of a model", () => {
  it("is read by closeModel: none is accepted and then ignored", () => {
    const other: Record<string, unknown> = {
      hubble: 70,
      reducedHubble: 0.7,
      baryonDensity: 0.021,
      baryonFraction: 0.05,
      coldMatterDensity: 0.11,
      coldMatterFraction: 0.25,
      matterDensity: 0.14,
      matterFraction: 0.3,
      curvature: 0.01,
      darkEnergyDensity: 0.3,
      darkEnergyFraction: 0.7,
      "darkEnergy.w0": -0.9,
      "darkEnergy.wa": 0.1,
      "darkEnergy.equation": { text: "-0.9", variable: "z", evaluate: () => -0.9 },
      "darkEnergy.table": { redshifts: [0, 1], values: [-1, -0.9] },
      "neutrinos.effectiveNumber": 3.2,
      "neutrinos.masses": [0.1],
      "neutrinos.massSum": 0.2,
      "neutrinos.ordering": "degenerate",
      photonTemperature: 2.7,
      helium: 0.25,
      reionizationRedshift: 8,
      reionizationDepth: 0.06,
      recombination: "peebles",
      scalarSpectralIndex: 0.97,
      "conventions.constants": "codata2014",
      "conventions.closure": "radiationOnTop",
      "conventions.equalityMatter": "allMatter",
      "conventions.lastScattering": "huSugiyama1996",
      "conventions.drag": "eisensteinHu1998",
      "conventions.soundHorizon": "brieden2023",
    };
    const excluded: Record<string, string[]> = {
      reducedHubble: ["hubble"],
      baryonFraction: ["baryonDensity"],
      coldMatterFraction: ["coldMatterDensity"],
      matterDensity: ["coldMatterDensity"],
      matterFraction: ["coldMatterDensity"],
    };
    for (const field of modelFields) {
      expect(other, field.name).toHaveProperty([field.name]);
      const base: Record<string, unknown> = { ...plain };
      if (field.name === "neutrinos.ordering") base["neutrinos"] = { massSum: 0.2 };
      for (const name of excluded[field.name] ?? []) delete base[name];
      const [group, inner] = field.name.split(".") as [string, string | undefined];
      const changed =
        inner === undefined
          ? { ...base, [group]: other[field.name] }
          : { ...base, [group]: { ...(base[group] as object | undefined), [inner]: other[field.name] } };
      const before = field.name in excluded ? plain : base;
      const { givens: _one, ...closedBefore } = closeModel(before as never);
      const { givens: _two, ...closedAfter } = closeModel(changed as never);
      expect(closedAfter, field.name).not.toEqual(closedBefore);
    }
  });
});
