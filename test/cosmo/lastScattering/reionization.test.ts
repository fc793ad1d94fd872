import { describe, expect, it } from "vitest";
import type { ModelGivens } from "../../../cosmo/model";
import { reionizationProfile } from "../../../cosmo/recombination";
import { evaluateModel } from "../../../cosmo/solve";

const bestFit: ModelGivens = {
  hubble: 67.32,
  baryonDensity: 0.022383,
  coldMatterDensity: 0.12011,
  neutrinos: { effectiveNumber: 3.046 },
  conventions: { constants: "codata2018", closure: "radiationOnTop" },
};

describe("reionization", () => {
  it("gives z_re 7.679 for tau 0.0543, and back", () => {
    // Planck 2018 VI, table 1 prints 7.68; one parameter point.
    const z = evaluateModel({ ...bestFit, reionizationDepth: 0.0543 }).value("reionizationRedshift");
    expect(z).toBeCloseTo(7.679, 3);
    const depth = evaluateModel({ ...bestFit, reionizationRedshift: z }).value("reionizationDepth");
    expect(depth / 0.0543 - 1).toBeCloseTo(0, 10);
  });

  it("the profile is half of 1 + f_He at z_re, 1 + 2 f_He today, nothing at z = 20 (Lewis 2008)", () => {
    expect(reionizationProfile(8, 8, 0.08)).toBeCloseTo(0.54, 6);
    expect(reionizationProfile(0, 8, 0.08)).toBeCloseTo(1.16, 6);
    expect(reionizationProfile(20, 8, 0.08)).toBeLessThan(1e-12);
  });

  it("ionizedFraction is the residue plus the profile; without reionization stated it is the residue and says so", () => {
    const with_ = evaluateModel({ ...bestFit, reionizationRedshift: 7.5 });
    expect(with_.value("ionizedFraction", 0) - with_.value("residualIonizedFraction", 0)).toBeCloseTo(1.163, 2);
    const without = evaluateModel(bestFit).quantity("ionizedFraction", 3);
    expect(without.notes.map((note) => note.text)).toContain("no reionization stated: recombination alone");
    expect(() => evaluateModel(bestFit).value("reionizationDepth")).toThrow(
      "reionizationDepth: this model states no reionization",
    );
  });

  it("does not move last scattering", () => {
    const a = evaluateModel(bestFit).value("lastScatteringRedshift");
    expect(evaluateModel({ ...bestFit, reionizationDepth: 0.1 }).value("lastScatteringRedshift")).toBe(a);
  });

  it("refuses depths that no profile reaches", () => {
    expect(() => evaluateModel({ ...bestFit, reionizationDepth: 3 }).value("reionizationRedshift")).toThrow(
      /^reionization: reionizationDepth must lie between .* in this model, got 3$/,
    );
    expect(() => evaluateModel({ ...bestFit, reionizationRedshift: 49 }).value("reionizationDepth")).toThrow(
      "reionization: reionizationRedshift must be below 45, got 49",
    );
  });
});
