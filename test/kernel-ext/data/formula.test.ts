import { describe, expect, it } from "vitest";
import { compileFormula } from "../../../kernel-ext/data/formula";
import { FormulaError } from "../../../kernel-ext/data/formulaError";
import { formulaFunctions } from "../../../kernel-ext/data/formulaGrammar";

const at = (text: string, z: number) => compileFormula(text, ["z"]).evaluate({ z });

describe("compileFormula(text, variables)", () => {
  it("computes arithmetic as it is written", () => {
    expect(at("-1 + 0.1 z/(1 + z)", 1)).toBeCloseTo(-0.95, 15);
    expect(at("2^3^2", 0)).toBe(512);
    expect(at("-2^2", 0)).toBe(-4);
    expect(at("-1 + 0.2*sin(3*log(1 + z))", 0.7)).toBeCloseTo(-1 + 0.2 * Math.sin(3 * Math.log(1.7)), 15);
    expect(at("2 pi z", 0.5)).toBeCloseTo(Math.PI, 15);
    expect(at("log(e)", 0)).toBeCloseTo(1, 15);
    expect(at("log(8, 2)", 0)).toBeCloseTo(3, 14);
    expect(at("1e-3 z", 2)).toBe(2e-3);
    expect(at("max(z, 1, 2)", 0)).toBe(2);
  });

  it("takes cases by condition", () => {
    const text = "z < 1 ? -1 : -0.5";
    expect(at(text, 0.5)).toBe(-1);
    expect(at(text, 1.5)).toBe(-0.5);
    expect(at("0.5 < z < 1 and not (z > 0.8) ? 1 : 0", 0.7)).toBe(1);
    expect(at("0.5 < z < 1 and not (z > 0.8) ? 1 : 0", 0.9)).toBe(0);
  });

  it("tells which variables occur, and gives NaN where the formula has no value", () => {
    expect(compileFormula("1 - a", ["z", "a"]).variables).toEqual(["a"]);
    expect(compileFormula("-1", ["z", "a"]).variables).toEqual([]);
    expect(at("log(z)", -1)).toBeNaN();
    expect(at("sqrt(z)", -1)).toBeNaN();
    expect(at("0/z", 0)).toBeNaN();
  });

  it("knows every function of its list as JavaScript does", () => {
    for (const [name, [least]] of formulaFunctions) {
      const x = name === "acosh" ? 1.5 : 0.4;
      const values = least === 1 ? `${x}` : `${x}, 0.7`;
      const expected = (Math as unknown as Record<string, (...values: number[]) => number>)[name]!(
        x,
        ...(least === 1 ? [] : [0.7]),
      );
      expect(at(`${name}(${values})`, 0), name).toBeCloseTo(expected, 14);
    }
  });

  const refused: [text: string, message: string | RegExp, hint?: string][] = [
    ["", "is empty"],
    ["  ", "is empty"],
    ["-1 + 0.1 q", "has an unknown name q (character 10)", "known: z, pi, e, abs"],
    ["-1 + sine(z)", "has an unknown function sine (character 6)", "known: abs"],
    ["z(1 + z)", "calls z, which is no function (character 1)", "write z*(...) for a product"],
    ["sin + 1", "has the function sin without an argument (character 1)", "write sin(...)"],
    ["atan2(z)", "gives atan2 1 argument, it takes 2 (character 1)"],
    ["-1 + ", "cannot be read: unexpected end of expression (character 6)"],
    ["(1 + z", "cannot be read: parenthesis ) expected (character 7)"],
    ["-1 + * z", /cannot be read: value expected \(character 6\)/],
    [
      "1/2 z",
      "has a product without its sign beside a division, which may mean two things",
      "write the product with *",
    ],
    ["1/z z", "has a product without its sign beside a division"],
    ["z = 1", "assigns a value"],
    ["f(z) = z", "defines a function"],
    ["1; 2", "has more than one statement"],
    ["[1, 2]", "has a list"],
    ["{x: 1}", "has an object"],
    ["z.constructor", "reads a property or an element"],
    ['z["constructor"]', "reads a property or an element"],
    ['"text"', "has a text or another thing that is no number"],
    ["1:3", "has a range"],
    ["5!", "has the operator !, which formulas do not take (character 2)"],
    ["5 % 3", "has the operator %, which formulas do not take (character 3)"],
    ["z'", "has the operator ', which formulas do not take (character 2)"],
    ["z < 1", "gives true or false, not a number", "use it as condition"],
    ["z ? 1 : 2", "needs a comparison such as z < 1 for what stands before ?"],
    ["1 + (z < 1)", "needs a number for what stands beside +"],
    ["z == 1 ? 1 : 2", "has the operator ==, which formulas do not take (character 3)"],
    ["1e400 z", "has a number that is not finite"],
    ['import("fs")', "has an unknown function import"],
    ['evaluate("1")', "has an unknown function evaluate"],
    ['parse("1")', "has an unknown function parse"],
    ["simplify(z)", "has an unknown function simplify"],
    ["derivative(z, z)", "has an unknown function derivative"],
    ["createUnit(z)", "has an unknown function createUnit"],
    ["cos.constructor(1)", "reads a property or an element"],
    ["i", "has an unknown name i"],
    ["Infinity", "has a number that is not finite"],
    ["NaN", "has a number that is not finite"],
    ["true", "gives true or false"],
    ["null", "has a text or another thing that is no number"],
    [`-1 ${"+ z".repeat(300)}`, "has 903 characters; 500 are allowed"],
  ];
  for (const [text, message, hint] of refused) {
    it(`refuses ${text.length > 40 ? `a formula of ${text.length} characters` : JSON.stringify(text)}`, () => {
      let failure: unknown;
      try {
        compileFormula(text, ["z"]);
      } catch (error) {
        failure = error;
      }
      expect(failure).toBeInstanceOf(FormulaError);
      const error = failure as FormulaError;
      if (typeof message === "string") expect(error.message).toContain(message);
      else expect(error.message).toMatch(message);
      expect(error.message.startsWith("the formula ")).toBe(true);
      if (hint !== undefined) expect(error.hint).toContain(hint);
    });
  }

  it("does not let a variable's value reach past it", () => {
    const formula = compileFormula("z + 1", ["z"]);
    expect(formula.evaluate({ z: 1, a: 5 })).toBe(2);
    expect(formula.evaluate({ z: 1 })).toBe(2);
    expect(formula.evaluate({})).toBeNaN();
  });
});
