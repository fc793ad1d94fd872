import { describe, expect, it } from "vitest";
import {
  aubourgOf,
  briedenOf,
  eisensteinHuDragRedshiftOf,
  eisensteinHuSoundHorizonOf,
  huSugiyamaOf,
} from "../../../cosmo/fits";
import type { ConventionGivens } from "../../../cosmo/model";
import { evaluateModel } from "../../../cosmo/solve";
import { plain, relative } from "../exactModels";

const withConventions = (conventions: ConventionGivens, more: object = {}) =>
  evaluateModel({ ...plain, ...more, conventions });
const full = evaluateModel(plain);

describe("conventions.lastScattering: huSugiyama1996", () => {
  const numbers = withConventions({ lastScattering: "huSugiyama1996" });

  it("puts z_* at the fit and everything that hangs on z_* behind it", () => {
    const z = huSugiyamaOf(numbers.model);
    expect(relative(numbers.value("lastScatteringRedshift"), z)).toBeLessThan(1e-14);
    expect(relative(numbers.value("lastScatteringSoundHorizon"), full.value("soundHorizon", z))).toBeLessThan(1e-13);
    const angle = (100 * full.value("soundHorizon", z)) / full.value("transverseDistance", z);
    expect(relative(numbers.value("acousticAngle"), angle)).toBeLessThan(1e-13);
    expect(relative(numbers.value("acousticMultipole"), (100 * Math.PI) / angle)).toBeLessThan(1e-13);
    const shift = Math.sqrt(full.value("matterFraction")) * (67.4 / 299792.458) * full.value("transverseDistance", z);
    expect(relative(numbers.value("shiftParameter"), shift)).toBeLessThan(1e-13);
    // The fit lies 0.18% high: theta_* falls by 0.11%.
    expect(numbers.value("acousticAngle") / full.value("acousticAngle") - 1).toBeCloseTo(-0.0012, 3);
  });

  it("takes k_D from the full history to that z_*", () => {
    // Earlier last scattering leaves less time to diffuse: k_D rises, by about 1.6 times the shift in 1+z or more.
    const ratio = numbers.value("dampingWavenumber") / full.value("dampingWavenumber");
    expect(ratio).toBeGreaterThan(1.003);
    expect(ratio).toBeLessThan(1.02);
    const damping = numbers.quantity("dampingWavenumber");
    expect(damping.sources).toContain("thisProjectCalibration");
    expect(damping.sources).toContain("huSugiyama1996");
    expect(damping.method).toContain("z_* by the fit of Hu & Sugiyama 1996");
  });

  it("leaves the visibility function, z_drag and r_drag alone", () => {
    for (const name of ["visibilityPeakRedshift", "visibilityWidth", "dragRedshift", "dragSoundHorizon"]) {
      expect(numbers.value(name), name).toBe(full.value(name));
    }
  });

  it("says so in method, notes and sources, and no longer names recombination", () => {
    const value = numbers.quantity("acousticAngle");
    expect(value.method).toBe("ratio; z_* by the fit of Hu & Sugiyama 1996, eq. E-1 (conventions.lastScattering)");
    expect(value.sources).toContain("huSugiyama1996");
    expect(value.sources).not.toContain("thisProjectCalibration");
    expect(value.notes.map((note) => note.text).join()).toContain(
      "fit of Hu & Sugiyama 1996, eq. E-1, stated to about 1%",
    );
    expect(value.notes.map((note) => note.text).join()).not.toContain("tier");
    expect(value.error).toBeLessThan(1e-12 * value.value);
    expect(numbers.evaluation.computedParts()).toContain("last scattering");
    expect(full.quantity("acousticAngle").method).toBe("ratio, z_* from the full computation");
  });

  it("warns outside the fit's domain", () => {
    const far = withConventions({ lastScattering: "huSugiyama1996" }, { coldMatterDensity: 0.7 });
    const warning = far.quantity("acousticAngle").notes.find((note) => note.level === "warning");
    expect(warning?.text).toMatch(/^fit of Hu & Sugiyama 1996, eq. E-1 outside its domain: ω_m = 0.723/);
  });

  it("needs no recombination", () => {
    const alone = withConventions({ lastScattering: "huSugiyama1996", drag: "eisensteinHu1998" });
    alone.value("acousticAngle");
    alone.value("dragSoundHorizon");
    expect(alone.evaluation.computedParts()).not.toContain("ionization history");
  });
});

