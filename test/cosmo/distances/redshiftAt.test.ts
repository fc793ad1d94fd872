import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { redshiftAt } from "../../../cosmo/distances";
import { evaluateModel } from "../../../cosmo/solve";
import {
  deSitter,
  einsteinDeSitter,
  hubbleDistance70,
  matterAndCurvature,
  plain,
  relative,
  withoutRadiation,
} from "../exactModels";
import { chainModels, pastRedshifts } from "../randomModels";

/** How far z is off, relative to 1+z. */
const off = (z: number, expected: number) => Math.abs(z - expected) / (1 + expected);

describe("redshiftAtDistance(d) and its kin", () => {
  it("undo the distances that only rise", () => {
    fc.assert(
      fc.property(chainModels, pastRedshifts, (givens, z) => {
        const numbers = evaluateModel(givens);
        for (const [inverse, forward] of [
          ["redshiftAtDistance", "comovingDistance"],
          ["redshiftAtTransverseDistance", "transverseDistance"],
          ["redshiftAtLuminosityDistance", "luminosityDistance"],
          ["redshiftAtDistanceModulus", "distanceModulus"],
          ["redshiftAtComovingVolume", "comovingVolume"],
        ] as const) {
          const back = numbers.quantity(inverse, numbers.value(forward, z));
          // Measured 4e-14; at z = 1100 D_C hardly grows any more and a digit of it is thirty of z.
          expect(off(back.value, z), inverse).toBeLessThan(1e-12);
          expect(off(back.value, z), inverse).toBeLessThanOrEqual(5 * (back.error / (1 + z)) + 1e-14);
        }
      }),
      { numRuns: 30 },
    );
  });

  it("undo the distances with a maximum on both branches, and refuse to choose", () => {
    fc.assert(
      fc.property(chainModels, fc.double({ min: 0.02, max: 0.9, noNaN: true }), (givens, share) => {
        const numbers = evaluateModel(givens);
        for (const [inverse, forward, maximum] of [
          ["redshiftAtAngularDiameterDistance", "angularDiameterDistance", 1.2],
          ["redshiftAtProperScale", "properScale", 1.2],
          ["redshiftAtVolumeDistance", "volumeDistance", 3],
        ] as const) {
          const near = share * maximum;
          const value = numbers.value(forward, near);
          expect(off(numbers.value(`${inverse}.near`, value), near), inverse).toBeLessThan(1e-12);
          const far = numbers.value(`${inverse}.far`, value);
          expect(far).toBeGreaterThan(maximum);
          expect(relative(numbers.value(forward, far), value)).toBeLessThan(1e-12);
          expect(() => numbers.value(inverse, value)).toThrow(/ at 2 redshifts: /);
        }
      }),
      { numRuns: 20 },
    );
  });

  it("are exact in an Einstein-de Sitter and a de Sitter model", () => {
    for (const z of [1e-5, 0.3, 7, 1100]) {
      const distance = 2 * hubbleDistance70 * -Math.expm1(-0.5 * Math.log1p(z));
      expect(off(einsteinDeSitter().value("redshiftAtDistance", distance), z)).toBeLessThan(1e-12);
      expect(off(deSitter().value("redshiftAtLuminosityDistance", hubbleDistance70 * z * (1 + z)), z)).toBeLessThan(
        1e-13,
      );
    }
    // (8/27) D_H at z = 5/4 is the maximum; 0.9 of it at the roots of 2 [1 - (1+z)^-1/2] = 0.9 (8/27) (1+z).
    for (const branch of ["near", "far"] as const) {
      const z = einsteinDeSitter().value(
        `redshiftAtAngularDiameterDistance.${branch}`,
        0.9 * (8 / 27) * hubbleDistance70,
      );
      expect(relative((2 * (1 - 1 / Math.sqrt(1 + z))) / (1 + z), 0.9 * (8 / 27))).toBeLessThan(1e-13);
    }
  });

  it("are 0 at 0", () => {
    const numbers = evaluateModel(plain);
    for (const name of [
      "redshiftAtDistance",
      "redshiftAtLuminosityDistance",
      "redshiftAtComovingVolume",
      "redshiftAtAngularDiameterDistance.near",
    ]) {
      expect(numbers.value(name, 0), name).toBe(0);
    }
  });

  it("have a far branch for transverse and luminosity distance in a closed model", () => {
    // Omega_m = 3: D_M has its maximum R at z = 22.3.
    const numbers = matterAndCurvature(3);
    const value = numbers.value("transverseDistance", 3);
    expect(off(numbers.value("redshiftAtTransverseDistance.near", value), 3)).toBeLessThan(1e-12);
    // The far branch ends at the Big Bang, at 1.91 radii: D_M = 0.943 R, which is above D_M(3).
    expect(() => numbers.value("redshiftAtTransverseDistance.far", value)).toThrow("on the far branch");
    const high = numbers.value("transverseDistance", 200);
    expect(off(numbers.value("redshiftAtTransverseDistance.far", high), 200)).toBeLessThan(1e-10);
    expect(numbers.value("redshiftAtTransverseDistance.near", high)).toBeLessThan(22.3);
  });

  it("go as far as the antipode of a closed model", () => {
    const numbers = withoutRadiation({ coldMatterFraction: 0.3, darkEnergyFraction: 1.7 });
    const far = redshiftAt(numbers.evaluation, "redshiftAtTransverseDistance", 1e-6, "far").value;
    expect(numbers.value("transverseDistance", far)).toBeLessThan(1e-5);
    expect(far).toBeGreaterThan(0.5);
    expect(() => numbers.value("redshiftAtComovingVolume", 1e9)).toThrow(
      /^redshiftAtComovingVolume: the comoving volume is never 1000000000 Gpc3 in this model: it lies between 0\.0000000 and /,
    );
  });

  it("refuse what the model does not reach, with what it does reach", () => {
    expect(() => einsteinDeSitter().value("redshiftAtAngularDiameterDistance", 2000)).toThrow(
      /^redshiftAtAngularDiameterDistance: the angular-diameter distance is never 2000 Mpc in this model: it lies between 0\.0000000 and 1268\.96/,
    );
    expect(() => evaluateModel(plain).value("redshiftAtLuminosityDistance.far", 100)).toThrow(
      "redshiftAtLuminosityDistance.far: the luminosity distance has no extremum in this model, so there is no far branch",
    );
    expect(() => evaluateModel(plain).value("redshiftAtDistance", -1)).toThrow(
      "redshiftAtDistance: distance must be finite and not negative, got -1",
    );
    expect(() => evaluateModel(plain).value("redshiftAtDistance", Number.NaN)).toThrow("got NaN");
  });

  it("work in a model that bounced, up to its turning point", () => {
    // H^2 = 2 H0^2 - H0^2/a^2: turning point at z = sqrt 2 - 1.
    const numbers = withoutRadiation({ coldMatterFraction: 0, darkEnergyFraction: 2 });
    expect(off(numbers.value("redshiftAtDistance", numbers.value("comovingDistance", 0.4)), 0.4)).toBeLessThan(1e-12);
    expect(() => numbers.value("redshiftAtDistance", 1e6)).toThrow("is never 1000000 Mpc in this model");
  });
});
