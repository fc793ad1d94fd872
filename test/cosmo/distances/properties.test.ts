import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { ModelGivens } from "../../../cosmo/model";
import { evaluateModel } from "../../../cosmo/solve";
import { hubbleDistance70, matterAndCurvature, plain, relative, withoutRadiation } from "../exactModels";
import { chainModels, pastRedshifts } from "../randomModels";

describe("distances of any model", () => {
  it("rise with z, but for the angular-diameter distance", () => {
    fc.assert(
      fc.property(chainModels, pastRedshifts, (givens, z) => {
        const numbers = evaluateModel(givens);
        for (const name of [
          "comovingDistance",
          "transverseDistance",
          "luminosityDistance",
          "comovingVolume",
          "distanceModulus",
        ]) {
          expect(numbers.value(name, z * 1.01), name).toBeGreaterThan(numbers.value(name, z));
        }
      }),
      { numRuns: 40 },
    );
  });

  it("keep D_L = (1+z)^2 D_A, today and for an observer at z1", () => {
    fc.assert(
      fc.property(chainModels, pastRedshifts, pastRedshifts, (givens, first, second) => {
        const numbers = evaluateModel(givens);
        const [from, to] = first < second ? [first, second] : [second, first];
        const one = numbers.value("angularDiameterDistance", to) * (1 + to) ** 2;
        expect(relative(numbers.value("luminosityDistance", to), one)).toBeLessThan(1e-14);
        const between = numbers.value("angularDiameterDistance", from, to) * ((1 + to) / (1 + from)) ** 2;
        expect(Math.abs(numbers.value("luminosityDistance", from, to) - between)).toBeLessThanOrEqual(1e-14 * between);
      }),
      { numRuns: 40 },
    );
  });

  it("comovingDistance(z1, z2) is the difference of comovingDistance(z), and turns its sign with the order", () => {
    fc.assert(
      fc.property(chainModels, pastRedshifts, pastRedshifts, (givens, from, to) => {
        const numbers = evaluateModel(givens);
        const between = numbers.value("comovingDistance", from, to);
        const expected = numbers.value("comovingDistance", to) - numbers.value("comovingDistance", from);
        // Measured 1.2e-15 of the longer distance.
        const scale = numbers.value("comovingDistance", Math.max(from, to));
        expect(Math.abs(between - expected)).toBeLessThan(1e-14 * scale);
        expect(numbers.value("comovingDistance", to, from)).toBeCloseTo(-between, 8);
      }),
      { numRuns: 40 },
    );
  });

  it("comovingVolume(z1, z2) is the difference of comovingVolume(z), and a thin shell is its element times dz", () => {
    fc.assert(
      fc.property(chainModels, pastRedshifts, (givens, z) => {
        const numbers = evaluateModel(givens);
        const shell = numbers.value("comovingVolume", z, 2 * z);
        const outer = numbers.value("comovingVolume", 2 * z);
        expect(Math.abs(shell - (outer - numbers.value("comovingVolume", z)))).toBeLessThan(2e-14 * outer);
        const dz = 1e-5 * (1 + z);
        const low = z + 0.5 * (1 - 1 / Math.sqrt(3)) * dz;
        const high = z + 0.5 * (1 + 1 / Math.sqrt(3)) * dz;
        // Two Gauss points: measured 4e-13 with the rounding of dz itself.
        const thin =
          0.5 * dz * (numbers.value("comovingVolumeElement", low) + numbers.value("comovingVolumeElement", high));
        expect(relative(numbers.value("comovingVolume", z, z + dz), thin)).toBeLessThan(1e-9);
      }),
      { numRuns: 40 },
    );
  });

  it("the derivative of comovingDistance is c/H", () => {
    fc.assert(
      fc.property(chainModels, pastRedshifts, (givens, z) => {
        const numbers = evaluateModel(givens);
        const slope = (h: number) => numbers.value("comovingDistance", z - h, z + h) / (2 * h);
        const h = 1e-3 * Math.min(z, 1 + z);
        const derivative = (4 * slope(h) - slope(2 * h)) / 3;
        // Measured 1.5e-11: what the difference quotient loses.
        expect(relative(derivative, numbers.value("hubbleDistance", z))).toBeLessThan(1e-10);
      }),
      { numRuns: 40 },
    );
  });

  it("angularDiameterDistance(z1, z2) is Hogg's eq. 19 where that holds", () => {
    // Hogg 1999, eq. 19, for an open or flat model; in a closed one up to the equator.
    fc.assert(
      fc.property(chainModels, pastRedshifts, pastRedshifts, (givens, first, second) => {
        const numbers = evaluateModel(givens);
        const [from, to] = first < second ? [first, second] : [second, first];
        const k = numbers.model.curvature * (numbers.model.hubble / 299792.458) ** 2;
        const near = numbers.value("transverseDistance", from);
        const far = numbers.value("transverseDistance", to);
        fc.pre(k >= 0 || numbers.value("comovingDistance", to) * Math.sqrt(-k) < 1.5);
        const expected = (far * Math.sqrt(1 + k * near ** 2) - near * Math.sqrt(1 + k * far ** 2)) / (1 + to);
        // The printed form cancels; measured 3e-15 of D_M(z2)/(1+z2).
        const scale = far / (1 + to);
        expect(Math.abs(numbers.value("angularDiameterDistance", from, to) - expected)).toBeLessThan(3e-14 * scale);
      }),
      { numRuns: 40 },
    );
  });

  it("go through curvature 0 without a step", () => {
    const at = (curvature: number, name: string, z: number) => evaluateModel({ ...plain, curvature }).value(name, z);
    for (const name of ["transverseDistance", "angularDiameterDistance", "luminosityDistance", "comovingVolume"]) {
      for (const z of [0.1, 2, 1100]) {
        const flat = at(0, name, z);
        // The mean over +-1e-6 differs from flat in second order only: measured 9e-12; a one-sided step would show at 1e-6.
        expect(relative((at(1e-6, name, z) + at(-1e-6, name, z)) / 2, flat), `${name}(${z})`).toBeLessThan(1e-10);
        expect(relative(at(1e-15, name, z), flat)).toBeLessThan(1e-13);
        expect(relative(at(-1e-15, name, z), flat)).toBeLessThan(1e-13);
      }
    }
  });

  it("carry an error estimate that is not below rounding and not above the stated accuracy", () => {
    fc.assert(
      fc.property(chainModels, pastRedshifts, (givens: ModelGivens, z) => {
        const numbers = evaluateModel(givens);
        for (const name of [
          "comovingDistance",
          "transverseDistance",
          "luminosityDistance",
          "volumeDistance",
          "comovingVolume",
        ]) {
          const { value, error } = numbers.quantity(name, z);
          expect(error).toBeGreaterThan(2e-16 * value);
          expect(error).toBeLessThan(4e-12 * value);
        }
      }),
      { numRuns: 40 },
    );
  });
});

