import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { expansionCell } from "../../../kernel-ext/cells";
import { expectCell } from "./expectCell";
import { refusal } from "./refusal";

const base = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };
const numbers = evaluateModel(base);

describe("expansionCell", () => {
  it("shows fractions, H, epochs, conventions and sources", async () => {
    await expectCell("expansionCell", expansionCell(base));
  });

  it("shows a closed model with evolving dark energy", async () => {
    const model = { ...base, curvature: -0.05, darkEnergy: { w0: -0.7, wa: -1 } };
    await expectCell("expansionCellClosed", expansionCell(model, { redshifts: [0, 1, 1089.9] }));
  });

  it("gives the register's digits", () => {
    const { values } = expansionCell(base, { redshifts: [0, 0.5, 1100] });
    expect(Array.from(values.redshift)).toEqual([0, 0.5, 1100]);
    expect(values.hubbleRate[2]).toBe(numbers.value("hubbleRate", 1100));
    expect(values.fractions.darkEnergy[1]).toBe(numbers.value("darkEnergyFractionAt", 0.5));
    expect(values.equalityRedshift).toBe(numbers.value("equalityRedshift"));
    expect(values.equalityWavenumber).toBe(numbers.value("equalityWavenumber"));
    expect(values.accelerationRedshift).toBe(numbers.value("accelerationRedshift"));
    expect(values.age).toBe(numbers.value("age"));
  });

  it("fractions sum to one at every redshift, under both closures and with curvature", () => {
    for (const model of [
      { ...base, curvature: 0.03 },
      { ...base, conventions: { closure: "radiationOnTop" as const } },
    ]) {
      const { fractions } = expansionCell(model).values;
      const sums = fractions.matter.map(
        (matter, i) =>
          matter +
          fractions.radiation[i]! +
          fractions.neutrinos[i]! +
          fractions.darkEnergy[i]! +
          fractions.curvature[i]!,
      );
      // Measured 4e-16.
      for (const sum of sums) expect(Math.abs(sum - 1)).toBeLessThan(4e-15);
    }
  });

  it("the budget today is about 69% dark energy, 26% cold matter, 5% baryons (common practice, no source)", () => {
    const { fractions } = expansionCell(base, { redshifts: [0] }).values;
    expect(Math.round(100 * fractions.darkEnergy[0]!)).toBe(69);
    expect(Math.round(100 * numbers.value("coldMatterFraction"))).toBe(26);
    expect(Math.round(100 * numbers.value("baryonFraction"))).toBe(5);
    expect(fractions.matter[0]).toBeCloseTo(0.31, 2);
  });

  it("z_eq, k_eq and the age lie within the printed errors at the printed means (Planck 2018 VI, table 2)", () => {
    const { values } = expansionCell({ hubble: 67.36, baryonDensity: 0.02237, coldMatterDensity: 0.12 });
    expect(Math.abs(values.equalityRedshift! - 3402)).toBeLessThan(26);
    expect(Math.abs(values.equalityWavenumber! - 0.010384)).toBeLessThan(0.000081);
    expect(Math.abs(values.age! - 13.797)).toBeLessThan(0.023);
  });

  it("a model that never accelerates says so in a note", () => {
    const cell = expansionCell({ ...base, darkEnergyFraction: 0 });
    expect(cell.values.accelerationRedshift).toBeUndefined();
    expect(cell.notes).toContain(
      "accelerationRedshift: the expansion of this model never turns from slowing down to speeding up",
    );
    expect(cell.notes).toContain("dark energy: none in this model, so not drawn");
    expect(cell.charts[0]!.description).not.toContain("z_acc");
  });

  it("acceleration still to come is a note and not a mark", () => {
    const cell = expansionCell({ ...base, darkEnergyFraction: 0.05 });
    expect(cell.values.accelerationRedshift!).toBeLessThan(0);
    expect(cell.notes.join("\n")).toMatch(/this model begins to accelerate in the future, at z = -0\.\d+/);
    expect(cell.charts[0]!.description).not.toContain("z_acc");
  });

  it("a model without radiation has no equality, and says so", () => {
    const cell = expansionCell({ ...base, photonTemperature: 0 });
    expect(cell.values.equalityRedshift).toBeUndefined();
    expect(cell.notes.join("\n")).toContain("this model has no radiation, so matter and radiation were never equal");
  });

  it("a model that bounced is drawn up to its turning point and has no age", () => {
    const bounced = { hubble: 70, baryonDensity: 0.022, coldMatterDensity: 0.02, darkEnergyFraction: 1.8 };
    const cell = expansionCell(bounced);
    expect(cell.values.age).toBeUndefined();
    expect(cell.notes.join("\n")).toMatch(/age: this closed model never had a Big Bang/);
    expect(Math.max(...cell.values.redshift)).toBeLessThan(9);
    expect(refusal(() => expansionCell(bounced, { redshifts: [0.1, 9] }))).toMatch(
      /^hubbleRate: redshift 9 lies beyond the turning point of this closed model: it was never smaller than at z = [\d.]+ \(entry 2 of redshifts\)/,
    );
  });

  const refusals: [title: string, run: () => unknown, text: string][] = [
    [
      "NaN among the redshifts",
      () => expansionCell(base, { redshifts: [0, Number.NaN] }),
      "expansionCell: redshifts must be finite and above -1, got NaN (entry 2)",
    ],
    [
      "an unknown option",
      () => expansionCell(base, { redshift: [1] } as never),
      'expansionCell: "redshift" is not a known option | did you mean "redshifts"?',
    ],
    [
      "a typo in the model",
      () => expansionCell({ ...base, hubbel: 1 } as never),
      'expansionCell: "hubbel" is not a known parameter | did you mean "hubble"?',
    ],
  ];
  for (const [title, run, text] of refusals) {
    it(`refuses ${title}`, () => {
      expect(refusal(run)).toBe(text);
    });
  }
});