describe("conventions.drag and conventions.soundHorizon: eisensteinHu1998", () => {
  it("both give the paper's r_drag, z_drag alone the integral to the fit's redshift", () => {
    const both = withConventions({ drag: "eisensteinHu1998", soundHorizon: "eisensteinHu1998" });
    const z = eisensteinHuDragRedshiftOf(both.model);
    expect(relative(both.value("dragRedshift"), z)).toBeLessThan(1e-14);
    expect(relative(both.value("dragSoundHorizon"), eisensteinHuSoundHorizonOf(both.model, z))).toBeLessThan(1e-13);
    expect(relative(both.value("dragSoundHorizon"), both.value("dragSoundHorizon.eisensteinHu1998"))).toBeLessThan(
      1e-13,
    );
    expect(both.quantity("dragSoundHorizon").method).toBe(
      "z_drag by the fit of Eisenstein & Hu 1998, eqs 2 to 7 (conventions.drag); r_s by the fit of Eisenstein & Hu 1998, eqs 2 to 7 (conventions.soundHorizon)",
    );
    const alone = withConventions({ drag: "eisensteinHu1998" });
    expect(relative(alone.value("dragSoundHorizon"), full.value("soundHorizon", z))).toBeLessThan(1e-13);
    expect(alone.value("dragSoundHorizonTimesReducedHubble")).toBeCloseTo(alone.value("dragSoundHorizon") * 0.674, 11);
  });

  it("the closed form serves soundHorizon(z) at every redshift above 0", () => {
    const numbers = withConventions({ soundHorizon: "eisensteinHu1998" });
    expect(numbers.value("soundHorizon", 1020)).toBe(eisensteinHuSoundHorizonOf(numbers.model, 1020));
    expect(() => numbers.value("soundHorizon", 0)).toThrow(
      "soundHorizon: redshift must be above 0 in the closed form of Eisenstein & Hu 1998 (conventions.soundHorizon), got 0",
    );
    // theta_* goes with it; near Planck's parameters the closed form is within 1% of the integral.
    const ratio = numbers.value("acousticAngle") / full.value("acousticAngle");
    expect(Math.abs(ratio - 1)).toBeLessThan(0.01);
    expect(ratio).not.toBe(1);
    expect(numbers.quantity("soundHorizon", 1020).sources).toContain("eisensteinHu1998");
    expect(numbers.quantity("soundHorizon", 1020).notes[0]!.text).toContain("fit of Eisenstein & Hu 1998");
  });
});

describe("conventions.soundHorizon: aubourg2015 and brieden2023", () => {
  it("give r_drag directly and nothing else", () => {
    for (const [soundHorizon, published, source] of [
      ["aubourg2015", aubourgOf, "aubourg2015"],
      ["brieden2023", briedenOf, "brieden2023"],
    ] as const) {
      const numbers = withConventions({ soundHorizon, drag: "eisensteinHu1998" });
      const value = numbers.quantity("dragSoundHorizon");
      expect(value.value).toBe(published(numbers.model));
      expect(value.sources).toContain(source);
      // z_drag has no part in it.
      expect(value.method).not.toContain("z_drag");
      expect(value.notes.some((note) => note.text.startsWith("fit of"))).toBe(true);
      expect(numbers.value("soundHorizon", 1059)).toBe(full.value("soundHorizon", 1059));
      expect(numbers.value("acousticAngle")).toBe(full.value("acousticAngle"));
    }
  });

  it("an unknown convention is refused with the one that was meant", () => {
    expect(() => withConventions({ soundHorizon: "aubourg2014" as "aubourg2015" })).toThrow(
      'model: "aubourg2014" is not a known value of conventions.soundHorizon',
    );
  });
});
