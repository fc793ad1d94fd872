import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { deSitter, einsteinDeSitter, flatLambda, plain, relative, withoutRadiation } from "../exactModels";

describe("accelerationRedshift", () => {
  it("of matter and a cosmological constant is (2 Omega_L/Omega_m)^(1/3) - 1, in the past or still to come", () => {
    for (const matter of [0.05, 0.3, 0.6, 0.9, 0.999]) {
      const expected = Math.cbrt((2 * (1 - matter)) / matter);
      // Measured 2.2e-16.
      expect(relative(1 + flatLambda(matter).value("accelerationRedshift"), expected)).toBeLessThan(5e-15);
    }
  });

  it("does not depend on curvature but through the density of dark energy", () => {
    const numbers = withoutRadiation({ coldMatterFraction: 0.3, darkEnergyFraction: 0.6 });
    expect(relative(1 + numbers.value("accelerationRedshift"), Math.cbrt(1.2 / 0.3))).toBeLessThan(5e-15);
  });

  it("of constant w is [-(1 + 3w) Omega_DE/Omega_m]^(-1/(3w)) - 1", () => {
    const w0 = -0.6;
    const numbers = withoutRadiation({ coldMatterFraction: 0.3, darkEnergy: { w0 } });
    const expected = ((-(1 + 3 * w0) * 0.7) / 0.3) ** (-1 / (3 * w0));
    expect(relative(1 + numbers.value("accelerationRedshift"), expected)).toBeLessThan(5e-15);
  });

  it("is where decelerationAt changes its sign, with radiation and massive neutrinos", () => {
    const numbers = evaluateModel({ ...plain, neutrinos: { masses: [0.3, 0.2] }, darkEnergy: { w0: -0.9, wa: 0.2 } });
    const z = numbers.value("accelerationRedshift");
    expect(numbers.value("decelerationAt", z * (1 + 1e-9))).toBeGreaterThan(0);
    expect(numbers.value("decelerationAt", z * (1 - 1e-9))).toBeLessThan(0);
  });

  it("of a model that never turns is refused with the reason", () => {
    expect(() => einsteinDeSitter().value("accelerationRedshift")).toThrow(
      "accelerationRedshift: the expansion of this model never turns from slowing down to speeding up",
    );
    expect(() =>
      withoutRadiation({ coldMatterFraction: 0.3, darkEnergy: { w0: -0.3 } }).value("accelerationRedshift"),
    ).toThrow("never turns");
    expect(() => deSitter().value("accelerationRedshift")).toThrow(
      "accelerationRedshift: the expansion of this model speeds up at all times, it never turned",
    );
  });
});
