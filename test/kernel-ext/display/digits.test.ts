import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { formatNumber, formatWithError } from "../../../kernel-ext/display";
import { alignOnPoint } from "../../../kernel-ext/display/digits";

/** Reads a shown number again. */
function parsed(text: string): number {
  const plain = text
    .replaceAll("\u202f", "")
    .replace(
      /\u00d710([\u2070\u00b9\u00b2\u00b3\u2074-\u2079\u207b]+)/u,
      (_, power: string) =>
        `e${[...power].map((c) => (c === "\u207b" ? "-" : "\u2070\u00b9\u00b2\u00b3\u2074\u2075\u2076\u2077\u2078\u2079".indexOf(c))).join("")}`,
    )
    .replaceAll("\u2212", "-");
  return Number(plain);
}

describe("formatNumber", () => {
  it("writes as many significant digits as are asked for, as Intl.NumberFormat rounds them", () => {
    // ICU, through Intl.NumberFormat, is the reference for the digits.
    const icu = new Intl.NumberFormat("en", {
      minimumSignificantDigits: 6,
      maximumSignificantDigits: 6,
      useGrouping: false,
    });
    for (const value of [1089.9234, 0.0104109, 144.4, 67.36, 0.12, 99999.96, 3]) {
      expect(formatNumber(value, { digits: 6 }).replaceAll("\u202f", "")).toBe(icu.format(value));
    }
  });

  it("uses a true minus and spaces between thousands from five digits on", () => {
    // Grouping by spaces, not for four digits alone: SI Brochure, 9th edition, 5.4.4 (memory). Minus is U+2212.
    expect(formatNumber(-13869.5, { digits: 6 })).toBe("\u221213\u202f869.5");
    expect(formatNumber(2853.1, { digits: 5 })).toBe("2853.1");
  });

  it("writes powers of ten where plain zeros would pretend to be known", () => {
    expect(formatNumber(13869, { digits: 3 })).toBe("1.39\u00d710\u2074");
    expect(formatNumber(1.23e-5, { digits: 3 })).toBe("1.23\u00d710\u207b\u2075");
    expect(formatNumber(-6.02214e23, { digits: 4 })).toBe("\u22126.022\u00d710\u00b2\u00b3");
    expect(formatNumber(0.000123, { digits: 3 })).toBe("0.000123");
  });

  it("without digits writes at most six and no closing zeros", () => {
    expect(formatNumber(0.5)).toBe("0.5");
    expect(formatNumber(1 / 3)).toBe("0.333333");
    expect(formatNumber(120)).toBe("120");
    expect(formatNumber(123456)).toBe("123\u202f456");
    expect(formatNumber(1e6)).toBe("1\u00d710\u2076");
  });

  it('with digits "all" gives back the number exactly', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        expect(parsed(formatNumber(value, { digits: "all" })) + 0).toBe(value + 0);
      }),
    );
  });

  it("is never wrong by more than half of its last digit", () => {
    const value = fc.double({ min: 1e-300, max: 1e300, noNaN: true });
    fc.assert(
      fc.property(value, fc.integer({ min: 1, max: 15 }), (number, digits) => {
        const error = Math.abs(parsed(formatNumber(number, { digits })) - number);
        // Half a unit of the last digit is at most 0.5 10^(1-digits) of the value; 1e-15 covers the reading back.
        expect(error / number).toBeLessThanOrEqual(0.5 * 10 ** (1 - digits) * (1 + 1e-6) + 1e-15);
      }),
    );
  });

  it("says infinite, and never NaN", () => {
    expect(formatNumber(Number.POSITIVE_INFINITY)).toBe("\u221e");
    expect(formatNumber(Number.NEGATIVE_INFINITY)).toBe("\u2212\u221e");
    expect(() => formatNumber(Number.NaN)).toThrow("formatNumber: value must be a number, got NaN");
    expect(() => formatNumber(1, { digits: 0 })).toThrow("digits must be a whole number from 1 to 17, got 0");
  });

  it("writes zero as 0, also the negative one", () => {
    expect(formatNumber(0, { digits: 4 })).toBe("0");
    expect(formatNumber(-0)).toBe("0");
  });
});

describe("formatWithError", () => {
  it("rounds both to two digits of the error", () => {
    // At most two significant digits for an uncertainty: GUM (JCGM 100:2008), 7.2.6 (memory).
    expect(formatWithError(1089.9234, 0.2531)).toBe("1089.92 \u00b1 0.25");
    expect(formatWithError(67.36, 0.54)).toBe("67.36 \u00b1 0.54");
    expect(formatWithError(13869.4, 123)).toBe("13\u202f870 \u00b1 120");
    expect(formatWithError(1.04109, 0.0003)).toBe("1.04109 \u00b1 0.00030");
  });

  it("carries when the error rounds up to the next power of ten", () => {
    expect(formatWithError(1.23456, 0.0996)).toBe("1.23 \u00b1 0.10");
  });

  it("takes out a power of ten where zeros would be many", () => {
    expect(formatWithError(1.2345e-5, 1.2e-7)).toBe("(1.234 \u00b1 0.012)\u00d710\u207b\u2075");
    expect(formatWithError(6.02214e23, 3e19)).toBe("(6.02214 \u00b1 0.00030)\u00d710\u00b2\u00b3");
  });

  it("writes a value smaller than its error, and no minus before zero", () => {
    expect(formatWithError(-0.0004, 0.02)).toBe("0.000 \u00b1 0.020");
    expect(formatWithError(0, 0.0019)).toBe("0.0000 \u00b1 0.0019");
  });

  it("refuses an error that is negative or not a number", () => {
    expect(() => formatWithError(1, -0.1)).toThrow("formatWithError: error must be finite and not negative, got -0.1");
    expect(() => formatWithError(1, Number.NaN)).toThrow("got NaN");
    expect(() => formatWithError(Number.NaN, 1)).toThrow("formatWithError: value must be finite, got NaN");
  });
});

describe("alignOnPoint", () => {
  it("brings the decimal points of a column under each other", () => {
    const column = ["0.500", "13\u202f869.9", "7", "1.5\u00d710\u207b\u2075", "\u2014"];
    const lines = alignOnPoint(column).map(({ text, before, after }) => " ".repeat(before) + text + " ".repeat(after));
    expect(new Set(lines.map((line) => line.length)).size).toBe(1);
    expect(new Set(lines.filter((line) => line.includes(".")).map((line) => line.indexOf("."))).size).toBe(1);
    expect(lines[2]?.indexOf("7")).toBe((lines[0]?.indexOf(".") as number) - 1);
  });
});
