import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { einsteinDeSitter, hubbleTime70, matterAndCurvature, plain } from "../exactModels";
import { chainModels, pastRedshifts } from "../randomModels";

const off = (z: number, expected: number) => Math.abs(z - expected) / (1 + expected);

describe("redshiftAtAge(t), redshiftAtLookbackTime(t) and redshiftAtLightTravelDistance(d)", () => {
  it("undo ageAt, lookbackTime and lightTravelDistance", () => {
    fc.assert(
      fc.property(chainModels, pastRedshifts, (givens, z) => {
        const numbers = evaluateModel(givens);
        expect(off(numbers.value("redshiftAtAge", numbers.value("ageAt", z)), z)).toBeLessThan(1e-12);
        // Looked back upon, high redshifts crowd near the age: a digit of the lookback time costs (age/time left) digits.
        const low = Math.min(z, 10);
        for (const [inverse, forward] of [
          ["redshiftAtLookbackTime", "lookbackTime"],
          ["redshiftAtLightTravelDistance", "lightTravelDistance"],
        ] as const) {
          const back = numbers.quantity(inverse, numbers.value(forward, low));
          expect(off(back.value, low), inverse).toBeLessThan(1e-12);
          expect(off(back.value, low), inverse).toBeLessThanOrEqual(5 * (back.error / (1 + low)) + 1e-14);
        }
      }),
      { numRuns: 30 },
    );
  });

  it("are exact in an Einstein-de Sitter model, in the future as well", () => {
    for (const z of [-0.9, -0.5, 0, 3, 1100, 1e9]) {
      const age = (2 / 3) * hubbleTime70 * (1 + z) ** -1.5;
      expect(off(einsteinDeSitter().value("redshiftAtAge", age), z), `z = ${z}`).toBeLessThan(1e-12);
    }
  });

  it("refuse an age that is never reached", () => {
    const falling = matterAndCurvature(2);
    expect(() => falling.value("redshiftAtAge", 1000)).toThrow(
      "redshiftAtAge: the age 1000 Gyr is not reached before this model stops expanding, at z = -0.50000000",
    );
    // It stops at t = pi/H0.
    const late = falling.value("redshiftAtAge", 0.99 * Math.PI * hubbleTime70 * 0.5);
    expect(late).toBeGreaterThan(-0.5);
    expect(() => evaluateModel(plain).value("redshiftAtAge", 0)).toThrow("the age 0 belongs to no redshift");
    expect(() => evaluateModel(plain).value("redshiftAtAge", 1e6)).toThrow("so close to -1 that it has no digits left");
    expect(() => evaluateModel(plain).value("redshiftAtAge", -1)).toThrow(
      "redshiftAtAge: age must be finite and not negative, got -1",
    );
  });

  it("refuse a lookback time longer than the age", () => {
    expect(() => evaluateModel(plain).value("redshiftAtLookbackTime", 20)).toThrow(
      /^redshiftAtLookbackTime: the lookback time is never 20 Gyr in this model: it lies between 0\.0000000 and 13\.7/,
    );
  });
});
