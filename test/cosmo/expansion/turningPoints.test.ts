import { describe, expect, it } from "vitest";
import { turnaroundRedshiftPart } from "../../../cosmo/expansion";
import { deSitter, matterAndCurvature, relative, withoutRadiation } from "../exactModels";

/** H^2 = 2 H0^2 - H0^2/a^2: never smaller than a = 1/sqrt 2. */
const bounced = () => withoutRadiation({ coldMatterFraction: 0, darkEnergyFraction: 2 });

describe("a closed model that bounced", () => {
  it("has no redshift beyond its turning point, and the error says where that lies", () => {
    const turning = Math.SQRT2 - 1;
    expect(() => bounced().value("hubbleRate", turning + 1e-9)).toThrow(
      `hubbleRate: redshift ${turning + 1e-9} lies beyond the turning point of this closed model: it was never smaller than at z = ${turning.toPrecision(8)}`,
    );
    expect(bounced().value("hubbleRate", turning - 1e-9)).toBeGreaterThan(0);
    for (const name of [
      "comovingDistance",
      "luminosityDistance",
      "lookbackTime",
      "criticalDensity",
      "matterFractionAt",
    ]) {
      expect(() => bounced().value(name, 3), name).toThrow(
        `${name === "criticalDensity" ? "hubbleRate" : name}: redshift 3 lies beyond`,
      );
    }
  });

  it("has no age and no particle horizon, for it never had a Big Bang", () => {
    for (const [name, arguments_] of [
      ["age", []],
      ["ageAt", [0.1]],
      ["conformalTime", [0.1]],
      ["particleHorizon", [0]],
    ] as const) {
      expect(() => bounced().value(name, ...arguments_), name).toThrow(
        `${name}: this closed model never had a Big Bang: going back, H reaches zero at z = 0.41421356`,
      );
    }
  });

  it("still has lookback times: (1/H0 sqrt 2) artanh sqrt(1 - 1/2 (1+z)^2) between today and z", () => {
    // Integral of da/sqrt(2 a^2 - 1): (1/sqrt 2) ln[sqrt 2 a + sqrt(2 a^2 - 1)].
    const primitive = (a: number) => Math.log(Math.SQRT2 * a + Math.sqrt(2 * a * a - 1)) / Math.SQRT2;
    const expected = (primitive(1) - primitive(1 / 1.3)) * (977.7922216807891 / 70);
    // 977.79 Gyr km/s/Mpc from IAU parsec and Julian year; measured 2e-15.
    expect(relative(bounced().value("lookbackTime", 0.3), expected)).toBeLessThan(2e-14);
  });
});

describe("a model that falls back", () => {
  it("of matter and closed curvature stops at a = Omega_m/(Omega_m - 1)", () => {
    for (const matter of [1.01, 1.5, 2, 5]) {
      const turnaround = matterAndCurvature(matter).evaluation.once(turnaroundRedshiftPart)!;
      expect(relative(1 + turnaround, (matter - 1) / matter)).toBeLessThan(1e-14);
    }
  });

  it("of matter and negative dark energy stops where their densities cancel", () => {
    const numbers = withoutRadiation({ coldMatterFraction: 1.5, curvature: 0 });
    expect(relative(1 + numbers.evaluation.once(turnaroundRedshiftPart)!, Math.cbrt(0.5 / 1.5))).toBeLessThan(1e-14);
  });

  it("is found with steep dark energy of negative density", () => {
    // 1.5 a^-3 = 0.5 a^12 for w0 = -5.
    const numbers = withoutRadiation({ coldMatterFraction: 1.5, curvature: 0, darkEnergy: { w0: -5 } });
    expect(relative(1 + numbers.evaluation.once(turnaroundRedshiftPart)!, 3 ** (-1 / 15))).toBeLessThan(1e-14);
  });

  it("has no redshift after that, and the error says so", () => {
    expect(() => matterAndCurvature(2).value("hubbleRate", -0.6)).toThrow(
      "hubbleRate: redshift -0.6 is never reached: this model stops expanding at z = -0.50000000 and falls back",
    );
    expect(matterAndCurvature(2).value("hubbleRate", -0.49)).toBeGreaterThan(0);
  });

  it("is no model that expands forever", () => {
    expect(deSitter().evaluation.once(turnaroundRedshiftPart)).toBeUndefined();
    expect(matterAndCurvature(0.3).evaluation.once(turnaroundRedshiftPart)).toBeUndefined();
    const closedWithLambda = withoutRadiation({ coldMatterFraction: 0.35, darkEnergyFraction: 0.7 });
    expect(closedWithLambda.evaluation.once(turnaroundRedshiftPart)).toBeUndefined();
  });
});
