import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { placeLabels } from "../../../kernel-ext/display/chart/labelPlaces";
import { estimatedWidth, wrapText } from "../../../kernel-ext/display/chart/textWidth";
import { thinned } from "../../../kernel-ext/display/chart/thin";
import { labelExpression, linearTicks, logTicks } from "../../../kernel-ext/display/chart/ticks";

describe("linearTicks", () => {
  it("steps by 1, 2 or 5 times a power of ten, inside the range", () => {
    expect(linearTicks(0, 1600, 8)).toEqual({
      values: [0, 200, 400, 600, 800, 1000, 1200, 1400, 1600],
      labels: ["0", "200", "400", "600", "800", "1000", "1200", "1400", "1600"],
    });
    expect(linearTicks(-0.1, 0.2, 6).labels).toEqual(["\u22120.10", "\u22120.05", "0", "0.05", "0.10", "0.15", "0.20"]);
    expect(linearTicks(0, 40000, 4).labels).toEqual(["0", "10\u202f000", "20\u202f000", "30\u202f000", "40\u202f000"]);
    expect(linearTicks(0, 3e-5, 6).labels.at(-1)).toBe("3.0\u00d710\u207b\u2075");
  });

  it("labels say the values", () => {
    const ends = fc.tuple(
      fc.double({ min: -1e4, max: 1e4, noNaN: true }),
      fc.double({ min: 0.01, max: 1e4, noNaN: true }),
    );
    fc.assert(
      fc.property(ends, ([low, width]) => {
        const { values, labels } = linearTicks(low, low + width);
        expect(values.length).toBeGreaterThanOrEqual(2);
        for (const [index, label] of labels.entries()) {
          expect(Number(label.replace("\u2212", "-").replaceAll("\u202f", ""))).toBeCloseTo(values[index] as number, 9);
        }
      }),
    );
  });
});

describe("logTicks", () => {
  it("has decades, with 2 and 5 between them where there is room", () => {
    expect(logTicks(1, 100).values).toEqual([1, 2, 5, 10, 20, 50, 100]);
    expect(logTicks(1e-7, 10).labels).toEqual([
      "10\u207b\u2077",
      "10\u207b\u2076",
      "10\u207b\u2075",
      "10\u207b\u2074",
      "10\u207b\u00b3",
      "10\u207b\u00b2",
      "0.1",
      "1",
      "10",
    ]);
    expect(logTicks(1, 1e4).labels).toEqual(["1", "10", "100", "1000", "10\u202f000"]);
  });

  it("falls back to even steps over less than a decade", () => {
    expect(logTicks(1000, 1300).values).toEqual([1000, 1050, 1100, 1150, 1200, 1250, 1300]);
  });
});

describe("labelExpression", () => {
  it("is data for a lookup: quotes in a label cannot leave it", () => {
    expect(labelExpression({ values: [1], labels: ['"]; x'] })).toBe('({"1":"\\"]; x"})[datum.value]');
  });
});

describe("placeLabels", () => {
  it("sets two names at nearly the same place to the left and to the right", () => {
    const [first, second] = placeLabels(
      [
        { width: 60, at: 250, pole: true },
        { width: 60, at: 252, pole: true },
      ],
      500,
    );
    expect([first?.row, second?.row]).toEqual([0, 0]);
    expect((first?.from as number) + 60).toBeLessThan(250);
    expect(second?.from).toBeGreaterThan(252);
  });

  it("never lets names overlap, and no pole crosses a name, for up to five", () => {
    const label = fc.record({
      width: fc.integer({ min: 10, max: 120 }),
      at: fc.integer({ min: 150, max: 350 }),
      pole: fc.boolean(),
    });
    fc.assert(
      fc.property(fc.array(label, { minLength: 1, maxLength: 5 }), (labels) => {
        const places = placeLabels(labels, 500);
        for (const [i, one] of places.entries()) {
          for (const [j, other] of places.entries()) {
            if (i === j) continue;
            const pole = labels[i]?.pole === true && one.row >= other.row ? (labels[i]?.at as number) : -1;
            expect(pole > other.from && pole < other.from + (labels[j]?.width as number)).toBe(false);
            if (one.row !== other.row) continue;
            const [a, b] = [one.from + (labels[i]?.width as number), other.from + (labels[j]?.width as number)];
            expect(a <= other.from || b <= one.from).toBe(true);
          }
        }
      }),
    );
  });
});

describe("thinned", () => {
  it("leaves no point farther than a tenth of a pixel from the curve when the limit allows it", () => {
    const x = Float64Array.from({ length: 3000 }, (_, index) => index / 6);
    const y = x.map((value) => 150 + 140 * Math.sin(value / 60));
    const kept = thinned(x, y, 3000);
    expect(kept.length).toBeLessThan(150);
    let worst = 0;
    for (let span = 1; span < kept.length; span++) {
      const [from, to] = [kept[span - 1] as number, kept[span] as number];
      for (let index = from; index <= to; index++) {
        const part = ((x[index] as number) - (x[from] as number)) / ((x[to] as number) - (x[from] as number));
        worst = Math.max(
          worst,
          Math.abs((y[from] as number) + part * ((y[to] as number) - (y[from] as number)) - (y[index] as number)),
        );
      }
    }
    // Upright distances are larger than those from the chord by at most its slope, here sqrt(1 + 2.33^2) = 2.54.
    expect(worst).toBeLessThan(0.1 * 2.54);
    expect(worst).toBeGreaterThan(0);
  });

  it("keeps the limit for a curve that is all corners", () => {
    const x = Float64Array.from({ length: 5000 }, (_, index) => index / 10);
    const y = x.map((_, index) => (index * 7919) % 300);
    const kept = thinned(x, y, 400);
    expect(kept.length).toBeLessThanOrEqual(400);
    expect([kept[0], kept.at(-1)]).toEqual([0, 4999]);
  });
});

describe("wrapText", () => {
  it("breaks at spaces so that no line is wider than asked, and loses no word", () => {
    const text = "The growth of the sound horizon up to last scattering and up to the drag epoch, for three models";
    const lines = wrapText(text, 200, 15);
    expect(lines.join(" ")).toBe(text);
    for (const line of lines) expect(estimatedWidth(line, 15)).toBeLessThanOrEqual(200);
  });
});
