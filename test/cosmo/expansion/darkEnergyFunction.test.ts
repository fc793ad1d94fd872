import { describe, expect, it } from "vitest";
import { darkEnergyGrowth, expansionPart } from "../../../cosmo/expansion";
import type { DarkEnergyEquation, DarkEnergyGivens } from "../../../cosmo/model";
import { evaluateModel } from "../../../cosmo/solve";
import { plain, relative } from "../exactModels";

const inRedshift = (text: string, evaluate: (z: number) => number): DarkEnergyEquation => ({
  text,
  variable: "z",
  evaluate,
});
const inScale = (text: string, evaluate: (a: number) => number): DarkEnergyEquation => ({
  text,
  variable: "a",
  evaluate,
});
const withState = (darkEnergy: DarkEnergyGivens, more: object = {}) => evaluateModel({ ...plain, darkEnergy, ...more });

const linear = { w0: -0.9, wa: 0.3 };
const closed = withState(linear);
const byScale = withState({ equation: inScale("-0.9 + 0.3 (1 - a)", (a) => -0.9 + 0.3 * (1 - a)) });
const byRedshift = withState({ equation: inRedshift("-0.9 + 0.3 z/(1 + z)", (z) => -0.9 + (0.3 * z) / (1 + z)) });
const names = ["age", "acousticAngle", "accelerationRedshift"];
const atRedshift = ["hubbleRate", "darkEnergyFractionAt", "decelerationAt"];
const inThePast = ["transverseDistance", "lookbackTime"];

