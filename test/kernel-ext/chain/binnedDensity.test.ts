import { describe, expect, it } from "vitest";
import { histogram, planeDensity, shownRange } from "../../../kernel-ext/chain";
import { autoregressive } from "./invented";

describe("planeDensity", () => {
  const count = 200_000;
  const x = autoregressive(count, 0, 41);
  const other = autoregressive(count, 0, 43);
  const range = [-5, 5] as const;
  const shares = [0.68, 0.95];

  // For a normal density of two independent unit columns the region with the share p is a disk of the area -2 pi ln(1 - p). Smoothing by
  // n^(-1/6) = 0.13 widens it by 1.7%, and a cell of the grid is 0.5% of the smaller one.
  it("has regions of the area that a normal density gives", () => {
    const { cells, levels, bins } = planeDensity(x, other, undefined, [range, range], [1, 1], count, shares, 100);
    shares.forEach((share, k) => {
      const inside = cells.filter((cell) => cell >= levels[k]!).length;
      const area = inside * (10 / bins) ** 2;
      // Measured 1.021 and 1.023.
      expect(Math.abs(area / (-2 * Math.PI * Math.log(1 - share)) - 1)).toBeLessThan(0.06);
    });
  });

  it("has regions that hold their share of the samples, correlated or not", () => {
    const y = Float64Array.from(x, (value, row) => 0.8 * value + 0.6 * other[row]!);
    const { cells, levels, bins } = planeDensity(x, y, undefined, [range, range], [1, 1], count, shares, 100);
    shares.forEach((share, k) => {
      let inside = 0;
      for (let row = 0; row < count; row++) {
        const i = Math.floor(((x[row]! + 5) / 10) * bins);
        const j = Math.floor(((y[row]! + 5) / 10) * bins);
        if (i >= 0 && j >= 0 && i < bins && j < bins && cells[j * bins + i]! >= levels[k]!) inside++;
      }
      // Measured 0.697 and 0.956: smoothing widens a narrow region.
      expect(Math.abs(inside / count - share)).toBeLessThan(0.03);
    });
  });

  it("counts a row of weight 2 like the same row twice", () => {
    const few = x.subarray(0, 500);
    const twice = Float64Array.from({ length: 1000 }, (_, row) => few[row >> 1]!);
    const once = planeDensity(few, few, new Float64Array(500).fill(2), [range, range], [1, 1], 100, shares, 30);
    expect(planeDensity(twice, twice, undefined, [range, range], [1, 1], 100, shares, 30)).toEqual(once);
  });
});

describe("histogram", () => {
  it("is the weight in each bin, the highest 1, samples outside left out", () => {
    const values = Float64Array.of(-1, 0.1, 0.2, 0.6, 0.9, 5);
    expect([...histogram(values, Float64Array.of(9, 1, 3, 1, 1, 9), [0, 1], 2)]).toEqual([1, 0.5]);
  });
});

describe("shownRange", () => {
  it("leaves far outliers out, and gives a column that does not vary some room", () => {
    const values = autoregressive(10_000, 0, 3);
    values[5] = 1e6;
    const [low, high] = shownRange(values, undefined);
    expect(low).toBeGreaterThan(-5);
    expect(high).toBeLessThan(5);
    const [from, to] = shownRange(new Float64Array(10).fill(3), undefined);
    expect(from).toBeLessThan(3);
    expect(to).toBeGreaterThan(3);
  });
});
