import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { compileEquation, compileModel, portableModel } from "../../../kernel-ext/cells/compileModel";

const base = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };

describe("compileModel(model, where)", () => {
  it("turns the text of an equation of state into what a model takes", () => {
    const model = compileModel({ ...base, darkEnergy: { equation: "-0.9 + 0.3 (1 - a)" } }, "test");
    const closed = evaluateModel({ ...base, darkEnergy: { w0: -0.9, wa: 0.3 } });
    const numbers = evaluateModel(model);
    for (const name of ["age", "accelerationRedshift", "equalityWavenumber"]) {
      // Measured 2e-15.
      expect(Math.abs(numbers.value(name) / closed.value(name) - 1), name).toBeLessThan(1e-12);
    }
    expect(numbers.model.darkEnergy.equation?.text).toBe("-0.9 + 0.3 (1 - a)");
    expect(numbers.model.darkEnergy.equation?.variable).toBe("a");
  });

  it("leaves every other model as it is, also what is no model", () => {
    expect(compileModel(base, "test")).toBe(base);
    const compiled = compileModel({ ...base, darkEnergy: { equation: "-1" } }, "test");
    expect(compileModel(compiled, "test")).toBe(compiled);
    expect(compileModel(undefined as never, "test")).toBe(undefined);
  });

  it("comes back as text from portableModel, survives structured cloning and JSON, and compiles again", () => {
    const model = { ...base, darkEnergy: { equation: "-1 + 0.1 z/(1 + z)" } };
    const compiled = compileModel(model, "test");
    expect(portableModel(compiled)).toEqual(model);
    expect(portableModel(base)).toBe(base);
    const age = evaluateModel(compiled).value("age");
    expect(evaluateModel(compileModel(structuredClone(portableModel(compiled)), "test")).value("age")).toBe(age);
    const written = JSON.parse(JSON.stringify(compiled)) as typeof compiled;
    expect(evaluateModel(compileModel(written, "test")).value("age")).toBe(age);
  });

  it("takes a constant, and refuses both letters and bad formulas by place", () => {
    expect(compileEquation("-0.9", "test").evaluate(3)).toBe(-0.9);
    expect(() => compileEquation("z a", "distanceCell")).toThrow(
      'distanceCell: darkEnergy.equation must be in z or in a, not in both, got "z a"',
    );
    expect(() => compileEquation("-1 + 0.1 t", "distanceCell", "row 3")).toThrow(
      'distanceCell: darkEnergy.equation must be a formula in z or in a; this one has an unknown name t (character 10), got "-1 + 0.1 t" (row 3)',
    );
  });
});
