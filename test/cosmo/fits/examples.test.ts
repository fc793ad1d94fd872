import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import * as acoustics from "../../../cosmo/acoustics";
import * as blackbody from "../../../cosmo/blackbody";
import { constantsSets } from "../../../cosmo/constants";
import * as fits from "../../../cosmo/fits";
import * as recombination from "../../../cosmo/recombination";
import { evaluateModel } from "../../../cosmo/solve";
import { plain } from "../exactModels";

const functions: Record<string, unknown> = { ...acoustics, ...blackbody, ...fits, ...recombination };
const example = /@example (\w+)\(([^{)]*)\) \/\/ ([0-9.e+-]+)/g;

/** Half a unit in the last digit that is printed and not a trailing zero of an integer. */
function halfUnit(printed: string): number {
  const [mantissa, exponent = "0"] = printed.split("e") as [string, string?];
  const decimals = mantissa.includes(".") ? mantissa.split(".")[1]!.length : -/0*$/.exec(mantissa)![0].length;
  return 0.5 * 10 ** (Number(exponent) - decimals);
}

describe("the examples in the documentation of blackbody, fits, acoustics and eta", () => {
  const { evaluation } = evaluateModel(plain);
  let count = 0;
  const rooms = { blackbody: /\.ts$/, fits: /\.ts$/, acoustics: /\.ts$/, recombination: /^baryonTo/ };
  for (const [room, which] of Object.entries(rooms)) {
    const folder = join(__dirname, "../../../cosmo", room);
    for (const file of readdirSync(folder).filter((name) => which.test(name))) {
      for (const [, name, given, printed] of readFileSync(join(folder, file), "utf8").matchAll(example)) {
        const compute = functions[name!] as ((...values: unknown[]) => number) | undefined;
        if (compute === undefined) continue;
        count++;
        it(`${name}(${given}) is ${printed}`, () => {
          const values = given!.split(", ").map((each) => {
            if (each === "evaluation") return evaluation;
            return each === "constantsSets.codata2022" ? constantsSets.codata2022 : Number(each);
          });
          expect(Math.abs(compute(...values) - Number(printed))).toBeLessThanOrEqual(halfUnit(printed!));
        });
      }
    }
  }

  it("are more than 20", () => {
    expect(count).toBeGreaterThan(20);
  });
});
