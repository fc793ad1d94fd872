import { describe, expect, it } from "vitest";
import { digitsText, roundDigits } from "../../../kernel-ext/data";
import { uniformNumbers } from "../chain/invented";

describe("digitsText", () => {
  it("is the shortest text of the rounded number", () => {
    const uniform = uniformNumbers(77);
    const cases = [
      0, -0, 1, -1, 100, 1e5, 123456789, 1234567890, 0.1, 1e-6, 1.5e-7, 1e21, 1.25e22, -13.5, 9.9999999999, 5e-324,
    ];
    for (let k = 0; k < 20_000; k++) cases.push((uniform() - 0.5) * 10 ** Math.floor(30 * uniform() - 12));
    for (const value of cases) {
      for (const digits of [1, 4, 9, 15, 17]) {
        const expected = String(roundDigits(value, digits) + 0);
        if (digitsText(value, digits) !== expected)
          expect([value, digits, digitsText(value, digits)]).toEqual([value, digits, expected]);
      }
    }
  });

  it("refuses what is not finite", () => {
    expect(() => digitsText(Number.NaN, 9)).toThrow("digitsText: value must be finite, got NaN");
  });
});