describe("darkEnergy.equation", () => {
  it("w0 + wa (1 - a) as a formula in a or z equals the closed form to 1e-12", () => {
    for (const numbers of [byScale, byRedshift]) {
      // Measured 3e-14 at most.
      for (const name of names) expect(relative(numbers.value(name), closed.value(name)), name).toBeLessThan(1e-12);
      for (const z of [-0.9, -0.3, 0, 0.3, 1, 10, 1100, 1e5]) {
        for (const name of z > 0 ? [...atRedshift, ...inThePast] : atRedshift) {
          const [one, two] = [numbers.value(name, z), closed.value(name, z)];
          expect(Math.abs(one - two), `${name}(${z})`).toBeLessThan(1e-12 * Math.max(Math.abs(two), 1e-3));
        }
        expect(numbers.value("equationOfStateAt", z)).toBeCloseTo(closed.value("equationOfStateAt", z), 13);
      }
      expect(numbers.value("darkEnergy.w0")).toBe(-0.9);
    }
  });

  it("f(a) of a w that oscillates in ln a has the antiderivative that calculus gives", () => {
    // w = -1 + 0.2 sin(3 ln a): ln f = 3 int_a^1 0.2 sin(3 ln a') d ln a' = 0.2 (cos(3 ln a) - 1).
    const numbers = withState({
      equation: inScale("-1 + 0.2 sin(3 log(a))", (a) => -1 + 0.2 * Math.sin(3 * Math.log(a))),
    });
    const expansion = numbers.evaluation.once(expansionPart);
    for (const a of [1e-7, 1e-4, 0.01, 0.3, 0.9999, 1, 2, 30, 900]) {
      const expected = numbers.model.darkEnergyDensity * Math.exp(0.2 * (Math.cos(3 * Math.log(a)) - 1)) * a ** 4;
      // Measured 1.5e-14.
      expect(relative(expansion.darkEnergyTerm(a), expected), `${a}`).toBeLessThan(1e-12);
    }
  });

  it("a w that jumps is integrated across the jump", () => {
    const numbers = withState({ equation: inRedshift("z < 1 ? -1 : -0.5", (z) => (z < 1 ? -1 : -0.5)) });
    const expansion = numbers.evaluation.once(expansionPart);
    for (const z of [0.5, 1.5, 9]) {
      const expected = z < 1 ? 1 : ((1 + z) / 2) ** 1.5;
      const a = 1 / (1 + z);
      const rate = numbers.quantity("hubbleRate", z);
      expect(rate.error).toBeLessThan(1e-10 * rate.value);
      const exact =
        (numbers.model.baryonDensity + numbers.model.coldMatterDensity) * (1 + z) ** 3 +
        numbers.model.darkEnergyDensity * expected;
      const rest = numbers.evaluation.once(expansionPart);
      const relativistic = (rest.radiation + rest.neutrinoTerm(a)) * (1 + z) ** 4;
      expect(Math.abs(rate.value - 100 * Math.sqrt(exact + relativistic))).toBeLessThan(rate.error);
      expect(relative(expansion.darkEnergyTerm(a) / (numbers.model.darkEnergyDensity * a ** 4), expected)).toBeLessThan(
        1e-11,
      );
    }
  });

  it("is held beyond z = 1e8 and a = 1000, and its future asked for only when needed", () => {
    const wild = withState({ equation: inRedshift("-1 + 0.01 log(1 + z) - 1e-9 z", (z) => (z < 0 ? Number.NaN : -1)) });
    expect(relative(wild.value("age"), evaluateModel(plain).value("age"))).toBeLessThan(1e-13);
    expect(() => wild.value("hubbleRate", -0.5)).toThrow(
      "darkEnergy.equation must give a finite number at every redshift that is asked for; at z = -",
    );
    const steady = withState({ equation: inScale("-0.8", () => -0.8) });
    const constant = withState({ w0: -0.8 });
    expect(relative(steady.value("eventHorizon", 0), constant.value("eventHorizon", 0))).toBeLessThan(1e-11);
    const slowing = withState({ equation: inScale("a > 100 ? -0.2 : -1", (a) => (a > 100 ? -0.2 : -1)) });
    expect(() => slowing.value("eventHorizon", 0)).toThrow("with w at or above -1/3 where it is held the expansion");
    const expansion = steady.evaluation.once(expansionPart);
    const far = steady.model.darkEnergyDensity * darkEnergyGrowth(1e6, -0.8, 0) * 1e6 ** 4;
    expect(relative(expansion.darkEnergyTerm(1e6), far)).toBeLessThan(1e-12);
    const faint = steady.model.darkEnergyDensity * darkEnergyGrowth(1e-12, -0.8, 0) * 1e-12 ** 4;
    expect(relative(expansion.darkEnergyTerm(1e-12), faint)).toBeLessThan(1e-12);
  });

  it("says in the notes what w is, and names no source for it", () => {
    const value = byRedshift.quantity("hubbleRate", 1);
    expect(value.notes.map((note) => note.text)).toContain(
      "w = -0.9 + 0.3 z/(1 + z), followed from z = 1e8 to a = 1000 and held beyond",
    );
    expect(byRedshift.quantity("equationOfStateAt", 1).method).toBe("the model's formula, -0.9 + 0.3 z/(1 + z)");
    expect(byRedshift.quantity("equationOfStateAt", 1).sources).toEqual([]);
    expect(() => byRedshift.value("darkEnergy.wa")).toThrow(
      "darkEnergy.wa: w of this model follows a formula, it has no wa",
    );
  });

  it("refuses a w at or above 1/3 early, with the redshift from which on it is", () => {
    expect(() => withState({ equation: inRedshift("-1 + 0.01 z", (z) => -1 + 0.01 * z) })).toThrow(
      /^model: darkEnergy.equation must stay below 1\/3 at early times, or dark energy outgrows radiation in the past; from about z = 1[345]0 on it does not, at z = 1e8 w is, got /,
    );
  });

  it("refuses a w that is not finite, with the redshift; text that was not compiled; and w0 beside it", () => {
    expect(() => withState({ equation: inRedshift("log(1 - z)", (z) => Math.log(1 - z)) })).toThrow(
      /^model: darkEnergy.equation must give a finite number at every redshift that is asked for; at z = 1\.\d+ it does not, got NaN$/,
    );
    expect(() => withState({ equation: "-1 + 0.1 z" })).toThrow(
      'model: darkEnergy.equation must be compiled before a model is closed, got "-1 + 0.1 z"',
    );
    expect(() => withState({ equation: { text: "-1" } as DarkEnergyEquation })).toThrow(
      'model: darkEnergy.equation must have text, variable "z" or "a", and a function evaluate, got an object with fields text',
    );
    expect(() => withState({ w0: -1, equation: inScale("-1", () => -1) })).toThrow(
      "model: darkEnergy.equation takes the place of darkEnergy.w0",
    );
    expect(() =>
      withState({ table: { redshifts: [0, 1], values: [-1, -1] }, equation: inScale("-1", () => -1) }),
    ).toThrow("model: darkEnergy.equation and darkEnergy.table state the same thing twice");
  });
});

