import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { parseNumber, roundDigits } from "../../../kernel-ext/data";

describe("parseNumber", () => {
  it("reads back every finite double from its shortest text (ECMA-262, Number::toString and StringToNumber)", () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        const parsed = parseNumber(String(value));
        expect(parsed).toEqual({ value: Object.is(value, -0) ? 0 : value });
      }),
    );
  });

  it("reads signs, points, exponents and blanks around", () => {
    for (const [text, value] of [
      ["67.4", 67.4],
      [" +.5 ", 0.5],
      ["5.", 5],
      ["-2.5E-3", -0.0025],
      ["1e+3", 1000],
      ["00123", 123],
      ["0e-999", 0],
      // The largest and the smallest double of IEEE 754 binary64.
      ["1.7976931348623157e308", Number.MAX_VALUE],
      ["4.9e-324", Number.MIN_VALUE],
    ] as const) {
      expect(parseNumber(text), text).toEqual({ value });
    }
  });

  it("refuses what is not a decimal number, each with its reason", () => {
    const plain = "must be a number such as 67.4 or 2.2e-2";
    for (const [text, reason] of [
      ["", "must be a number, and it is empty"],
      ["  ", "must be a number, and it is empty"],
      ["NaN", "must be a finite number"],
      ["-inf", "must be a finite number"],
      ["Infinity", "must be a finite number"],
      ["1e400", "is beyond the range of double precision"],
      ["-1e400", "is beyond the range of double precision"],
      ["1e-400", "is beyond the range of double precision"],
      ["12abc", plain],
      ["0x10", plain],
      ["1_000", plain],
      ["1,5", plain],
      ["1.2.3", plain],
      ["1e", plain],
      ["--1", plain],
      ["\u22121", plain],
      ["67.4 0.3", plain],
      ["null", plain],
    ] as const) {
      expect(parseNumber(text), JSON.stringify(text)).toEqual({ reason });
    }
  });
});

describe("roundDigits", () => {
  it("keeps fifteen significant digits of any number that was written with fifteen (DBL_DIG of C, ISO/IEC 9899 5.2.4.2.2)", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1e14, max: 999_999_999_999_999 }),
        fc.integer({ min: -300, max: 290 }),
        (mantissa, exponent) => {
          const written = Number(`${mantissa}e${exponent}`);
          expect(roundDigits(written, 15)).toBe(written);
        },
      ),
    );
  });

  it("rounds, and refuses what is not finite", () => {
    expect(roundDigits(13.792749503791248, 15)).toBe(13.7927495037912);
    expect(roundDigits(-1089.8807, 3)).toBe(-1090);
    expect(() => roundDigits(Number.NaN, 15)).toThrow("roundDigits: value must be finite, got NaN");
  });
});
