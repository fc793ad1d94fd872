import { describe, expect, it } from "vitest";
import { InconsistentParametersError } from "../../../cosmo/errors";
import type { ModelGivens } from "../../../cosmo/model";
import { closeModel, evaluateModel } from "../../../cosmo/solve";
import { roundingOf } from "../../../cosmo/solve/agreement";

const densities = { baryonDensity: 0.0224, coldMatterDensity: 0.12 };

function refusal(givens: ModelGivens): InconsistentParametersError {
  try {
    closeModel(givens);
  } catch (error) {
    if (error instanceof InconsistentParametersError) return error;
    throw error;
  }
  throw new Error("nothing was refused");
}

describe("solving for a parameter", () => {
  it("theta_* of Planck 2018 VI with its densities gives its H0", () => {
    // Planck 2018 VI, table 2, TT,TE,EE+lowE+lensing: 1.04110 +- 0.00031, H0 67.36 +- 0.54; d ln theta_*/d ln h = 0.2.
    const model = closeModel({
      acousticAngle: 1.0411,
      baryonDensity: 0.02237,
      coldMatterDensity: 0.12,
      neutrinos: { effectiveNumber: 3.046 },
      conventions: { constants: "codata2018", closure: "radiationOnTop" },
    });
    expect(model.hubble).toBeGreaterThan(67.3);
    expect(model.hubble).toBeLessThan(67.4);
    expect(model.solution).toMatchObject({ solvedFor: ["hubble"], determinedBy: ["acousticAngle"], agreeing: [] });
  });

  it("Omega_m with omega_m gives h = sqrt(omega/Omega) exactly", () => {
    const model = closeModel({ baryonDensity: 0.0224, matterFraction: 0.3, matterDensity: 0.147 });
    expect(model.hubble / 70 - 1).toBeCloseTo(0, 12);
  });

  it("omega_nu gives the mass of one neutrino (0.06 eV at N_eff 3.046 is 6.4522e-4)", () => {
    const model = closeModel({
      hubble: 67.4,
      ...densities,
      neutrinoDensity: 6.4522e-4,
      neutrinos: { effectiveNumber: 3.046 },
    });
    expect(model.neutrinos.masses[0]).toBeCloseTo(0.06, 5);
  });

  it("keeps what was given, word for word", () => {
    const givens = { ...densities, age: 13.8 };
    expect(closeModel(givens).givens).toBe(givens);
  });
});

describe("more than needed", () => {
  it("is accepted where it follows within rounding, and the model says so", () => {
    // omega_m = 0.0224 + 0.12 + 0.000645 = 0.143045; Omega_m = 0.31489.
    const model = closeModel({ hubble: 67.4, ...densities, matterFraction: 0.3149, reducedHubble: 0.674 });
    expect(model.solution!.agreeing).toEqual(["reducedHubble", "matterFraction"]);
  });

  it("names the smallest set of givens that clash, and by how much", () => {
    const error = refusal({ hubble: 67.4, ...densities, matterFraction: 0.33 });
    expect(error.problem).toBe("contradictory");
    expect(error.message).toMatch(
      /^model: hubble, baryonDensity, coldMatterDensity, matterFraction contradict each other: from hubble 67.4, baryonDensity 0.0224, coldMatterDensity 0.12 follows matterFraction 0.3148854\d, given 0.33; they differ by 4.8%, [\d.]+ times what rounding allows$/,
    );
    expect(error.hint).toBe(
      "leave one of them out, or name in solveFor a parameter that matterFraction should determine",
    );
  });

  it("leaves out of the clash what plays no part in it", () => {
    const error = refusal({ hubble: 67.4, reducedHubble: 0.7, ...densities, photonTemperature: 2.7 });
    expect(error.parameters).toEqual(["hubble", "reducedHubble"]);
  });

  it("a derived number that nothing is free to meet is a contradiction, with its size", () => {
    const error = refusal({ hubble: 67.4, ...densities, acousticAngle: 1.05 });
    expect(error.parameters).toEqual(["hubble", "baryonDensity", "coldMatterDensity", "acousticAngle"]);
    expect(error.message).toContain("follows acousticAngle 1.04123");
  });
});