describe("darkEnergy.table", () => {
  const scales = Array.from({ length: 21 }, (_, i) => 1 - i / 20.5);
  const redshifts = scales.map((a) => 1 / a - 1);

  it("of w0 + wa (1 - a) equals the closed form within the stated error, over the table's range and beyond", () => {
    // In a the function is a straight line, which cubic and straight pieces both meet: what is left is that the ends are held.
    const numbers = withState({ table: { redshifts, values: scales.map((a) => -0.9 + 0.3 * (1 - a)) } });
    for (const z of [0.2, 1, 5]) {
      expect(relative(numbers.value("hubbleRate", z), closed.value("hubbleRate", z))).toBeLessThan(1e-13);
    }
    const age = numbers.quantity("age");
    // Beyond z = 40 w is held at the end value, 0.007 below the line.
    expect(relative(age.value, closed.value("age"))).toBeLessThan(1e-6);
  });

  it("of a smooth w differs from the formula by less than the error that it states, in 99.5% of random cases", () => {
    // Measured over 1800 cases: 4 outside, all with 7 points or fewer; the error falls as the points grow closer.
    let seed = 11;
    const random = () => {
      seed = (seed * 16807) % 2147483647;
      return seed / 2147483647;
    };
    let cases = 0;
    let outside = 0;
    let far = 0;
    for (let round = 0; round < 60; round++) {
      const c = [-1 + 0.2 * (random() - 0.5), 0.6 * (random() - 0.5), 0.6 * (random() - 0.5), 0.2 * (random() - 0.5)];
      const [frequency, phase] = [1 + 5 * random(), 6 * random()];
      const w = (a: number) => c[0]! + c[1]! * (1 - a) + c[2]! * (1 - a) ** 2 + c[3]! * Math.sin(frequency * a + phase);
      const count = 5 + Math.floor(30 * random());
      const redshifts = Array.from({ length: count }, (_, i) => 1 / (1 - (i * 0.9) / (count - 1)) - 1);
      const end = 1 / (1 + redshifts[count - 1]!);
      const formula = withState({ equation: inScale("random", (a) => w(Math.min(1, Math.max(a, end)))) });
      const numbers = withState({ table: { redshifts, values: redshifts.map((z) => w(1 / (1 + z))) } });
      for (const [name, ...z] of [
        ["age"],
        ["hubbleRate", 3 * random()],
        ["transverseDistance", 3 * random()],
        ["lookbackTime", 3 * random()],
        ["darkEnergyFractionAt", 3 * random()],
      ] as [string, ...number[]][]) {
        const value = numbers.quantity(name, ...z);
        const off = Math.abs(value.value - formula.value(name, ...z));
        cases++;
        if (off > value.error) outside++;
        if (value.error > 1000 * off) far++;
      }
    }
    expect(outside / cases).toBeLessThanOrEqual(0.005);
    expect(far / cases).toBeLessThan(0.1);
  });

  it("passes through its points and holds its ends", () => {
    const numbers = withState({ table: { redshifts: [0, 0.5, 1, 2], values: [-1, -0.9, -1.1, -0.8] } });
    for (const [z, w] of [
      [0, -1],
      [0.5, -0.9],
      [1, -1.1],
      [2, -0.8],
      [50, -0.8],
      [-0.5, -1],
    ] as const) {
      expect(numbers.value("equationOfStateAt", z)).toBeCloseTo(w, 14);
    }
    const note = numbers.quantity("age").notes.find((each) => each.text.startsWith("w by cubic pieces"));
    expect(note?.text).toContain("a table of 4 redshifts from 0 to 2");
  });

  it("every number that does not hang on w is left at its own error", () => {
    const numbers = withState({ table: { redshifts: [0, 1, 2], values: [-1, -0.7, -0.9] } });
    expect(numbers.quantity("photonDensity").error).toBeLessThan(1e-14 * numbers.value("photonDensity"));
    expect(numbers.quantity("age").error).toBeGreaterThan(1e-6);
  });

  it("refuses tables that are none, by entry", () => {
    const refused = (table: unknown, text: string) =>
      expect(() => withState({ table } as DarkEnergyGivens)).toThrow(text);
    refused({ redshifts: [0], values: [-1] }, "must have as many values as redshifts, and two or more");
    refused({ redshifts: [0, 1], values: [-1] }, '"2 redshifts and 1 values"');
    refused(
      { redshifts: [0, 1, 1], values: [-1, -1, -1] },
      "must have ascending redshifts, got 1 (entry 3 of darkEnergy.table)",
    );
    refused(
      { redshifts: [0, 1], values: [-1, Number.NaN] },
      "must have finite values, got NaN (entry 2 of darkEnergy.table)",
    );
    refused({ redshifts: [-1, 1], values: [-1, -1] }, "must have finite redshifts above -1, got -1 (entry 1");
    refused([[0, -1]], "must have lists redshifts and values");
    refused({ redshifts: [0, 1], values: [-1, 0.5] }, "must stay below 1/3 at early times");
  });
});
