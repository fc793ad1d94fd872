import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { einsteinDeSitter, matterAndCurvature, milne, plain, relative, withoutRadiation } from "../exactModels";
import { chainModels, pastRedshifts } from "../randomModels";

describe("times of any model", () => {
  it("ageAt(z) and conformalTime(z) fall, lookbackTime(z) rises with z", () => {
    fc.assert(
      fc.property(chainModels, pastRedshifts, (givens, z) => {
        const numbers = evaluateModel(givens);
        expect(numbers.value("ageAt", 1.01 * z)).toBeLessThan(numbers.value("ageAt", z));
        expect(numbers.value("conformalTime", 1.01 * z)).toBeLessThan(numbers.value("conformalTime", z));
        expect(numbers.value("lookbackTime", 1.01 * z)).toBeGreaterThan(numbers.value("lookbackTime", z));
      }),
      { numRuns: 40 },
    );
  });

  it("ageAt(z) + lookbackTime(z) = age, conformalTime(z) + comovingDistance(z) = conformalTime(0)", () => {
    fc.assert(
      fc.property(chainModels, fc.double({ min: -0.5, max: 1100, noNaN: true }), (givens, z) => {
        const numbers = evaluateModel(givens);
        const age = numbers.value("age");
        // Measured 1.6e-14: two quadratures in different variables.
        expect(relative(numbers.value("ageAt", z) + numbers.value("lookbackTime", z), age)).toBeLessThan(1e-13);
        const sum = numbers.value("conformalTime", z) + numbers.value("comovingDistance", z);
        expect(relative(sum, numbers.value("conformalTime", 0))).toBeLessThan(1e-13);
      }),
      { numRuns: 40 },
    );
  });

  it("lookbackTime(z1, z2) and lightTravelDistance(z1, z2) are differences", () => {
    fc.assert(
      fc.property(chainModels, pastRedshifts, pastRedshifts, (givens, from, to) => {
        const numbers = evaluateModel(givens);
        for (const name of ["lookbackTime", "lightTravelDistance"]) {
          const expected = numbers.value(name, to) - numbers.value(name, from);
          const scale = Math.max(numbers.value(name, to), numbers.value(name, from));
          expect(Math.abs(numbers.value(name, from, to) - expected)).toBeLessThan(1e-14 * scale);
        }
      }),
      { numRuns: 40 },
    );
  });
});

describe("eventHorizon(z)", () => {
  it("is eventHorizon(0) + comovingDistance(z), before today and after", () => {
    for (const darkEnergy of [{ w0: -1 }, { w0: -0.7 }, { w0: -0.9, wa: 0.4 }, { w0: -1.2 }]) {
      const numbers = evaluateModel({ ...plain, darkEnergy });
      const today = numbers.value("eventHorizon", 0);
      for (const z of [-0.9, -0.3, 0.7, 1100]) {
        const expected = today + numbers.value("comovingDistance", z);
        // Measured 7e-15 of eventHorizon(0), which the sum loses in the far future.
        expect(Math.abs(numbers.value("eventHorizon", z) - expected)).toBeLessThan(1e-13 * Math.max(today, expected));
      }
    }
  });

  it("goes over from wa > 0 to wa = 0 without a step", () => {
    const at = (wa: number) => evaluateModel({ ...plain, darkEnergy: { w0: -1.2, wa } }).value("eventHorizon", 0);
    // Two ways of going to infinity; with w0 below -1 the true difference at wa = 1e-13 is of order wa.
    expect(relative(at(1e-13), at(0))).toBeLessThan(1e-12);
  });

  it("is refused with the reason where it is infinite or there is no far future", () => {
    expect(() => einsteinDeSitter().value("eventHorizon", 0)).toThrow(
      "eventHorizon: the integral to the infinite future diverges, light reaches everything in the end: there is no dark energy to speed the expansion up",
    );
    expect(() => milne().value("eventHorizon", 0)).toThrow("no dark energy");
    const slow = withoutRadiation({ coldMatterFraction: 0.3, darkEnergy: { w0: -1 / 3 } });
    expect(() => slow.value("eventHorizon", 0)).toThrow("with w0 at or above -1/3 the expansion never speeds up");
    const fading = withoutRadiation({ coldMatterFraction: 0.3, darkEnergy: { w0: -1, wa: -0.1 } });
    expect(() => fading.value("eventHorizon", 0)).toThrow("with wa below 0 the dark energy fades in the far future");
    expect(() => matterAndCurvature(2).value("eventHorizon", 0)).toThrow(
      "eventHorizon: this model stops expanding at z = -0.50000000 and falls back, so its future has no a to infinity",
    );
  });
});
