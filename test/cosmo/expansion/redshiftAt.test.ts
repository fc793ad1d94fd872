import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { einsteinDeSitter, matterAndCurvature, plain, relative, withoutRadiation } from "../exactModels";

describe("redshiftAtTemperature(T)", () => {
  it("is T/T_cmb - 1", () => {
    expect(relative(1 + evaluateModel(plain).value("redshiftAtTemperature", 3000), 3000 / 2.7255)).toBeLessThan(
      1e-15 * 4,
    );
    expect(evaluateModel(plain).value("redshiftAtTemperature", 1)).toBeLessThan(0);
  });

  it("is refused where there is no radiation, at 0 K, and after a model has stopped expanding", () => {
    expect(() => einsteinDeSitter().value("redshiftAtTemperature", 3000)).toThrow(
      "redshiftAtTemperature: this model has no background radiation (photonTemperature is 0)",
    );
    expect(() => evaluateModel(plain).value("redshiftAtTemperature", 0)).toThrow(
      "the temperature 0 K is never reached",
    );
    const falling = evaluateModel({ hubble: 70, baryonDensity: 0.02, matterFraction: 2, darkEnergyFraction: 0 });
    expect(() => falling.value("redshiftAtTemperature", 1)).toThrow("is never reached: this model stops expanding");
  });
});

describe("redshiftAtHubbleRate(H)", () => {
  it("is (H/H0)^(2/3) - 1 in an Einstein-de Sitter model", () => {
    for (const z of [0, 0.5, 1100]) {
      const back = einsteinDeSitter().value("redshiftAtHubbleRate", 70 * (1 + z) ** 1.5);
      expect(relative(1 + back, 1 + z)).toBeLessThan(1e-13);
    }
  });

  it("has two branches where w < -1, and refuses to choose", () => {
    const numbers = withoutRadiation({ coldMatterFraction: 0.2, darkEnergy: { w0: -1.5 } });
    const rate = numbers.value("hubbleRate", 0.1);
    expect(rate).toBeLessThan(70);
    expect(relative(1 + numbers.value("redshiftAtHubbleRate.near", rate), 1.1)).toBeLessThan(1e-12);
    const far = numbers.value("redshiftAtHubbleRate.far", rate);
    expect(far).toBeGreaterThan(0.2);
    expect(relative(numbers.value("hubbleRate", far), rate)).toBeLessThan(1e-13);
    expect(() => numbers.value("redshiftAtHubbleRate", rate)).toThrow(
      new RegExp(`^redshiftAtHubbleRate: the expansion rate is ${rate} km/s/Mpc at 2 redshifts: 0.100000 and `),
    );
    // Above today's rate there is one answer.
    expect(numbers.value("redshiftAtHubbleRate", 200)).toBeGreaterThan(far);
  });

  it("refuses a rate that this model never had", () => {
    expect(() => matterAndCurvature(0.3).value("redshiftAtHubbleRate", 50)).toThrow(
      /^redshiftAtHubbleRate: the expansion rate is never 50 km\/s\/Mpc in this model: it lies between 70\.000000 and /,
    );
  });
});
