import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { einsteinDeSitter, plain, relative, withoutRadiation } from "../exactModels";
import { chainModels } from "../randomModels";

describe("hubbleRate(z)", () => {
  it("is H0 (1+z)^1.5 in an Einstein-de Sitter model", () => {
    for (const z of [-0.9, 0, 0.5, 3, 1000]) {
      expect(relative(einsteinDeSitter().value("hubbleRate", z), 70 * (1 + z) ** 1.5)).toBeLessThan(1e-14);
    }
  });

  it("is H0 today when radiation counts inside the closure, H0 sqrt(1 + Omega_r) when it stands on top", () => {
    const inside = evaluateModel(plain);
    expect(relative(inside.value("hubbleRate", 0), 67.4)).toBeLessThan(1e-14);
    const onTop = evaluateModel({ ...plain, conventions: { closure: "radiationOnTop" } });
    const expected = 67.4 * Math.sqrt(1 + onTop.value("radiationFraction"));
    expect(relative(onTop.value("hubbleRate", 0), expected)).toBeLessThan(1e-14);
    expect(onTop.value("hubbleRate", 0)).toBeGreaterThan(67.4 * (1 + 1e-5));
  });

  it("follows w0 and wa: f = a^(-3(1+w0+wa)) e^(-3 wa (1-a))", () => {
    // Chevallier & Polarski 2001; Linder 2003.
    const numbers = withoutRadiation({ coldMatterFraction: 0, darkEnergy: { w0: -0.8, wa: 0.3 } });
    const growth = 2 ** (3 * 0.5) * Math.exp(-0.9 * 0.5);
    expect(relative(numbers.value("hubbleRate", 1), 70 * Math.sqrt(growth))).toBeLessThan(1e-14);
  });
});

describe("densities at z", () => {
  it("matter, radiation, curvature and dark energy sum to one at every redshift, under both closures", () => {
    fc.assert(
      fc.property(chainModels, fc.double({ min: -0.5, max: 5000, noNaN: true }), (givens, z) => {
        const numbers = evaluateModel(givens);
        const sum =
          numbers.value("matterFractionAt", z) +
          numbers.value("radiationFractionAt", z) +
          numbers.value("curvatureFractionAt", z) +
          numbers.value("darkEnergyFractionAt", z);
        expect(Math.abs(sum - 1)).toBeLessThan(1e-14);
        const matter =
          numbers.value("baryonFractionAt", z) +
          numbers.value("coldMatterFractionAt", z) +
          numbers.value("neutrinoFractionAt", z);
        expect(relative(matter, numbers.value("matterFractionAt", z))).toBeLessThan(1e-14);
        expect(numbers.value("photonFractionAt", z)).toBeLessThanOrEqual(numbers.value("radiationFractionAt", z));
      }),
      { numRuns: 50 },
    );
  });

  it("at z = 0 are the fractions of the model when radiation counts inside the closure", () => {
    const numbers = evaluateModel(plain);
    for (const name of ["matter", "baryon", "coldMatter", "neutrino", "radiation", "photon", "darkEnergy"]) {
      expect(relative(numbers.value(`${name}FractionAt`, 0), numbers.value(`${name}Fraction`))).toBeLessThan(1e-14);
    }
  });

  it("criticalDensity(0) is 3 H0^2/(8 pi G)", () => {
    // CODATA 2022 G; IAU 2015 parsec.
    const rate = 67.4e3 / ((648000 / Math.PI) * 149597870700 * 1e6);
    const expected = (3 * rate * rate) / (8 * Math.PI * 6.6743e-11);
    expect(relative(evaluateModel(plain).value("criticalDensity", 0), expected)).toBeLessThan(1e-14);
  });
});

describe("decelerationAt(z)", () => {
  it("is (1+z) H'/H - 1, so neutrino pressure is that of their energy", () => {
    fc.assert(
      fc.property(chainModels, fc.double({ min: 0, max: 2000, noNaN: true }), (givens, z) => {
        const numbers = evaluateModel(givens);
        const logRate = (s: number) => Math.log(numbers.value("hubbleRate", (1 + z) * Math.exp(s) - 1));
        const slope = (h: number) => (logRate(h) - logRate(-h)) / (2 * h);
        const derivative = (4 * slope(1e-3) - slope(2e-3)) / 3;
        // Measured 1.4e-12: what the difference quotient loses.
        expect(Math.abs(numbers.value("decelerationAt", z) - (derivative - 1))).toBeLessThan(1e-11);
      }),
      { numRuns: 50 },
    );
  });

  it("is 1/2 with matter alone and -1 with a cosmological constant alone", () => {
    expect(einsteinDeSitter().value("decelerationAt", 7)).toBeCloseTo(0.5, 14);
    expect(withoutRadiation({ coldMatterFraction: 0 }).value("decelerationAt", 7)).toBeCloseTo(-1, 14);
  });
});

describe("equationOfStateAt(z)", () => {
  it("is w0 + wa z/(1+z)", () => {
    const numbers = withoutRadiation({ coldMatterFraction: 0.3, darkEnergy: { w0: -0.8, wa: -0.4 } });
    expect(numbers.value("equationOfStateAt", 0)).toBe(-0.8);
    expect(numbers.value("equationOfStateAt", 1)).toBeCloseTo(-1, 15);
  });
});
