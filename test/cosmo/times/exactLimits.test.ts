import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import {
  deSitter,
  einsteinDeSitter,
  flatLambda,
  hubbleDistance70,
  hubbleTime70,
  matterAndCurvature,
  milne,
  relative,
  withoutRadiation,
} from "../exactModels";

// Bound of the issue for exact limits: 1e-12. Measured 9.9e-15 at most, over all checks of this file.
const bound = 1e-13;

describe("age and ageAt(z)", () => {
  it("are 2/(3 H0) (1+z)^-3/2 in an Einstein-de Sitter model", () => {
    expect(relative(einsteinDeSitter().value("age"), (2 / 3) * hubbleTime70)).toBeLessThan(bound);
    for (const z of [-0.9, 0.5, 1100, 1e9]) {
      const expected = (2 / 3) * hubbleTime70 * (1 + z) ** -1.5;
      expect(relative(einsteinDeSitter().value("ageAt", z), expected)).toBeLessThan(bound);
    }
  });

  it("are 1/[H0 (1+z)] in a Milne model", () => {
    for (const z of [0, 3, 1100]) {
      expect(relative(milne().value("ageAt", z), hubbleTime70 / (1 + z))).toBeLessThan(bound);
    }
  });

  it("are (2/3 H0) Omega_L^-1/2 asinh sqrt(Omega_L/Omega_m a^3) in a flat model of matter and a cosmological constant", () => {
    for (const matter of [0.05, 0.3, 0.9]) {
      for (const z of [0, 0.5, 10]) {
        const ratio = (1 - matter) / matter / (1 + z) ** 3;
        const expected = ((2 / 3) * hubbleTime70 * Math.asinh(Math.sqrt(ratio))) / Math.sqrt(1 - matter);
        expect(relative(flatLambda(matter).value("ageAt", z), expected)).toBeLessThan(bound);
      }
    }
  });

  it("are (pi/2 - 1)/H0 in a closed model of matter with Omega_m = 2", () => {
    expect(relative(matterAndCurvature(2).value("age"), (Math.PI / 2 - 1) * hubbleTime70)).toBeLessThan(bound);
  });

  it("are infinite in a de Sitter model, which is refused", () => {
    expect(() => deSitter().value("age")).toThrow(
      "age: without matter and radiation this model has no finite age: the integral from a = 0 diverges",
    );
  });
});

describe("a flat model of matter and radiation", () => {
  const radiation = evaluateModel({
    hubble: 70,
    baryonDensity: 0.02,
    coldMatterDensity: 0.1,
    neutrinos: { masses: [] },
  }).value("radiationFraction");
  const numbers = evaluateModel({
    hubble: 70,
    baryonFraction: 0.05,
    matterFraction: 1 - radiation,
    darkEnergyFraction: 0,
    neutrinos: { masses: [] },
  });
  const matter = 1 - radiation;
  const equal = radiation / matter;

  it("has c eta = 2 D_H Omega_m^-1/2 [sqrt(a + a_eq) - sqrt a_eq]", () => {
    expect(numbers.value("curvature")).toBe(0);
    for (const z of [0, 10, 1100, 1e5, 1e8]) {
      const a = 1 / (1 + z);
      // The difference of roots without cancellation.
      const expected = (2 * hubbleDistance70 * a) / Math.sqrt(matter) / (Math.sqrt(a + equal) + Math.sqrt(equal));
      expect(relative(numbers.value("conformalTime", z), expected), `z = ${z}`).toBeLessThan(bound);
      expect(relative(numbers.value("particleHorizon", z), expected), `z = ${z}`).toBeLessThan(bound);
    }
  });

  it("has t = (2/3 H0) Omega_m^-1/2 [(a - 2 a_eq) sqrt(a + a_eq) + 2 a_eq^1.5]", () => {
    for (const z of [0, 10, 1100]) {
      const a = 1 / (1 + z);
      const bracket = (a - 2 * equal) * Math.sqrt(a + equal) + 2 * equal ** 1.5;
      const expected = ((2 / 3) * hubbleTime70 * bracket) / Math.sqrt(matter);
      expect(relative(numbers.value("ageAt", z), expected), `z = ${z}`).toBeLessThan(bound);
    }
  });
});

