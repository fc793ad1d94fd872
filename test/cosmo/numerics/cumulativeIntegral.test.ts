import { describe, expect, it } from "vitest";
import { buildCumulativeIntegral, tableCurve } from "../../../cosmo/numerics";

describe("buildCumulativeIntegral(f, lower, upper)", () => {
  it("meets antiderivatives that are known, everywhere in the range", () => {
    for (const [f, integral, lower, upper] of [
      [Math.cos, Math.sin, 0, 20],
      [Math.exp, Math.exp, -5, 3],
      [(x: number) => 1 / (1 + x * x), Math.atan, -30, 30],
      [(x: number) => 1 / Math.sqrt(x), (x: number) => 2 * Math.sqrt(x), 1e-6, 1],
    ] as [(x: number) => number, (x: number) => number, number, number][]) {
      const cumulative = buildCumulativeIntegral(f, lower, upper);
      expect(cumulative.evaluate(lower)).toBeCloseTo(0, 14);
      for (let i = 1; i <= 50; i++) {
        const x = lower + ((upper - lower) * i) / 50;
        const expected = integral(x) - integral(lower);
        // Measured 1e-14 at most.
        expect(Math.abs(cumulative.evaluate(x) - expected)).toBeLessThan(1e-13 * Math.max(1, Math.abs(expected)));
      }
      expect(cumulative.error).toBeLessThan(1e-12);
    }
  });

  it("crosses jumps and kinks that it was not told of", () => {
    const step = buildCumulativeIntegral((x) => (x < 0.3 ? 0 : 1), 0, 1);
    expect(step.evaluate(1)).toBeCloseTo(0.7, 12);
    expect(step.evaluate(0.2)).toBeCloseTo(0, 12);
    const kink = buildCumulativeIntegral((x) => Math.abs(x - 0.3), 0, 1);
    expect(kink.evaluate(1)).toBeCloseTo(0.5 * (0.09 + 0.49), 13);
    const told = buildCumulativeIntegral((x) => Math.abs(x - 0.3), 0, 1, { breakpoints: [0.3] });
    expect(told.evaluations).toBe(34);
    expect(told.evaluate(0.3)).toBeCloseTo(0.045, 15);
  });

  it("refuses values that are not finite, ranges that are none, and points outside", () => {
    expect(() => buildCumulativeIntegral(() => Number.NaN, 0, 1)).toThrow("the function is NaN at x = ");
    expect(() => buildCumulativeIntegral(Math.cos, 1, 1)).toThrow("upper must be finite and above lower (1), got 1");
    const cosine = buildCumulativeIntegral(Math.cos, 0, 1);
    expect(() => cosine.evaluate(1.1)).toThrow("x must lie between 0 and 1, got 1.1");
    expect(() => cosine.evaluate(Number.NaN)).toThrow("got NaN");
    let seed = 1;
    const noise = () => {
      seed = (seed * 16807) % 2147483647;
      return seed / 2147483647;
    };
    expect(() => buildCumulativeIntegral(noise, 0, 1)).toThrow(
      /the function is too rough near x = .*: 4000 pieces do not resolve it/,
    );
  });
});

describe("tableCurve(x, y, kind)", () => {
  const x = Array.from({ length: 11 }, (_, i) => i / 10);

  it("meets its points, and parabolas exactly with cubic pieces, straight lines with both; holds its ends", () => {
    const line = (at: number) => 2 - 3 * at;
    const parabola = (at: number) => 1 + at - 4 * at * at;
    const uneven = x.map((each) => each ** 1.5);
    const curve = tableCurve(uneven, uneven.map(parabola), "cubic");
    const straight = tableCurve(uneven, uneven.map(line), "linear");
    for (let at = 0; at <= 1; at += 0.013) {
      expect(curve(at)).toBeCloseTo(parabola(at), 14);
      expect(straight(at)).toBeCloseTo(line(at), 14);
    }
    expect(curve(-1)).toBe(parabola(0));
    expect(curve(5)).toBe(parabola(1));
    expect(tableCurve([0, 2], [1, 2], "cubic")(0.5)).toBeCloseTo(1.25, 15);
  });

  it("errs by the second power of the spacing with straight pieces and by a higher one with cubic ones", () => {
    const worst = (count: number, kind: "cubic" | "linear") => {
      const at = Array.from({ length: count + 1 }, (_, i) => i / count);
      const curve = tableCurve(at, at.map(Math.exp), kind);
      let largest = 0;
      for (let t = 0.1; t < 0.9; t += 0.0037) largest = Math.max(largest, Math.abs(curve(t) - Math.exp(t)));
      return largest;
    };
    expect(Math.log2(worst(20, "linear") / worst(40, "linear"))).toBeCloseTo(2, 1);
    expect(Math.log2(worst(20, "cubic") / worst(40, "cubic"))).toBeGreaterThan(2.8);
  });

  it("refuses points that are not ascending", () => {
    expect(() => tableCurve([0, 0], [1, 2], "linear")).toThrow("tableCurve: x must be ascending");
    expect(() => tableCurve([0, Number.NaN], [1, 2], "linear")).toThrow("tableCurve: x must be ascending");
  });
});
