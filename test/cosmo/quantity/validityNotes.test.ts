import { describe, expect, it } from "vitest";
import type { ModelGivens } from "../../../cosmo/model";
import { findQuantity } from "../../../cosmo/quantities";
import { computeWithNotes } from "../../../cosmo/quantity";
import { evaluateModel } from "../../../cosmo/solve";
import { plain } from "../exactModels";

const notesOf = (more: Partial<ModelGivens>, name: string, ...values: number[]) =>
  evaluateModel({ ...plain, ...more }).quantity(name, ...values).notes;
const textsOf = (more: Partial<ModelGivens>, name: string, ...values: number[]) =>
  notesOf(more, name, ...values).map((note) => note.text);

describe("validity notes", () => {
  it("radiation neglected is said by every number that stands on the expansion, and by no other", () => {
    for (const [name, ...z] of [["age"], ["hubbleRate", 1], ["luminosityDistance", 1], ["accelerationRedshift"]] as [
      string,
      ...number[],
    ][]) {
      expect(textsOf({ photonTemperature: 0 }, name, ...z).join(), name).toContain(
        "radiation neglected (photonTemperature 0)",
      );
      expect(textsOf({}, name, ...z).join(), name).not.toContain("radiation neglected");
    }
    expect(textsOf({ photonTemperature: 0 }, "matterFraction")).toEqual([]);
  });

  it("the sizes in that note are those of a model with radiation", () => {
    const numbers = evaluateModel({ ...plain, neutrinos: { masses: [] } });
    expect(numbers.value("radiationFractionAt", 0)).toBeCloseTo(9e-5, 5);
    expect(numbers.value("radiationFractionAt", 10)).toBeCloseTo(3e-3, 3);
    expect(numbers.value("radiationFractionAt", 3400)).toBeCloseTo(0.5, 2);
  });

  it("dark energy that matters before last scattering is said with its size, from 1e-4 of the density on", () => {
    const early = { darkEnergy: { w0: -0.9, wa: 0.8 } };
    for (const name of ["lastScatteringRedshift", "acousticAngle", "dragSoundHorizon", "dampingWavenumber"]) {
      const note = notesOf(early, name).find((each) =>
        each.text.startsWith("dark energy matters before last scattering"),
      );
      expect(note, name).toBeDefined();
      const percent = Number(/: ([\d.]+)% of the density at z = (\d+)/.exec(note!.text)![1]);
      const share = evaluateModel({ ...plain, ...early }).value("darkEnergyFractionAt", 1000);
      expect(percent / 100 / share).toBeCloseTo(1, 1);
      expect(note!.level).toBe(share > 0.01 ? "warning" : "note");
    }
    expect(textsOf(early, "soundHorizon", 1060).join()).toContain("dark energy matters");
    expect(textsOf(early, "age").join()).not.toContain("dark energy matters");
    expect(textsOf({ darkEnergy: { w0: -0.9, wa: 0.3 } }, "acousticAngle").join()).not.toContain("dark energy matters");
    expect(textsOf({}, "acousticAngle").join()).not.toContain("dark energy matters");
  });

  it("massive neutrinos that are slow near equality are said with their excess of energy", () => {
    const heavy = { neutrinos: { masses: [0.6] } };
    const note = notesOf(heavy, "equalityRedshift").find((each) => each.text.startsWith("massive neutrinos"));
    // rho(y)/rho(0) = 1 + 5 y^2/(7 pi^2) - ..., y = 0.6 eV/(k 1.9525 K 3400) = 1.05 for small y: 8.0% less the next order.
    const percent = Number(/carries ([\d.]+)% more/.exec(note!.text)![1]);
    expect(percent).toBeGreaterThan(6.5);
    expect(percent).toBeLessThan(8.1);
    expect(note!.text).toContain("one of 0.6 eV");
    for (const name of ["equalityWavenumber", "equalityHorizonAngle", "equalitySoundAngle"]) {
      expect(textsOf(heavy, name).join(), name).toContain("no longer fully relativistic");
    }
    expect(textsOf({}, "equalityRedshift").join()).not.toContain("no longer");
  });

  it("Saha equilibrium is said with the size of its departure at the redshift that was asked", () => {
    const saha = { recombination: "saha" as const };
    const late = notesOf(saha, "residualIonizedFraction", 1100)[0]!;
    expect(late.level).toBe("warning");
    const [, equilibrium, kinetic, factor] =
      /x_e is ([\d.e-]+) where the three-level atom \(peebles\) has ([\d.]+), ([\d.]+) times too low/.exec(late.text)!;
    const numbers = evaluateModel({ ...plain, ...saha });
    const peebles = evaluateModel({ ...plain, recombination: "peebles" });
    expect(Number(equilibrium) / numbers.value("residualIonizedFraction", 1100)).toBeCloseTo(1, 2);
    expect(Number(kinetic) / peebles.value("residualIonizedFraction", 1100)).toBeCloseTo(1, 2);
    expect((Number(factor) * Number(equilibrium)) / Number(kinetic)).toBeCloseTo(1, 1);
    const early = notesOf(saha, "residualIonizedFraction", 1750)[0]!;
    expect(early.level).toBe("note");
    expect(early.text).toMatch(/^Saha equilibrium at z = 1750: x_e within 0\.01% of the three-level atom/);
    expect(notesOf(saha, "lastScatteringRedshift")[0]!.text).toContain("hydrogen has left equilibrium");
    expect(notesOf(saha, "opticalDepth", 1750)[0]!.level).toBe("note");
  });

  it("computeWithNotes gives the value of a quantity with all its notes", () => {
    const numbers = evaluateModel({ ...plain, photonTemperature: 0 });
    const definition = findQuantity("age", "test");
    const { value, notes } = computeWithNotes(definition, numbers.evaluation);
    expect(value).toBe(numbers.value("age"));
    expect(notes).toEqual(numbers.quantity("age").notes);
  });
});

describe("Evaluation.watch(work)", () => {
  it("tells the parts that work stood on, also where they were computed before", () => {
    const { evaluation } = evaluateModel(plain);
    const age = findQuantity("age", "test");
    const first = evaluation.watch(() => age.compute(evaluation, [])).parts.map((part) => part.name);
    const second = evaluation.watch(() => age.compute(evaluation, [])).parts.map((part) => part.name);
    expect(first).toContain("expansion");
    // What the expansion stood on itself.
    expect(first).toContain("dark energy");
    expect([...second].sort()).toEqual([...first].sort());
    const density = findQuantity("photonDensity", "test");
    expect(evaluation.watch(() => density.compute(evaluation, [])).parts).toEqual([]);
  });
});
