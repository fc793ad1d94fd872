import { describe, expect, it } from "vitest";
import { type BatchProblem, prepareBatch, rowStatus } from "../../../cosmo/batch";
import { DomainError, InconsistentParametersError, UnknownNameError } from "../../../cosmo/errors";
import type { ModelGivens } from "../../../cosmo/model";
import { closeModel, evaluateModel } from "../../../cosmo/solve";

const base = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };

/** Runs one model by columns of one row. */
function runOne(
  givens: ModelGivens,
  outputs: string[],
): { values: number[]; status: number; problems: BatchProblem[] } {
  const plan = prepareBatch({ outputs, shared: givens, closeModel });
  const out = Object.fromEntries(plan.outputs.map((name) => [name, new Float64Array(1)]));
  const status = new Uint8Array(1);
  const problems: BatchProblem[] = [];
  plan.run({}, { from: 0, to: 1 }, out, problems, status);
  return { values: plan.outputs.map((name) => out[name]![0]!), status: status[0]!, problems };
}

describe("prepareBatch(request)", () => {
  it("fills the rows asked for and leaves the others alone", () => {
    const plan = prepareBatch({ outputs: ["age", "acousticAngle"], closeModel });
    const out = { age: new Float64Array(4).fill(-1), acousticAngle: new Float64Array(4).fill(-1) };
    const columns = { ...base, hubble: Float64Array.of(66, 67, 68, 69) };
    const counts = plan.run(columns, { from: 1, to: 3 }, out);
    expect(counts.engine).toBe(2);
    expect(out.age[0]).toBe(-1);
    expect(out.age[3]).toBe(-1);
    // Measured 1e-11 and 3e-8.
    expect(out.age[2]! / evaluateModel({ ...base, hubble: 68 }).value("age") - 1).toBeCloseTo(0, 9);
    expect(out.acousticAngle[1]! / evaluateModel({ ...base, hubble: 67 }).value("acousticAngle") - 1).toBeCloseTo(0, 6);
  });

  it("gives a row the same digits whatever rows came before it", () => {
    const plan = prepareBatch({
      outputs: ["acousticAngle", "dampingWavenumber", "dragSoundHorizon", "age"],
      closeModel,
    });
    const count = 12;
    const columns = {
      hubble: Float64Array.from({ length: count }, (_, i) => 60 + i),
      baryonDensity: 0.0224,
      coldMatterDensity: Float64Array.from({ length: count }, (_, i) => 0.1 + 0.005 * ((7 * i) % count)),
      photonTemperature: Float64Array.from({ length: count }, (_, i) => 2.6 + 0.1 * (i % 3)),
      "neutrinos.massSum": Float64Array.from({ length: count }, (_, i) => 0.1 * (i % 4)),
    };
    const make = () => Object.fromEntries(plan.outputs.map((name) => [name, new Float64Array(count)]));
    const together = make();
    plan.run(columns, { from: 0, to: count }, together);
    const apart = make();
    for (let i = count - 1; i >= 0; i--) plan.run(columns, { from: i, to: i + 1 }, apart);
    expect(apart).toEqual(together);
  });

  it.each<[string, ModelGivens]>([
    ["fractions", { reducedHubble: 0.67, baryonFraction: 0.05, coldMatterFraction: 0.26 }],
    ["all matter", { hubble: 70, baryonDensity: 0.022, matterDensity: 0.14, curvature: 0.01 }],
    ["all matter as a fraction", { hubble: 70, baryonDensity: 0.022, matterFraction: 0.3 }],
    ["dark energy in place of curvature", { ...base, darkEnergyFraction: 0.69 }],
    ["dark energy as a density", { ...base, darkEnergyDensity: 0.31 }],
    ["a mass sum", { ...base, neutrinos: { massSum: 0.2, ordering: "normal" } }],
    ["an inverted mass sum", { ...base, neutrinos: { massSum: 0.2, ordering: "inverted" } }],
    ["a degenerate mass sum", { ...base, neutrinos: { massSum: 0.2, ordering: "degenerate" } }],
    ["masses out of order", { ...base, neutrinos: { masses: [0.01, 0.2, 0.05] } }],
    ["helium given", { ...base, helium: 0.26 }],
    ["no helium", { ...base, helium: 0 }],
    ["no massive neutrinos", { ...base, neutrinos: { masses: [] } }],
    ["all matter at equality", { ...base, conventions: { equalityMatter: "allMatter" } }],
  ])("closes rows as closeModel does: %s", (_, givens) => {
    const exact = [
      "darkEnergyFraction",
      "curvature",
      "neutrinoDensity",
      "coldMatterDensity",
      "helium",
      "equalityRedshift",
    ];
    const outputs = [...exact, "lastScatteringRedshift", "age"];
    const { values, status } = runOne(givens, outputs);
    expect(status).toBe(rowStatus.engine);
    const single = evaluateModel(givens);
    exact.forEach((name, k) => {
      const value = single.value(name);
      expect(Math.abs(values[k]! - value)).toBeLessThanOrEqual(4e-16 * Math.abs(value));
    });
    // Measured 5e-8 and 1e-10.
    expect(Math.abs(values[exact.length]! / single.value("lastScatteringRedshift") - 1)).toBeLessThan(5e-7);
    expect(Math.abs(values[exact.length + 1]! / single.value("age") - 1)).toBeLessThan(1e-8);
  });

  it("sends rows outside the validated range through the single path and says so", () => {
    const givens = { ...base, photonTemperature: 3.5 };
    const { values, status } = runOne(givens, ["acousticAngle"]);
    expect(status).toBe(rowStatus.outsideRange);
    expect(values[0]).toBe(evaluateModel(givens).value("acousticAngle"));
  });

  it("sends what the engine does not march through the single path: fits by convention, dark energy by formula or table", () => {
    const cases: ModelGivens[] = [
      { ...base, conventions: { lastScattering: "huSugiyama1996" } },
      { ...base, conventions: { soundHorizon: "eisensteinHu1998" } },
      { ...base, darkEnergy: { equation: { text: "-0.9 + 0.3 z", variable: "z", evaluate: (z) => -0.9 - 0.1 * z } } },
      { ...base, darkEnergy: { table: { redshifts: [0, 0.5, 1, 2], values: [-0.9, -0.95, -1, -1.1] } } },
    ];
    for (const givens of cases) {
      const { values, status } = runOne(givens, ["acousticAngle", "age"]);
      expect(status).toBe(rowStatus.notServed);
      const single = evaluateModel(givens);
      expect(values).toEqual([single.value("acousticAngle"), single.value("age")]);
      expect(values[0]).not.toBe(evaluateModel(base).value("acousticAngle"));
    }
  });

  it("sends tier saha through the single path, but not what hangs on no recombination", () => {
    const givens: ModelGivens = { ...base, recombination: "saha" };
    expect(runOne(givens, ["lastScatteringRedshift"]).status).toBe(rowStatus.notServed);
    expect(runOne(givens, ["lastScatteringRedshift"]).values[0]).toBe(
      evaluateModel(givens).value("lastScatteringRedshift"),
    );
    expect(runOne(givens, ["age", "luminosityDistance(1.1)"]).status).toBe(rowStatus.engine);
  });

  it("computes what only the single path knows, and names it", () => {
    const plan = prepareBatch({ outputs: ["age", "visibilityWidth"], closeModel });
    expect(plan.singlePathOutputs).toEqual(["visibilityWidth"]);
    const { values, status } = runOne(base, ["age", "visibilityWidth"]);
    expect(status).toBe(rowStatus.engine);
    expect(values[1]).toBe(evaluateModel(base).value("visibilityWidth"));
  });

  it("leaves a failed row empty, says why, and goes on", () => {
    const plan = prepareBatch({ outputs: ["age", "acousticAngle"], closeModel });
    const out = { age: new Float64Array(4), acousticAngle: new Float64Array(4) };
    const problems: BatchProblem[] = [];
    const status = new Uint8Array(4);
    const columns = { ...base, hubble: Float64Array.of(67, Number.NaN, -3, 68) };
    const counts = plan.run(columns, { from: 0, to: 4 }, out, problems, status);
    expect([...status]).toEqual([rowStatus.engine, rowStatus.failed, rowStatus.failed, rowStatus.engine]);
    expect(counts.failed).toBe(2);
    expect(out.age[1]).toBeNaN();
    expect(out.age[3]).toBeGreaterThan(13);
    expect(problems.map(({ row }) => row)).toEqual([1, 2]);
    expect(problems[1]!.message).toMatch(/hubble must be finite and positive, got -3/);
  });

  it("marks a row partly empty where one output has no value", () => {
    // No Big Bang: a distance is there, an age is not.
    const bounce: ModelGivens = { hubble: 70, baryonDensity: 0.02, coldMatterDensity: 0.03, curvature: -0.9 };
    const { values, status, problems } = runOne(bounce, ["luminosityDistance(0.1)", "age"]);
    expect(status).toBe(rowStatus.partlyEmpty);
    expect(values[0]).toBe(evaluateModel(bounce).value("luminosityDistance", 0.1));
    expect(values[1]).toBeNaN();
    expect(problems).toMatchObject([{ row: 0, output: "age", message: expect.stringMatching(/Big Bang/) }]);
  });

  it("refuses bad requests before any row is computed", () => {
    expect(() => prepareBatch({ outputs: ["acousticAngel"], closeModel })).toThrow(UnknownNameError);
    expect(() => prepareBatch({ outputs: ["age(1)"], closeModel })).toThrow(DomainError);
    const plan = prepareBatch({ outputs: ["age"], closeModel });
    const out = { age: new Float64Array(1) };
    const rows = { from: 0, to: 1 };
    expect(() => plan.run({ hubble: 70, baryonDensity: 0.02 }, rows, out)).toThrow(InconsistentParametersError);
    expect(() => plan.run({ ...base, reducedHubble: 0.7 }, rows, out)).toThrow(/state the expansion rate today twice/);
    expect(() => plan.run({ ...base, hubbel: 70 }, rows, out)).toThrow(UnknownNameError);
    expect(() => plan.run({ ...base, hubble: new Float64Array(0) }, rows, out)).toThrow(/must have 1 rows/);
    expect(() => plan.run(base, { from: 2, to: 1 }, out)).toThrow(DomainError);
    expect(() => plan.run(base, rows, {})).toThrow(/output column "age"/);
  });
});
