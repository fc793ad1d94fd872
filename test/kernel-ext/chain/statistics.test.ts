import { readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import {
  correlationMatrix,
  effectiveSampleSize,
  summarizeColumn,
  weightedMoments,
  weightedQuantiles,
} from "../../../kernel-ext/chain";
import { autoregressive, normalNumbers, uniformNumbers } from "./invented";

interface Statistics {
  mean: number;
  deviation: number;
  quantiles: number[];
}
interface Reference {
  shares: number[];
  weights: number[];
  columns: Record<string, number[]>;
  weighted: Record<string, Statistics>;
  unweighted: Record<string, Statistics>;
  correlation: Record<string, number>;
}

// NumPy and SciPy on the repeated samples: test/reference/chain/statistics.py.
const reference = JSON.parse(
  readFileSync(join(__dirname, "..", "..", "reference", "chain", "statistics.json"), "utf8"),
) as Reference;
const weights = Float64Array.from(reference.weights);
const columns = Object.entries(reference.columns).map(([name, list]) => ({ name, values: Float64Array.from(list) }));
const apart = (value: number, expected: number): number => Math.abs(value / expected - 1);

describe("weighted statistics against NumPy and SciPy", () => {
  for (const { name, values } of columns) {
    for (const kind of ["weighted", "unweighted"] as const) {
      const expected = reference[kind][name]!;
      const used = kind === "weighted" ? weights : undefined;

      it(`weightedMoments of ${name}, ${kind}`, () => {
        const { mean, deviation } = weightedMoments(values, used);
        // Measured 1.6e-15 and 7e-16.
        expect(apart(mean, expected.mean)).toBeLessThan(1e-14);
        expect(apart(deviation, expected.deviation)).toBeLessThan(1e-14);
      });

      it(`weightedQuantiles of ${name}, ${kind}, are the very samples`, () => {
        expect(weightedQuantiles(values, used, reference.shares)).toEqual(expected.quantiles);
      });
    }
  }

  it("correlationMatrix is symmetric, 1 on the diagonal, and agrees with pearsonr", () => {
    const matrix = correlationMatrix(
      columns.map(({ values }) => values),
      weights,
    );
    columns.forEach((row, i) => {
      expect(matrix[i]![i]).toBe(1);
      columns.slice(0, i).forEach((column, j) => {
        expect(matrix[i]![j]).toBe(matrix[j]![i]);
        // Measured 2.2e-16.
        expect(Math.abs(matrix[i]![j]! - reference.correlation[`${column.name} ${row.name}`]!)).toBeLessThan(3e-15);
      });
    });
  });
});

describe("weightedMoments", () => {
  it("keeps the digits of a small spread about a large mean", () => {
    // 1e9 + (0, 1, 2): deviation sqrt(2/3) exactly.
    const { mean, deviation } = weightedMoments(Float64Array.of(1e9, 1e9 + 1, 1e9 + 2), undefined);
    expect(mean).toBe(1e9 + 1);
    expect(apart(deviation, Math.sqrt(2 / 3))).toBeLessThan(1e-15);
  });
});

describe("weightedQuantiles", () => {
  it("of many samples are those of sorting all of them, outliers or none", () => {
    const normal = normalNumbers(11);
    const uniform = uniformNumbers(12);
    const values = Float64Array.from({ length: 60_000 }, () => normal());
    values[17] = 1e9;
    values[18] = -1e12;
    const repeats = Float64Array.from(values, () => Math.floor(3 * uniform()));
    const sorted = [...values.keys()].sort((a, b) => values[a]! - values[b]!);
    const total = repeats.reduce((sum, each) => sum + each, 0);
    const expected = [0.001, 0.16, 0.5, 0.977].map((share) => {
      let sum = 0;
      const row = sorted.find((each) => {
        sum += repeats[each]!;
        return sum >= share * total && repeats[each]! > 0;
      });
      return values[row!]!;
    });
    expect(weightedQuantiles(values, repeats, [0.001, 0.16, 0.5, 0.977])).toEqual(expected);
  });

  it("of a column that does not vary are its value", () => {
    expect(weightedQuantiles(new Float64Array(10_000).fill(3), undefined, [0, 0.5, 1])).toEqual([3, 3, 3]);
  });

  it("refuse weights that are all 0, and a share that is none", () => {
    expect(() => weightedQuantiles(Float64Array.of(1), Float64Array.of(0), [0.5])).toThrow("must sum to more than 0");
    expect(() => weightedQuantiles(Float64Array.of(1), undefined, [Number.NaN])).toThrow("between 0 and 1, got NaN");
  });
});

describe("effectiveSampleSize", () => {
  // An autoregressive chain has n (1 - phi)/(1 + phi) effective samples (Geyer 1992, or any book on time series). The estimate scatters:
  // measured within 7% (phi = 0.9, 20,000 rows); the bound is 20%.
  for (const phi of [0, 0.5, 0.9]) {
    for (const count of [20_000, 200_000]) {
      it(`of an autoregressive chain of ${count} rows with phi = ${phi} is n (1 - phi)/(1 + phi)`, () => {
        const size = effectiveSampleSize(autoregressive(count, phi, 2718), undefined);
        expect(apart(size, (count * (1 - phi)) / (1 + phi))).toBeLessThan(0.2);
      });
    }
  }

  it("of independent rows with weights is Kish's (sum w)^2/sum w^2", () => {
    const uniform = uniformNumbers(5);
    const values = autoregressive(50_000, 0, 99);
    const some = Float64Array.from(values, () => uniform() ** 3);
    const sum = some.reduce((total, each) => total + each, 0);
    const squares = some.reduce((total, each) => total + each * each, 0);
    // Measured 0.8%, the scatter of a sample of this length.
    expect(apart(effectiveSampleSize(values, some), (sum * sum) / squares)).toBeLessThan(0.06);
  });

  it("does not depend on whether a state that stays is one row with a weight or as many rows", () => {
    const uniform = uniformNumbers(31);
    const values = autoregressive(6000, 0.6, 12);
    const repeats = Float64Array.from(values, () => 1 + Math.floor(4 * uniform() ** 2));
    const rows: number[] = [];
    values.forEach((value, row) => {
      for (let k = 0; k < repeats[row]!; k++) rows.push(value);
    });
    const folded = effectiveSampleSize(values, repeats);
    const unfolded = effectiveSampleSize(Float64Array.from(rows), undefined);
    // The two estimates cut the sum of covariances at different lags: measured 0.2%.
    expect(apart(folded, unfolded)).toBeLessThan(0.03);
  });

  it("is the number of rows for a column that does not vary, and leaves rows without weight out", () => {
    expect(effectiveSampleSize(new Float64Array(50).fill(2), undefined)).toBe(50);
    expect(effectiveSampleSize(new Float64Array(6).fill(2), Float64Array.of(0, 1, 1, 0, 1, 1))).toBe(4);
  });
});

describe("summarizeColumn", () => {
  it("puts mean, deviation, intervals and effective size together", () => {
    const values = autoregressive(40_000, 0, 6);
    const { mean, deviation, median, interval68, interval95 } = summarizeColumn("x", values, undefined);
    expect(Math.abs(mean)).toBeLessThan(0.03);
    expect(apart(deviation, 1)).toBeLessThan(0.02);
    expect(Math.abs(median)).toBeLessThan(0.03);
    // Quantiles of the normal distribution: 0.99446 and 1.95996 (tables of the normal distribution).
    for (const [value, expected] of [
      [interval68[0], -0.99446],
      [interval68[1], 0.99446],
      [interval95[0], -1.95996],
      [interval95[1], 1.95996],
    ] as const) {
      expect(Math.abs(value - expected)).toBeLessThan(0.04);
    }
  });
});
