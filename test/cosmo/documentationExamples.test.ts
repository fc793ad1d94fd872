import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import * as distances from "../../cosmo/distances";
import * as expansion from "../../cosmo/expansion";
import { evaluateModel } from "../../cosmo/solve";
import * as times from "../../cosmo/times";
import { plain } from "./exactModels";

const functions: Record<string, unknown> = { ...expansion, ...times, ...distances };
const example = /@example (\w+)\(evaluation(?:, ([^)]*))?\)(?:\.value)? \/\/ ([0-9.e+-]+)/g;

/** Half a unit in the last digit that is printed and not a trailing zero of an integer. */
function halfUnit(printed: string): number {
  const [mantissa, exponent = "0"] = printed.split("e") as [string, string?];
  const decimals = mantissa.includes(".") ? mantissa.split(".")[1]!.length : -/0*$/.exec(mantissa)![0].length;
  return 0.5 * 10 ** (Number(exponent) - decimals);
}

describe("the examples in the documentation of expansion, times and distances", () => {
  const { evaluation } = evaluateModel(plain);
  let count = 0;
  for (const room of ["expansion", "times", "distances"]) {
    const folder = join(__dirname, "../../cosmo", room);
    for (const file of readdirSync(folder)) {
      for (const [, name, given, printed] of readFileSync(join(folder, file), "utf8").matchAll(example)) {
        count++;
        it(`${name}(${given ?? ""}) is ${printed} for the plain model`, () => {
          const compute = functions[name!] as (...values: unknown[]) => number | { value: number };
          const result = compute(evaluation, ...(given === undefined ? [] : given.split(",").map(Number)));
          const value = typeof result === "number" ? result : result.value;
          expect(Math.abs(value - Number(printed))).toBeLessThanOrEqual(halfUnit(printed!));
        });
      }
    }
  }

  it("are more than 20", () => {
    expect(count).toBeGreaterThan(20);
  });
});
