import { describe, expect, it } from "vitest";
import type { ModelQuantity } from "../../cosmo/expansion";
import type { ModelGivens } from "../../cosmo/model";
import { quantityRegister } from "../../cosmo/quantities";
import { referenceBounds } from "./bounds";
import { ReferenceModels, readReferences, referenceModels } from "./readReferences";

/**
 * Every file of values/ against the program. The values come from generators/ (NumPy, SciPy, mpmath), which import nothing of the
 * program; a file holds each value at two tolerances.
 */
const files = readReferences();
const names = files.map((file) => file.name);
const givensByName = referenceModels();
const models = new ReferenceModels();

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
    expect(Object.keys(referenceBounds).sort()).toEqual([...names].sort());
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

  for (const file of files) {
    const { name, tier } = file;
    const stated = referenceBounds[name];
    if (stated === undefined) continue;
    const [bound] = stated;
    const definition = quantityRegister.get(file.quantity);

    it(`${name}: the two tolerances of the reference agree within a tenth of ${bound}, and its values are not zero`, () => {
      const zeros = file.rows.filter((row) => row.value === 0).length;
      expect(zeros).toBeLessThan(file.rows.length / 4);
      for (const row of file.rows) {
        expect(difference(row.looserValue, row.value), JSON.stringify(row)).toBeLessThan(bound / 10);
      }
    });

    it(`${name} meets its reference within ${bound}`, () => {
      expect(definition, `the register has no ${file.quantity}`).toBeDefined();
      expect(unitOf(definition!)).toBe(file.unit);
      let worst = 0;
      let worstRow = "";
      for (const row of file.rows) {
        const { arguments: values, value: expected } = row;
        const asked = models.numbers(row.model, tier);
        const value = asked.value(file.quantity, ...values);
        // What does not hang on an integrated history knows its own error.
        if (definition!.usesHistory !== true && tier === undefined) {
          const { error } = asked.quantity(file.quantity, ...values);
          expect(Math.abs(value - expected), JSON.stringify(row)).toBeLessThanOrEqual(error);
        }
        const off = difference(value, expected);
        if (!(off <= worst)) {
          worst = off;
          worstRow = JSON.stringify(row);
        }
        // A bound so loose that ten times it would pass too tests nothing.
        if (expected !== 0) expect(difference(value, expected * (1 + 10 * bound))).toBeGreaterThan(bound);
      }
      if (process.env.SHOW_MEASURED !== undefined) console.log(`${name} ${worst.toExponential(1)} at ${worstRow}`);
      expect(worst, worstRow).toBeLessThanOrEqual(bound);
    });
  }
});