describe("less than needed", () => {
  it("says what is open, what there is, and what would settle it", () => {
    const error = refusal({ baryonDensity: 0.0224, acousticAngle: 1.0411 });
    expect(error.message).toBe(
      "model: 2 parameters are open (hubble, coldMatterDensity) and only 1 number determines them (acousticAngle)",
    );
    expect(error.hint).toBe(
      "give 1 more: hubble or reducedHubble; coldMatterDensity or coldMatterFraction or matterDensity or matterFraction; or a derived number such as age, acousticAngle or dragSoundHorizon",
    );
  });

  it("solveFor without a number that determines it says so", () => {
    expect(refusal({ hubble: 67.4, ...densities, solveFor: ["curvature"] }).message).toBe(
      "model: 1 parameters are open (curvature) and nothing determines them",
    );
  });
});

describe("two models that meet the givens", () => {
  const given = { baryonFraction: 0.06, matterFraction: 0.4, acousticAngle: 1.0411 };

  it("are both named, and one must be chosen", () => {
    const error = refusal(given);
    expect(error.problem).toBe("ambiguous");
    expect(error.message).toMatch(/^model: 2 models meet these givens: \(hubble 6\d\.\d+\) and \(hubble 1\d\d\.\d+\)$/);
    expect(error.hint).toMatch(/^choose one by solveNear, for example solveNear: \{ hubble: 6\d\.\d+ \}$/);
  });

  it("the redshift of acceleration has two answers in w0", () => {
    const acceleration = evaluateModel({ hubble: 67.4, ...densities }).value("accelerationRedshift");
    const error = refusal({
      hubble: 67.4,
      ...densities,
      accelerationRedshift: acceleration,
      solveFor: ["darkEnergy.w0"],
    });
    expect(error.message).toMatch(
      /2 models meet these givens: \(darkEnergy.w0 -1.00000\) and \(darkEnergy.w0 -1.02\d+\)/,
    );
  });

  it("solveNear takes the nearest", () => {
    const low = closeModel({ ...given, solveNear: { hubble: 67 } });
    const high = closeModel({ ...given, solveNear: { hubble: 190 } });
    expect(low.hubble).toBeLessThan(80);
    expect(high.hubble).toBeGreaterThan(120);
  });
});

describe("what cannot be solved", () => {
  it("a theta_* that no model reaches names the range that was searched", () => {
    const error = refusal({ ...densities, acousticAngle: 104.11 });
    expect(error.message).toMatch(
      /^model: no model was found with acousticAngle 104.11: searched hubble from 20 to 200/,
    );
    expect(error.hint).toMatch(/^check the units \(100 theta_\* in 0.01 rad, Gyr, Mpc\)/);
  });

  it("solveFor naming what is given, or nothing known, is refused", () => {
    expect(() => closeModel({ hubble: 67.4, ...densities, age: 13.8, solveFor: ["hubble"] })).toThrow(
      'model: solveFor must not name what is given: hubble fixes hubble, got "hubble"',
    );
    expect(() => closeModel({ hubble: 67.4, ...densities, age: 13.8, solveFor: ["curvatur"] })).toThrow(
      'model: "curvatur" is not a known parameter in solveFor',
    );
    expect(() => closeModel({ ...densities, age: 13.8, solveNear: { curvature: 0 } })).toThrow(
      'model: "curvature" is not a known open parameter in solveNear',
    );
  });

  it("a derived number must be finite, and a typo in its name is met with the right one", () => {
    expect(() => closeModel({ ...densities, age: Number.NaN })).toThrow("model: age must be a finite number, got NaN");
    try {
      closeModel({ ...densities, acousticAngel: 1.04 } as never);
      expect.fail("nothing was refused");
    } catch (error) {
      expect((error as { hint?: string }).hint).toBe('did you mean "acousticAngle"?');
    }
  });
});

describe("roundingOf", () => {
  it("is half a unit of the last digit given, but never more than a fifth of a percent", () => {
    expect(roundingOf(0.3153)).toBeCloseTo(0.00005, 9);
    expect(roundingOf(67.36)).toBeCloseTo(0.005, 6);
    expect(roundingOf(70)).toBeCloseTo(0.14, 6);
    expect(roundingOf(1e-4)).toBeCloseTo(2e-7, 12);
  });
});
