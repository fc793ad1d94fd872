import { describe, expect, it } from "vitest";
import type { ModelGivens, UncertaintyGivens } from "../../../cosmo/model";
import { richardsonDerivative } from "../../../cosmo/numerics";
import { evaluateModel } from "../../../cosmo/solve";
import { givenNumber, withGiven } from "../../../cosmo/solve/withGiven";

const base: ModelGivens = {
  hubble: 67.4,
  baryonDensity: 0.0224,
  coldMatterDensity: 0.12,
  curvature: 0,
  darkEnergy: { w0: -1, wa: 0 },
  neutrinos: { effectiveNumber: 3.044 },
};

describe("derivative", () => {
  // The reference: Ridders' extrapolation of central differences from a larger step (Ridders 1982), to its own error.
  const steps: { [parameter: string]: number } = {
    hubble: 3,
    baryonDensity: 0.001,
    coldMatterDensity: 0.006,
    curvature: 0.01,
    "darkEnergy.w0": 0.05,
    "darkEnergy.wa": 0.1,
    "neutrinos.effectiveNumber": 0.2,
  };
  const asked: [string, number[]][] = [
    ["age", []],
    ["luminosityDistance", [1.1]],
    ["acousticAngle", []],
    ["dragSoundHorizon", []],
    ["lastScatteringRedshift", []],
    ["dampingWavenumber", []],
    ["equalityRedshift", []],
  ];
  const numbers = evaluateModel(base);
  for (const [parameter, step] of Object.entries(steps)) {
    it(`by ${parameter} agrees with a Richardson-extrapolated reference to 1e-6`, () => {
      const center = givenNumber(base, parameter)!;
      const models = new Map<number, ReturnType<typeof evaluateModel>>();
      const at = (x: number) => {
        const known = models.get(x) ?? evaluateModel(withGiven(base, parameter, x));
        models.set(x, known);
        return known;
      };
      for (const [name, values] of asked) {
        const reference = richardsonDerivative((x) => at(x).value(name, ...values), center, step).value;
        const { value, error } = numbers.derivative(name, values, parameter);
        // Relative to what the parameter can move the number by: value over the larger of parameter and step.
        const scale = Math.abs(numbers.value(name, ...values)) / Math.max(Math.abs(center), step);
        expect(Math.abs(value - reference), `${name} ${value} ${reference}`).toBeLessThan(1e-6 * scale);
        expect(error).toBeLessThan(1e-5 * scale);
      }
    });
  }

  it("is exact for a power law: d ln(1/H0)/d ln H0 = -1", () => {
    const { value } = numbers.derivative("hubbleDistance", [0], "hubble");
    expect((value * 67.4) / numbers.value("hubbleDistance", 0)).toBeCloseTo(-1, 7);
  });

  it("works to one side where the other has no models", () => {
    const massless = evaluateModel({ ...base, neutrinos: { massSum: 0 } });
    const { value } = massless.derivative("neutrinoDensity", [], "neutrinos.massSum");
    expect(Number.isFinite(value)).toBe(true);
    const empty = evaluateModel({ ...base, coldMatterDensity: 0.12, helium: 0 });
    expect(empty.derivative("lastScatteringRedshift", [], "helium").value).not.toBe(0);
  });

  it("works by a derived given: hubble by theta_*", () => {
    const solved = evaluateModel({ acousticAngle: 1.0411, baryonDensity: 0.0224, coldMatterDensity: 0.12 });
    const byAngle = solved.derivative("hubble", [], "acousticAngle").value;
    const back = evaluateModel({ hubble: solved.value("hubble"), baryonDensity: 0.0224, coldMatterDensity: 0.12 });
    expect(byAngle * back.derivative("acousticAngle", [], "hubble").value).toBeCloseTo(1, 5);
  });
});

