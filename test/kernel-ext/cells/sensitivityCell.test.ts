import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { sensitivityCell } from "../../../kernel-ext/cells";
import { expectCell } from "./expectCell";
import { refusal } from "./refusal";

const base = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };
const numbers = evaluateModel(base);
const angle = sensitivityCell(base, { of: "acousticAngle", shift: 0.001 });

/** A flat universe of matter and a constant, whose age is known in closed form. */
const simple = { hubble: 70, baryonFraction: 0.05, matterFraction: 0.3, photonTemperature: 0 };

/** d ln(t H0)/d Omega_m of that universe, t H0 = (2/3) asinh(u)/sqrt(1 - Omega_m), u^2 = (1 - Omega_m)/Omega_m. */
function slopeOfAge(fraction: number): number {
  const u = Math.sqrt((1 - fraction) / fraction);
  return 1 / (2 * (1 - fraction)) - Math.sqrt(fraction) / (2 * fraction ** 2 * u * Math.asinh(u));
}

const relative = (value: number, expected: number) => Math.abs(value / expected - 1);

describe("sensitivityCell", () => {
  it("shows the matrix, bars, conventions and sources", async () => {
    await expectCell("sensitivityCell", angle);
  });

  it("shows several quantities, some of them not positive, beside stated errors", async () => {
    const model = {
      ...base,
      uncertainty: { errors: { hubble: 0.5, coldMatterDensity: { upper: 0.001, lower: 0.002 } } },
    };
    const of = ["acousticAngle, age", "distanceModulus(0.5)", "decelerationAt(0)"];
    await expectCell("sensitivityCellSeveral", sensitivityCell(model, { of, shift: 0.1, explain: "age" }));
  });

  it("varies hubble, the densities, curvature, w0, N_eff and the neutrino masses unless told otherwise", () => {
    expect(Object.keys(angle.values.matrix["acousticAngle"]!)).toEqual([
      "hubble",
      "baryonDensity",
      "coldMatterDensity",
      "curvature",
      "darkEnergy.w0",
      "neutrinos.effectiveNumber",
      "neutrinos.massSum",
    ]);
  });

  it("stating the masses as a sum changes no digit", () => {
    expect(angle.values.quantities["acousticAngle"]).toBe(numbers.value("acousticAngle"));
  });

  it("the critical density goes as H0 squared and as nothing else", () => {
    const { matrix, shift } = sensitivityCell(base, { of: "criticalDensity(0)", shift: 1e-28 }).values;
    const row = matrix["criticalDensity(0)"]!;
    // Measured 2e-14.
    expect(relative(row["hubble"]!, 2)).toBeLessThan(2e-13);
    for (const name of ["baryonDensity", "coldMatterDensity", "curvature", "darkEnergy.w0"]) {
      expect(Math.abs(row[name]!)).toBeLessThan(1e-13);
    }
    expect(Object.keys(shift!.parameters)).toEqual(["hubble"]);
  });

  it("a parameter that moves nothing is said not to", () => {
    const text = sensitivityCell(base, { of: "criticalDensity(0)", shift: 1e-28 }).toText();
    expect(text).toContain(
      "baryonDensity, coldMatterDensity, curvature, darkEnergy.w0, neutrinos.effectiveNumber, neutrinos.massSum: no change of it moves criticalDensity(0)",
    );
  });

  it("derivatives of the age of matter and a constant agree with the closed form", () => {
    const { matrix, combination } = sensitivityCell(simple, { of: "age" }).values;
    const slope = 0.3 * slopeOfAge(0.3);
    // Measured 4e-8, 1e-8 and, below, 3e-8.
    expect(relative(matrix["age"]!["hubble"]!, -1)).toBeLessThan(4e-7);
    expect(relative(matrix["age"]!["matterFraction"]!, slope)).toBeLessThan(1e-7);
    // Along constant age -d ln h + slope d ln Omega_m = 0.
    expect(relative(combination!.matterFractionSlope!, 1 / slope)).toBeLessThan(3e-7);
  });

  it("theta_* fixes about Omega_m h^3 (Planck 2018 VI, section 3; Percival et al. 2002: h^3.4 for the horizon angle; memory)", () => {
    const { matterFractionSlope, exponents, unitVector } = angle.values.combination!;
    expect(Math.abs(-matterFractionSlope! - 3.4)).toBeLessThan(0.2);
    expect(exponents.matterDensity).toBeGreaterThan(0);
    expect(exponents.reducedHubble).toBeGreaterThan(0);
    expect(exponents.baryonDensity).toBeLessThan(0);
    expect(Math.hypot(...Object.values(unitVector))).toBeCloseTo(1, 12);
  });

  it("the combination stays put along its own direction: a model moved along it keeps theta_*", () => {
    const power = -angle.values.combination!.matterFractionSlope!;
    const factor = 1.001;
    const { matterFraction } = numbers.model;
    const moved = evaluateModel({
      hubble: base.hubble * factor,
      baryonDensity: base.baryonDensity,
      matterFraction: matterFraction * factor ** -power,
    });
    // A change of h alone by so much moves theta_* by 1.9e-4; along the direction measured 3e-8, second order.
    expect(relative(moved.value("acousticAngle"), numbers.value("acousticAngle"))).toBeLessThan(3e-7);
  });

  it("does not depend on the form in which the model states its parameters", () => {
    const { baryonFraction, matterFraction } = numbers.model;
    const other = sensitivityCell({ reducedHubble: 0.674, baryonFraction, matterFraction }, { of: "acousticAngle" });
    expect(Object.keys(other.values.matrix["acousticAngle"]!).slice(0, 3)).toEqual([
      "reducedHubble",
      "baryonFraction",
      "matterFraction",
    ]);
    const [one, two] = [angle, other].map(({ values }) => values.combination!);
    // Measured 1e-8.
    expect(relative(two!.matterFractionSlope!, one!.matterFractionSlope!)).toBeLessThan(1e-7);
  });

  it("a closed geometry makes the angle larger, an open one smaller (common practice, no source)", () => {
    expect(angle.values.matrix["acousticAngle"]!["curvature"]!).toBeLessThan(-1);
  });

  it("each change explains the shift linearly, and the model there shows nearly all of it", () => {
    const { shift, derivatives, quantities } = angle.values;
    for (const [name, { change, to, reached }] of Object.entries(shift!.parameters)) {
      expect(relative(change * derivatives["acousticAngle"]![name]!, 0.001)).toBeLessThan(1e-12);
      expect(Math.abs(reached! - 1)).toBeLessThan(0.02);
      if (name !== "hubble") continue;
      const there = evaluateModel({ ...base, hubble: to }).value("acousticAngle");
      expect(there - quantities["acousticAngle"]!).toBeCloseTo(0.001 * reached!, 9);
    }
  });

  it("a change stands over its stated error, on the side to which it goes", () => {
    const errors = { hubble: 0.5, coldMatterDensity: { upper: 0.001, lower: 0.002 } };
    const cov = { parameters: ["baryonDensity"], matrix: [[1e-8]] };
    const model = { ...base, uncertainty: { errors, covariance: cov } };
    const up = sensitivityCell(model, { of: "acousticAngle", shift: 0.001 }).values.shift!.parameters;
    const down = sensitivityCell(model, { of: "acousticAngle", shift: -0.001 }).values.shift!.parameters;
    expect(up["hubble"]!.inErrors).toBeCloseTo(Math.abs(up["hubble"]!.change) / 0.5, 12);
    expect(up["coldMatterDensity"]!.inErrors).toBeCloseTo(up["coldMatterDensity"]!.change / 0.001, 12);
    expect(down["coldMatterDensity"]!.inErrors).toBeCloseTo(-down["coldMatterDensity"]!.change / 0.002, 12);
    expect(up["baryonDensity"]!.inErrors).toBeCloseTo(Math.abs(up["baryonDensity"]!.change) / 1e-4, 9);
    expect(up["curvature"]!.inErrors).toBeUndefined();
  });

  it("a change to where there is no model is said to be one", () => {
    const cell = sensitivityCell(base, { of: "acousticAngle", parameters: ["baryonDensity"], shift: 0.1 });
    expect(cell.values.shift!.parameters["baryonDensity"]!.to).toBeLessThan(0);
    expect(cell.values.shift!.parameters["baryonDensity"]!.reached).toBeUndefined();
    expect(cell.toText()).toContain("baryonDensity: there is no such model");
  });

  it("a quantity that is not positive, or a magnitude, is differentiated itself", () => {
    const { matrix, derivatives } = sensitivityCell(base, {
      of: ["decelerationAt(0)", "distanceModulus(1)"],
      parameters: ["hubble"],
    }).values;
    expect(matrix["decelerationAt(0)"]!["hubble"]).toBe(derivatives["decelerationAt(0)"]!["hubble"]! * 67.4);
    // mu = 5 lg D_L + 25 and D_L H0 hangs on Omega_m alone: at fixed Omega_m it would be -5/ln 10.
    const flat = { hubble: 67.4, baryonFraction: 0.05, matterFraction: 0.31, photonTemperature: 0 };
    const fixed = sensitivityCell(flat, { of: "distanceModulus(1)", parameters: ["hubble"] }).values.matrix;
    // Measured 8e-9.
    expect(relative(fixed["distanceModulus(1)"]!["hubble"]!, -5 / Math.LN10)).toBeLessThan(8e-8);
  });

  it("a model that states theta_* is varied by it, and states no power law", () => {
    const cell = sensitivityCell(
      { acousticAngle: 1.0411, baryonDensity: 0.0224, coldMatterDensity: 0.12 },
      { of: "age" },
    );
    const names = Object.keys(cell.values.matrix["age"]!);
    expect(names).toContain("acousticAngle");
    expect(names).not.toContain("hubble");
    expect(cell.values.combination).toBeUndefined();
    expect(cell.notes.join("\n")).toContain("no power law of ω_m, h and ω_b for age");
  });

  it("equal masses are varied together, different ones are not varied and a note says why", () => {
    const equal = { ...base, neutrinos: { masses: [0.05, 0.05, 0.05] } };
    expect(sensitivityCell(equal, { of: "age" }).values.matrix["age"]!["neutrinos.massSum"]).toBeLessThan(0);
    const cell = sensitivityCell({ ...base, neutrinos: { masses: [0.05, 0.01] } }, { of: "age" });
    expect(cell.values.matrix["age"]!["neutrinos.massSum"]).toBeUndefined();
    expect(cell.notes).toContain(
      "neutrinos.massSum is not varied: the model states a list of different masses; state their sum to vary it",
    );
  });

  it("dark energy by a table is not varied by w0, and the model's table says what w is", () => {
    const darkEnergy = { table: { redshifts: [0, 1, 3], values: [-0.9, -1, -1] } };
    const cell = sensitivityCell({ ...base, darkEnergy }, { of: "age" });
    expect(cell.values.matrix["age"]!["darkEnergy.w0"]).toBeUndefined();
    expect(cell.notes).toContain("darkEnergy.w0 is not varied: w follows an equation or a table");
    expect(cell.toText()).toContain("3 points, z 0 to 3");
  });

  const ask = (options: object) => () => sensitivityCell(base, options as never);
  const refusals: [title: string, run: () => unknown, text: string][] = [
    [
      "no quantity",
      ask({}),
      'sensitivityCell: of must be a quantity such as "acousticAngle", or a list of them, got undefined',
    ],
    ["an empty text", ask({ of: " " }), 'sensitivityCell: of must name at least one quantity, got " "'],
    [
      "an unknown quantity",
      ask({ of: "acousticAngel" }),
      'sensitivityCell: "acousticAngel" is not a known quantity | did you mean "acousticAngle"?',
    ],
    [
      "a redshift outside a domain",
      ask({ of: "luminosityDistance(-2)" }),
      "luminosityDistance: redshift must be finite and not negative, got -2",
    ],
    ["a quantity twice", ask({ of: ["age", "age"] }), 'sensitivityCell: of must name each quantity once, got "age"'],
    [
      "more quantities than can be told apart",
      ask({ of: "age, hubble, reducedHubble, matterFraction, matterDensity, curvature, acousticAngle" }),
      "sensitivityCell: of must be at most 6 quantities, got 7",
    ],
    [
      "an unknown parameter",
      ask({ of: "age", parameters: ["hubbel"] }),
      'sensitivityCell: "hubbel" is not a known parameter to differentiate by | did you mean "hubble"?',
    ],
    [
      "a parameter twice",
      ask({ of: "age", parameters: ["hubble", "hubble"] }),
      'sensitivityCell: parameters must name each parameter once, got "hubble"',
    ],
    [
      "no parameters",
      ask({ of: "age", parameters: [] }),
      'sensitivityCell: parameters must be a list of parameter names such as ["hubble", "curvature"], got []',
    ],
    [
      "a shift of NaN",
      ask({ of: "age", shift: Number.NaN }),
      "sensitivityCell: shift must be a finite number other than 0, got NaN",
    ],
    [
      "a shift of 0",
      ask({ of: "age", shift: 0 }),
      "sensitivityCell: shift must be a finite number other than 0, got 0",
    ],
    [
      "a quantity to explain without a shift",
      ask({ of: "age", explain: "age" }),
      "sensitivityCell: shift must be given with explain, got undefined",
    ],
    [
      "a quantity to explain that is not asked for",
      ask({ of: "age", shift: 1, explain: "agee" }),
      'sensitivityCell: "agee" is not a known quantity of "of" | did you mean "age"?',
    ],
    [
      "an unknown option",
      ask({ of: "age", shfit: 1 }),
      'sensitivityCell: "shfit" is not a known option | did you mean "shift"?',
    ],
    [
      "the sum of a list of different masses",
      () =>
        sensitivityCell(
          { ...base, neutrinos: { masses: [0.05, 0.01] } },
          { of: "age", parameters: ["neutrinos.massSum"] },
        ),
      "sensitivityCell: parameters can hold neutrinos.massSum only where the model does not state a list of different masses, got [0.05, 0.01] | state neutrinos.massSum with neutrinos.ordering in place of neutrinos.masses",
    ],
  ];
  for (const [title, run, text] of refusals) {
    it(`refuses ${title}`, () => {
      expect(refusal(run)).toBe(text);
    });
  }
});
