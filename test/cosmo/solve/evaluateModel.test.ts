import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { plain } from "../exactModels";

describe("evaluateModel(givens)", () => {
  it("gives a number by name with its unit, error, method and sources", () => {
    const distance = evaluateModel(plain).quantity("luminosityDistance", 1.1);
    expect(distance.unit).toBe("Mpc");
    expect(distance.symbol).toBe("D_L");
    expect(distance.arguments).toEqual([1.1]);
    expect(distance.error).toBeGreaterThan(0);
    expect(distance.error / distance.value).toBeLessThan(1e-12);
    expect(distance.sources).toEqual(["hogg1999"]);
    expect(evaluateModel(plain).value("luminosityDistance", 1.1)).toBe(distance.value);
  });

  it("computes the expansion once for all quantities", () => {
    const numbers = evaluateModel(plain);
    numbers.value("age");
    numbers.value("luminosityDistance", 2);
    numbers.value("comovingVolume", 1, 2);
    const parts = numbers.evaluation.computedParts();
    expect(parts.filter((part) => part === "expansion")).toEqual(["expansion"]);
    expect(new Set(parts).size).toBe(parts.length);
  });

  it("names where the model stood in its errors", () => {
    expect(() => evaluateModel({ ...plain, hubble: -1 }, { where: "derive", place: "row 17" })).toThrow(
      "derive: hubble must be finite and positive, got -1 (row 17)",
    );
    const numbers = evaluateModel(plain, { where: "derive", place: "row 17" });
    expect(() => numbers.value("ageAt", -1.5)).toThrow(
      "ageAt: redshift must be finite and above -1, got -1.5 (row 17)",
    );
    expect(() => numbers.value("agee")).toThrow('derive: "agee" is not a known quantity');
  });

  it("names the constants set that a density hangs on, and the default values' own sources", () => {
    const numbers = evaluateModel({ ...plain, conventions: { constants: "codata2014" } });
    expect(numbers.quantity("photonDensity").sources).toEqual(["codata2014"]);
    expect(numbers.quantity("photonTemperature").sources).toEqual(["fixsen2009"]);
    expect(numbers.quantity("neutrinos.effectiveNumber").sources).toEqual(["bennett2021", "froustey2020"]);
    expect(numbers.quantity("helium").sources).toEqual(["planck2015Parameters"]);
    expect(evaluateModel({ ...plain, helium: 0.25 }).quantity("helium").sources).toEqual([]);
  });
});