describe("conformalTime(z)", () => {
  it("is 2 D_H (1+z)^-1/2 in an Einstein-de Sitter model", () => {
    for (const z of [-0.5, 0, 3, 1100]) {
      expect(
        relative(einsteinDeSitter().value("conformalTime", z), (2 * hubbleDistance70) / Math.sqrt(1 + z)),
      ).toBeLessThan(bound);
    }
  });

  it("diverges in a Milne model, which is refused", () => {
    expect(() => milne().value("conformalTime", 0)).toThrow(
      "conformalTime: without matter and radiation this model has no finite conformal time since a = 0: the integral from a = 0 diverges",
    );
    expect(() => milne().value("particleHorizon", 0)).toThrow("particleHorizon: without matter and radiation");
  });
});

describe("lookbackTime(z) and lightTravelDistance(z)", () => {
  it("are (2/3 H0) [1 - (1+z)^-3/2] in an Einstein-de Sitter model, at z = 1e-6 as well as at 1100", () => {
    for (const z of [-0.75, 1e-6, 0.5, 1100]) {
      const share = (-2 / 3) * Math.expm1(-1.5 * Math.log1p(z));
      expect(relative(einsteinDeSitter().value("lookbackTime", z), hubbleTime70 * share)).toBeLessThan(bound);
      expect(relative(einsteinDeSitter().value("lightTravelDistance", z), hubbleDistance70 * share)).toBeLessThan(
        bound,
      );
    }
  });

  it("are ln(1+z)/H0 in a de Sitter model", () => {
    expect(relative(deSitter().value("lookbackTime", 6), hubbleTime70 * Math.log(7))).toBeLessThan(bound);
    expect(relative(deSitter().value("lookbackTime", 1, 6), hubbleTime70 * Math.log(3.5))).toBeLessThan(bound);
  });
});

describe("eventHorizon(z)", () => {
  it("is D_H (1+z) in a de Sitter model, in the past and in the future", () => {
    for (const z of [-0.999, -0.5, 0, 3, 1100]) {
      expect(relative(deSitter().value("eventHorizon", z), hubbleDistance70 * (1 + z)), `z = ${z}`).toBeLessThan(bound);
    }
  });

  it("is D_H (1+z)^p/p, p = -(1 + 3w)/2, with dark energy alone, however slowly it converges", () => {
    for (const w0 of [-1.3, -0.7, -0.4, -0.34]) {
      const p = -(1 + 3 * w0) / 2;
      const numbers = withoutRadiation({ coldMatterFraction: 0, darkEnergy: { w0 } });
      for (const z of [-0.9, 0, 2]) {
        const expected = (hubbleDistance70 * (1 + z) ** p) / p;
        expect(relative(numbers.value("eventHorizon", z), expected), `w0 ${w0}, z ${z}`).toBeLessThan(bound);
      }
    }
  });

  it("is D_H e^(1.5 wa) E_1(1.5 wa) today with dark energy alone and 1 + w0 + wa = 2/3", () => {
    // Then H = H0 e^(-1.5 wa (1-a))/a, and the integral is the exponential integral; E_1(1) from Abramowitz & Stegun, table 5.1 (memory).
    const wa = 2 / 3;
    const numbers = withoutRadiation({ coldMatterFraction: 0, darkEnergy: { w0: 2 / 3 - 1 - wa, wa } });
    const expected = hubbleDistance70 * Math.E * 0.2193839343955203;
    expect(relative(numbers.value("eventHorizon", 0), expected)).toBeLessThan(bound);
  });
});
