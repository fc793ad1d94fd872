import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import type { ModelQuantity } from "../../cosmo/expansion";
import type { ModelGivens, RecombinationTier } from "../../cosmo/model";
import { quantityRegister } from "../../cosmo/quantities";
import { evaluateModel, type ModelNumbers } from "../../cosmo/solve";
import { referenceBounds } from "./bounds";

/**
 * Every file of values/ against the program. The values come from generators/ (NumPy, SciPy, mpmath), which import nothing of the
 * program; a file holds each value at two tolerances.
 */
interface ReferenceFile {
  quantity: string;
  unit: string;
  rows: [string, ...number[]][];
}

const folder = join(__dirname, "values");
const names = readdirSync(folder)
  .filter((file) => file.endsWith(".json"))
  .map((file) => file.slice(0, -".json".length))
  .sort();
const tiers = ["saha", "peebles", "calibrated"];

const givensByName = new Map(
  (
    JSON.parse(readFileSync(join(__dirname, "models.json"), "utf8")) as {
      name: string;
      givens: ModelGivens;
    }[]
  ).map((model) => [model.name, model.givens]),
);

const evaluated = new Map<string, ModelNumbers>();

/** A model at a tier, evaluated once for all files. */
function numbersOf(model: string, tier: string | undefined): ModelNumbers {
  const key = `${model} ${tier}`;
  let numbers = evaluated.get(key);
  if (numbers === undefined) {
    const givens = givensByName.get(model);
    if (givens === undefined) throw new Error(`models.json has no model ${model}`);
    numbers = evaluateModel(tier === undefined ? givens : { ...givens, recombination: tier as RecombinationTier });
    evaluated.set(key, numbers);
  }
  return numbers;
}

/** What a file's name says after the quantity: a tier of recombination, or that pairs of redshifts are asked for. */
function tierOf(name: string): string | undefined {
  const tag = name.split(".")[1];
  if (tag === undefined || tag === "between") return undefined;
  if (tiers.includes(tag)) return tag;
  throw new Error(`${name}.json: ${tag} is neither a tier nor "between"`);
}

/** Relative; a reference of zero (massless neutrinos have no massive density) must be met exactly. */
const difference = (value: number, expected: number) =>
  expected === 0 ? (value === 0 ? 0 : Number.POSITIVE_INFINITY) : Math.abs(value / expected - 1);

/** The unit as the reference files word it: "1" for a pure number, and "100 theta in rad" is theta in units of 0.01 rad. */
function unitOf(definition: ModelQuantity): string {
  if (definition.unit === "rad" && definition.symbol.startsWith("100 ")) return "0.01 rad";
  return definition.unit === "" ? "1" : definition.unit;
}

describe("reference values", () => {
  it("every file of values/ has a bound, and every bound its file", () => {
    expect(Object.keys(referenceBounds).sort()).toEqual(names);
  });

  it("cover at least 30 models, each departure from the defaults in at least 8", () => {
    const all = [...givensByName.values()];
    expect(all.length).toBeGreaterThanOrEqual(30);
    const count = (test: (givens: ModelGivens) => boolean) => all.filter(test).length;
    expect(count((givens) => (givens.curvature ?? 0) < 0)).toBeGreaterThanOrEqual(8);
    expect(count((givens) => (givens.curvature ?? 0) > 0)).toBeGreaterThanOrEqual(8);
    expect(count((givens) => givens.neutrinos?.masses !== undefined)).toBeGreaterThanOrEqual(8);
    expect(count((givens) => givens.darkEnergy !== undefined)).toBeGreaterThanOrEqual(8);
    expect(count((givens) => givens.neutrinos?.effectiveNumber !== undefined)).toBeGreaterThanOrEqual(8);
    expect(count((givens) => givens.conventions?.closure === "radiationOnTop")).toBeGreaterThanOrEqual(8);
  });

  for (const name of names) {
    const file = JSON.parse(readFileSync(join(folder, `${name}.json`), "utf8")) as ReferenceFile;
    const stated = referenceBounds[name];
    if (stated === undefined) continue;
    const [bound] = stated;
    const definition = quantityRegister.get(file.quantity);

    it(`${name}: the two tolerances of the reference agree within a tenth of ${bound}, and its values are not zero`, () => {
      const zeros = file.rows.filter((row) => row[row.length - 2] === 0).length;
      expect(zeros).toBeLessThan(file.rows.length / 4);
      for (const row of file.rows) {
        const [value, looser] = row.slice(-2) as [number, number];
        expect(difference(looser, value), row.join(" ")).toBeLessThan(bound / 10);
      }
    });

    it(`${name} meets its reference within ${bound}`, () => {
      expect(definition, `the register has no ${file.quantity}`).toBeDefined();
      const tier = tierOf(name);
      expect(unitOf(definition!)).toBe(file.unit);
      let worst = 0;
      let worstRow = "";
      for (const row of file.rows) {
        const [model, ...numbers] = row;
        const expected = numbers[numbers.length - 2]!;
        const asked = numbersOf(model, tier);
        const values = numbers.slice(0, -2);
        const value = asked.value(file.quantity, ...values);
        // What does not hang on an integrated history knows its own error.
        if (definition!.usesHistory !== true && tier === undefined) {
          const { error } = asked.quantity(file.quantity, ...values);
          expect(Math.abs(value - expected), row.join(" ")).toBeLessThanOrEqual(error);
        }
        const off = difference(value, expected);
        if (!(off <= worst)) {
          worst = off;
          worstRow = row.join(" ");
        }
        // A bound so loose that ten times it would pass too tests nothing.
        if (expected !== 0) expect(difference(value, expected * (1 + 10 * bound))).toBeGreaterThan(bound);
      }
      if (process.env.SHOW_MEASURED !== undefined) console.log(`${name} ${worst.toExponential(1)} at ${worstRow}`);
      expect(worst, worstRow).toBeLessThanOrEqual(bound);
    });
  }
});