describe("a closed model", () => {
  it("has transverseDistance fall again beyond pi/2 curvature radii", () => {
    // Omega_m = 3 without dark energy: a = (3/4)(1 - cos eta), D_C = R (eta_0 - eta), cos eta_0 = -1/3, R = D_H/sqrt 2.
    const numbers = matterAndCurvature(3);
    const radius = hubbleDistance70 / Math.SQRT2;
    const equator = 4 / 3 / (1 - Math.sqrt(8) / 3) - 1;
    expect(relative(numbers.value("comovingDistance", equator), (radius * Math.PI) / 2)).toBeLessThan(1e-13);
    expect(relative(numbers.value("transverseDistance", equator), radius)).toBeLessThan(1e-13);
    expect(numbers.value("transverseDistance", equator / 2)).toBeLessThan(0.999 * radius);
    expect(numbers.value("transverseDistance", equator * 5)).toBeLessThan(0.999 * radius);
  });

  it("has half of its volume, pi^2 R^3, nearer than the equator", () => {
    // Half of a 3-sphere: pi^2 R^3.
    const numbers = matterAndCurvature(3);
    const radius = hubbleDistance70 / Math.SQRT2 / 1000;
    const equator = 4 / 3 / (1 - Math.sqrt(8) / 3) - 1;
    expect(relative(numbers.value("comovingVolume", equator), Math.PI ** 2 * radius ** 3)).toBeLessThan(1e-13);
  });

  it("passes its antipode with a warning, and its volume is refused there", () => {
    // Little short of a bounce, so that light has had the time to go around.
    const numbers = withoutRadiation({ coldMatterFraction: 0.3, darkEnergyFraction: 1.7 });
    const radius = hubbleDistance70 / Math.sqrt(-numbers.value("curvature"));
    const z = 3;
    const along = numbers.value("comovingDistance", z);
    expect(along / radius).toBeGreaterThan(Math.PI);
    expect(relative(numbers.value("transverseDistance", z), radius * Math.abs(Math.sin(along / radius)))).toBeLessThan(
      1e-13,
    );
    const noted = numbers.quantity("luminosityDistance", z);
    expect(noted.value).toBeGreaterThan(0);
    expect(noted.notes[0]!.level).toBe("warning");
    expect(noted.notes[0]!.text).toContain("passed the antipode");
    const near = numbers.quantity("luminosityDistance", 0.2).notes;
    expect(near.filter((note) => note.level === "warning")).toEqual([]);
    expect(() => numbers.value("comovingVolume", z)).toThrow(
      "comovingVolume: redshift 3 lies beyond the antipode of this closed model: all of space is nearer",
    );
  });
});

describe("a pair of redshifts in the wrong order", () => {
  it("is refused where something is looked at, and gives a negative number where a difference is asked", () => {
    const numbers = evaluateModel(plain);
    for (const name of ["transverseDistance", "angularDiameterDistance", "luminosityDistance", "comovingVolume"]) {
      expect(() => numbers.value(name, 2, 1), name).toThrow(
        `${name}: redshift z2 must be at or above z1 = 2, the observer's redshift, got 1`,
      );
    }
    for (const name of ["comovingDistance", "lookbackTime", "lightTravelDistance"]) {
      expect(numbers.value(name, 2, 1), name).toBeLessThan(0);
    }
  });
});