describe("uncertainty", () => {
  const withErrors = (uncertainty: UncertaintyGivens) => evaluateModel({ ...base, uncertainty });

  it("carries one error through linearly: sigma(c/H0) = (c/H0) sigma(H0)/H0", () => {
    const quantity = withErrors({ errors: { hubble: 0.5 } }).quantity("hubbleDistance", 0);
    expect(quantity.uncertainty!.method).toBe("linear");
    expect(quantity.uncertainty!.upper / ((quantity.value * 0.5) / 67.4)).toBeCloseTo(1, 6);
    expect(quantity.uncertainty!.lower).toBe(quantity.uncertainty!.upper);
  });

  it("adds independent errors in quadrature", () => {
    const both = withErrors({ errors: { baryonDensity: 0.00015, coldMatterDensity: 0.0012 } }).quantity(
      "matterDensity",
    );
    expect(both.uncertainty!.upper).toBeCloseTo(Math.hypot(0.00015, 0.0012), 8);
  });

  it("keeps asymmetric errors on their sides, and turns them where the slope is negative", () => {
    const quantity = withErrors({ errors: { hubble: { upper: 1, lower: 0.2 } } }).quantity("hubbleDistance", 0);
    expect(quantity.uncertainty!.lower / quantity.uncertainty!.upper).toBeCloseTo(5, 6);
  });

  it("a covariance matrix: full anticorrelation of two parts leaves the sum certain", () => {
    const matrix = [
      [1e-8, -1e-8],
      [-1e-8, 1e-8],
    ];
    const covariance = { parameters: ["baryonDensity", "coldMatterDensity"], matrix };
    expect(withErrors({ covariance }).quantity("matterDensity").uncertainty!.upper).toBeLessThan(1e-8);
    expect(withErrors({ covariance }).quantity("baryonDensity").uncertainty!.upper).toBeCloseTo(1e-4, 9);
  });

  it("sampling agrees with the linear way where all is linear, and is the same every time", () => {
    const errors = { hubble: 0.5, baryonDensity: 0.00015, coldMatterDensity: 0.0012 };
    const linear = withErrors({ errors }).quantity("age").uncertainty!;
    const sampled = withErrors({ errors, method: "sampling", samples: 1024 }).quantity("age").uncertainty!;
    expect(sampled.method).toBe("sampling");
    // 1024 quasi-random models: measured 3.0% above, 1.3% below.
    expect(Math.abs(sampled.upper / linear.upper - 1)).toBeLessThan(0.05);
    expect(Math.abs(sampled.lower / linear.lower - 1)).toBeLessThan(0.05);
    expect(withErrors({ errors, method: "sampling", samples: 1024 }).quantity("age").uncertainty).toEqual(sampled);
  });

  it("reproduces the printed error of Omega_m h^3 with the printed correlation's sign", () => {
    // Planck 2018 VI, table 2, TT,TE,EE+lowE+lensing: H0 +- 0.54 and omega_m +- 0.0011 alone would give 1.1% each; Omega_m h^3 = omega_m h is
    // printed to 0.3%, so the two must be anticorrelated: with correlation -0.97 the propagated error falls below 0.5%.
    const at = (correlation: number) => {
      const [a, b] = [0.54, 0.0011];
      const covariance = {
        parameters: ["hubble", "matterDensity"],
        matrix: [
          [a * a, correlation * a * b],
          [correlation * a * b, b * b],
        ],
      };
      const model = { hubble: 67.36, baryonDensity: 0.02237, matterDensity: 0.143, uncertainty: { covariance } };
      const quantity = evaluateModel(model).quantity("matterFractionTimesCubedHubble");
      return quantity.uncertainty!.upper / quantity.value;
    };
    expect(at(0)).toBeGreaterThan(0.01);
    expect(at(-0.97)).toBeLessThan(0.005);
  });

  it("refuses what makes no sense, by name, rule and value", () => {
    const text = (uncertainty: unknown) => {
      try {
        evaluateModel({ ...base, uncertainty } as ModelGivens).quantity("age");
      } catch (error) {
        return (error as Error).message;
      }
      return "nothing was refused";
    };
    expect(text({ errors: { hubble: -1 } })).toBe(
      "model: uncertainty.errors.hubble must be a finite error of 0 or more, or { upper, lower }, got -1",
    );
    expect(text({ errors: { age: 0.1 } })).toBe('model: "age" is not a known given number with an error');
    expect(text({ error: { hubble: 1 } })).toBe('model: "error" is not a known field of uncertainty');
    expect(text({ errors: { hubble: 1 }, method: "montecarlo" })).toBe(
      'model: "montecarlo" is not a known method of uncertainty',
    );
    expect(text({ covariance: { parameters: ["hubble"], matrix: [[1, 2]] } })).toBe(
      "model: uncertainty.covariance must be a matrix of 1 rows and columns, got [[1, 2]]",
    );
    expect(
      text({
        covariance: {
          parameters: ["hubble", "baryonDensity"],
          matrix: [
            [1, 0.5],
            [0.1, 1],
          ],
        },
      }),
    ).toBe("model: uncertainty.covariance[2][1] must be symmetric, and differs from its mirror 0.5, got 0.1");
    expect(
      text({
        covariance: {
          parameters: ["hubble", "baryonDensity"],
          matrix: [
            [1, 2],
            [2, 1],
          ],
        },
      }),
    ).toMatch(/^model: uncertainty.covariance\[2\]\[2\] must leave a matrix that is positive, got -3/);
    expect(text({ errors: { hubble: 1 }, samples: 3, method: "sampling" })).toBe(
      "model: uncertainty.samples must be a whole number of 16 or more, got 3",
    );
  });
});
