import { describe, expect, it } from "vitest";
import type { ModelGivens } from "../../../cosmo/model";
import { evaluateModel } from "../../../cosmo/solve";

const base: ModelGivens = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };

describe("the acoustic scale", () => {
  const numbers = evaluateModel(base);
  const value = (name: string, ...z: number[]) => numbers.value(name, ...z);

  it("sound goes at c/sqrt(3) while baryons weigh nothing and slower later", () => {
    expect(value("soundSpeed", 1e7)).toBeCloseTo(1 / Math.sqrt(3), 4);
    // R = 31.5 omega_b (T/2.7 K)^-4 (1000/z): Eisenstein & Hu 1998, eq. 5 (memory), printed with three digits.
    const printed = 31.5 * 0.0224 * (2.7255 / 2.7) ** -4 * (1000 / 1090);
    expect(value("baryonLoading", 1089) / printed - 1).toBeCloseTo(0, 2);
  });

  it("the sound horizon in matter and radiation alone is the published closed form", () => {
    // Eisenstein & Hu 1998, eq. 6 (memory): s = (2/(3 k_eq)) sqrt(6/R_eq) ln{[sqrt(1+R) + sqrt(R+R_eq)]/[1 + sqrt(R_eq)]}, exact when
    // matter, photons and massless neutrinos are all there is; here with the model's own k_eq and R.
    const plain = evaluateModel({
      hubble: 67.4,
      baryonDensity: 0.0224,
      coldMatterDensity: 0.12,
      neutrinos: { masses: [] },
      darkEnergyFraction: 0,
      conventions: { closure: "radiationInside" },
    });
    const matter = plain.model.matterDensity;
    const radiation = plain.model.radiationDensity;
    const equality = matter / radiation;
    const loadingAt = (onePlusZ: number) => (3 * 0.0224) / (4 * plain.model.photonDensity * onePlusZ);
    const k = (Math.sqrt(2 * matter * equality) * 100) / 299792.458;
    const z = 1059;
    const [r, rEq] = [loadingAt(1 + z), loadingAt(equality)];
    const log = Math.log((Math.sqrt(1 + r) + Math.sqrt(r + rEq)) / (1 + Math.sqrt(rEq)));
    const published = (2 / (3 * k)) * Math.sqrt(6 / rEq) * log;
    // Curvature (what is left of the budget) enters at (omega_k/omega_m)/(1+z), 2e-3: the formula leaves it out.
    expect(plain.value("soundHorizon", z) / published - 1).toBeCloseTo(0, 3);
  });

  it("theta_*, l_A, R and the damping angle hang together as defined", () => {
    const distance = value("transverseDistance", value("lastScatteringRedshift"));
    expect((100 * value("lastScatteringSoundHorizon")) / distance / value("acousticAngle")).toBeCloseTo(1, 12);
    expect((value("acousticAngle") * value("acousticMultipole")) / (100 * Math.PI)).toBeCloseTo(1, 12);
    const shift = (Math.sqrt(value("matterFraction")) * 67.4 * distance) / 299792.458;
    expect(value("shiftParameter") / shift).toBeCloseTo(1, 12);
    expect((value("dampingAngle") * value("dampingWavenumber") * distance) / (100 * Math.PI)).toBeCloseTo(1, 12);
    expect(value("dragSoundHorizonTimesReducedHubble") / value("dragSoundHorizon")).toBeCloseTo(0.674, 12);
    expect(value("soundHorizon", value("dragRedshift")) / value("dragSoundHorizon")).toBeCloseTo(1, 12);
  });

  it("the sound horizon grows monotonically and r_drag is longer than r_*", () => {
    let before = 0;
    for (let z = 1e6; z > 900; z /= 1.3) {
      const now = value("soundHorizon", z);
      expect(now).toBeGreaterThan(before);
      before = now;
    }
    expect(value("dragSoundHorizon")).toBeGreaterThan(value("lastScatteringSoundHorizon"));
  });

  it("closed geometry enlarges theta_* and open geometry shrinks it", () => {
    // Common practice, no source.
    const angle = (curvature: number) => evaluateModel({ ...base, curvature }).value("acousticAngle");
    expect(angle(-0.02)).toBeGreaterThan(angle(0));
    expect(angle(0.02)).toBeLessThan(angle(0));
  });

  it("more radiation shortens the sound horizon", () => {
    const horizon = (effectiveNumber: number) =>
      evaluateModel({ ...base, neutrinos: { effectiveNumber } }).value("dragSoundHorizon");
    expect(horizon(3.5)).toBeLessThan(horizon(3.044));
  });

  it("equalityMatter allMatter raises z_eq by the neutrinos' share", () => {
    const all = evaluateModel({ ...base, conventions: { equalityMatter: "allMatter" } }).value("equalityRedshift");
    // 0.45% (physics contract of the project; 6.45e-4/0.1424).
    expect((1 + all) / (1 + value("equalityRedshift")) - 1).toBeCloseTo(0.00453, 5);
  });

  it("every history quantity says which tier and sources it rests on", () => {
    const angle = numbers.quantity("acousticAngle");
    expect(angle.sources).toContain("thisProjectCalibration");
    expect(angle.notes.some((note) => note.text.startsWith("calibrated tier"))).toBe(true);
    expect(angle.error).toBeGreaterThan(0);
    expect(angle.error / angle.value).toBeLessThan(1e-8);
  });
});
