import { describe, expect, it } from "vitest";
import { ionizationHistoryPart } from "../../../cosmo/recombination";
import { evaluateModel } from "../../../cosmo/solve";
import { timelineCell } from "../../../kernel-ext/cells";
import { expectCell } from "./expectCell";
import { refusal } from "./refusal";

const base = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };
const reionized = { ...base, reionizationRedshift: 7.68 };
const numbers = evaluateModel(reionized);
const cell = timelineCell(reionized);
const entry = (name: string, from = cell) => {
  const found = from.values.find(({ event }) => event === name);
  if (found === undefined) throw new Error(`no event ${name}`);
  return found;
};

describe("timelineCell", () => {
  it("shows events, conventions and sources", async () => {
    await expectCell("timelineCell", cell);
  });

  it("gives the events earliest first, with age, temperature and redshift in step", () => {
    expect(cell.values.map(({ event }) => event)).toEqual([
      "nucleosynthesis",
      "helium once ionized",
      "matter-radiation equality",
      "helium neutral",
      "hydrogen recombination",
      "last scattering",
      "drag epoch",
      "reionization",
      "acceleration",
      "dark energy equality",
      "today",
    ]);
    for (const { redshift, age, temperature } of cell.values) {
      expect(age).toBe(numbers.value("ageAt", redshift));
      expect(temperature).toBe(numbers.value("radiationTemperature", redshift));
    }
  });

  it("gives the register's redshifts", () => {
    expect(entry("last scattering").redshift).toBe(numbers.value("lastScatteringRedshift"));
    expect(entry("drag epoch").redshift).toBe(numbers.value("dragRedshift"));
    expect(entry("matter-radiation equality").redshift).toBe(numbers.value("equalityRedshift"));
    expect(entry("acceleration").redshift).toBe(numbers.value("accelerationRedshift"));
    expect(entry("reionization").redshift).toBe(7.68);
    expect(entry("today").age).toBeCloseTo(numbers.value("age"), 10);
  });

  it("hydrogen and helium stand where half is ionized", () => {
    const half = numbers.value("residualIonizedFraction", entry("hydrogen recombination").redshift);
    // Measured 3e-15.
    expect(Math.abs(half - 0.5)).toBeLessThan(3e-14);
    const history = numbers.evaluation.once(ionizationHistoryPart);
    const helium = (name: string) => history.helium(Math.log1p(entry(name).redshift));
    expect(helium("helium once ionized").twice).toBeCloseTo(0.5, 12);
    expect(helium("helium neutral").once).toBeCloseTo(0.5, 12);
  });

  it("He++ recombines near z 6000 and He+ near 2000 (common practice, no source)", () => {
    expect(Math.abs(entry("helium once ionized").redshift - 6000)).toBeLessThan(300);
    expect(Math.abs(entry("helium neutral").redshift - 2000)).toBeLessThan(300);
  });

  it("nucleosynthesis at 1e9 K falls three minutes after a = 0 (common practice, no source)", () => {
    const { age, temperature } = entry("nucleosynthesis");
    expect(temperature).toBeCloseTo(1e9, 0);
    const seconds = age * 1e9 * 31557600;
    expect(Math.abs(seconds - 180)).toBeLessThan(15);
  });

  it("last scattering is 370 thousand years old and near 3000 K (common practice, no source)", () => {
    const { age, temperature } = entry("last scattering");
    expect(age * 1e6).toBeGreaterThan(365);
    expect(age * 1e6).toBeLessThan(380);
    expect(temperature).toBeCloseTo(2973, -1);
  });

  it("dark energy equality of a flat model with a constant is (Omega_DE/Omega_m)^(1/3) - 1 (closed form)", () => {
    // Massless neutrinos, so that matter dilutes exactly as a^-3.
    const massless = { ...base, neutrinos: { masses: [] } };
    const { darkEnergyFraction, matterFraction } = evaluateModel(massless).model;
    const { redshift } = entry("dark energy equality", timelineCell(massless));
    // Measured 2e-16.
    expect(Math.abs(redshift / (Math.cbrt(darkEnergyFraction / matterFraction) - 1) - 1)).toBeLessThan(1e-14);
  });

  it("reionization that is not stated is a note, once", () => {
    const { values, notes } = timelineCell(base);
    expect(values.some(({ event }) => event === "reionization")).toBe(false);
    expect(notes.filter((note) => note.startsWith("reionization"))).toEqual([
      "reionization: this model states no reionization",
    ]);
  });

  it("a model without baryons has no recombination, in one note", async () => {
    const empty = timelineCell({ ...base, baryonDensity: 0 });
    expect(empty.values.map(({ event }) => event)).toEqual([
      "nucleosynthesis",
      "matter-radiation equality",
      "acceleration",
      "dark energy equality",
      "today",
    ]);
    expect(empty.notes).toContain(
      "helium once ionized, helium neutral, hydrogen recombination, last scattering, drag epoch: this model has no baryons (baryonDensity 0), so nothing recombines",
    );
    await expectCell("timelineCellDark", empty);
  });

  it("a model without radiation is drawn over 1 + z", async () => {
    const cold = timelineCell({ ...base, photonTemperature: 0 });
    expect(cold.values.map(({ event }) => event)).toEqual(["acceleration", "dark energy equality", "today"]);
    await expectCell("timelineCellCold", cold);
  });

  it("a model that decelerates forever says so", () => {
    const { values, notes } = timelineCell({ ...base, darkEnergyFraction: 0 });
    expect(values.at(-1)!.event).toBe("today");
    expect(notes).toContain("dark energy equality: dark energy is not denser than matter today");
    expect(notes).toContain("acceleration: the expansion of this model never turns from slowing down to speeding up");
  });

  it("acceleration still to come is a note", () => {
    const { notes } = timelineCell({ ...base, darkEnergyFraction: 0.05 });
    expect(notes.join("\n")).toMatch(/^acceleration: still to come, at z = -0\.\d+$/m);
  });

  it("helium of zero is a note", () => {
    expect(timelineCell({ ...base, helium: 0 }).notes).toContain(
      "helium once ionized, helium neutral: this model has no helium (helium is 0)",
    );
  });

  it("refuses a model that never had a Big Bang", () => {
    const bounced = { hubble: 70, baryonDensity: 0.022, coldMatterDensity: 0.02, darkEnergyFraction: 1.8 };
    expect(refusal(() => timelineCell(bounced))).toMatch(
      /^age: this closed model never had a Big Bang: going back, H reaches zero at z = [\d.]+ \| /,
    );
  });

  it("refuses a typo in the model", () => {
    expect(refusal(() => timelineCell({ ...base, hubbel: 1 } as never))).toBe(
      'timelineCell: "hubbel" is not a known parameter | did you mean "hubble"?',
    );
  });
});
