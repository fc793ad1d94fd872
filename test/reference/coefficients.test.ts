import { readdirSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { dependsOn, type Literal, literalsOf, ModuleCopy, withFactor } from "./changedCopies";
import { coefficientChecks, fails } from "./coefficientChecks";
import { coefficientFiles, exclusionOf, exclusions, isSmall } from "./coefficientFiles";

/**
 * A test of the tests: each physical coefficient of cosmo/ is changed by one part in a million, alone, in a copy of the modules that
 * see it, and a reference has to notice: a value of formulas/ or values/ is then off by more than its bound.
 */
const change = 1 + 1e-6;

/** The modules as they are; copies with a change share with it what the change does not reach. */
const unchanged = new ModuleCopy();

const where = (place: string, literal: Literal) => `${place}:${literal.line} ${literal.text} in: ${literal.lineText}`;

const coefficientsOf = (place: string) =>
  literalsOf(place).filter((literal) => !isSmall(literal) && exclusionOf(place, literal) === undefined);

describe("coefficients", () => {
  it("are met by every check as they stand, also in a copy where a factor of one is written in", () => {
    const place = "constants/constantsSets";
    const text = withFactor(place, coefficientsOf(place)[0]!, 1);
    const copy = new ModuleCopy(unchanged, { place, text });
    for (const check of coefficientChecks) expect(fails(check, copy), check.name).toBe(false);
  });

  for (const place of coefficientFiles) {
    it(`of ${place} cannot change by a millionth without a reference noticing`, () => {
      const checks = coefficientChecks.filter((check) => check.modules.some((module) => dependsOn(module, place)));
      const unnoticed = coefficientsOf(place).filter((literal) => {
        const copy = new ModuleCopy(unchanged, { place, text: withFactor(place, literal, change) });
        return !checks.some((check) => fails(check, copy));
      });
      expect(unnoticed.map((literal) => where(place, literal))).toEqual([]);
    });
  }

  it("are some six hundred, in every file of the rooms of constants, fits and blackbodies that has any", () => {
    const counts = coefficientFiles.map((place) => coefficientsOf(place).length);
    const total = counts.reduce((sum, count) => sum + count, 0);
    if (process.env.SHOW_MEASURED !== undefined)
      console.log(`${total} coefficients in ${coefficientFiles.length} files`);
    expect(total).toBeGreaterThan(550);
    for (const room of ["constants", "fits", "blackbody"]) {
      for (const file of readdirSync(join(__dirname, "..", "..", "cosmo", room))) {
        const place = `${room}/${file.slice(0, -".ts".length)}`;
        if (!coefficientFiles.includes(place)) expect(coefficientsOf(place), place).toEqual([]);
      }
    }
  });

  it("are not left out by an exclusion that excludes nothing", () => {
    const used = new Set(
      coefficientFiles.flatMap((place) => literalsOf(place).map((literal) => exclusionOf(place, literal))),
    );
    expect(exclusions.filter((exclusion) => !used.has(exclusion))).toEqual([]);
  });
});
