import { describe, expect, it } from "vitest";
import { type BarRow, barChart } from "../../../kernel-ext/display";
import { effects } from "./charts/sampleCharts";

const chart = (rows: BarRow[], axis = {}) =>
  barChart({ title: "T", description: "D.", panels: [{ axis: { label: "slope", ...axis }, rows }] });
const row = (value: number, label = "row") => ({ label, bars: [{ group: "one", value }] });

interface Mark {
  readonly mark: { readonly type: string; readonly strokeWidth?: number };
  readonly encoding: { readonly x: { readonly scale: { readonly domain: [number, number] } } };
  readonly data: { readonly values: readonly { from: number; to: number }[] };
}

/** The bars of a chart, of one panel and without a key. */
function barsOf(spec: unknown): Mark[] {
  const { vconcat } = spec as { vconcat: { layer: Mark[] }[] };
  return vconcat.flatMap(({ layer }) => layer.filter(({ mark }) => mark.type === "rule" && mark.strokeWidth === 5));
}

describe("barChart", () => {
  it("says every bar in words, with its group", () => {
    expect(effects().toText()).toContain("    hubble H_0: 0.200 (angle)\n    hubble H_0: \u22121.00 (age)");
  });

  it("bars start at zero and end at the value, and the axis holds both", () => {
    const bars = barsOf(chart([row(0.25), row(-3)]).spec);
    expect(bars.map(({ data }) => data.values[0])).toEqual([
      { from: 0, to: 0.25 },
      { from: 0, to: -3 },
    ]);
    const [low, high] = bars[0]!.encoding.x.scale.domain;
    expect(low).toBeLessThan(-3);
    expect(high).toBeGreaterThan(0.25);
  });

  it("the axis reaches zero when all bars go one way", () => {
    const [low, high] = barsOf(chart([row(5), row(6)]).spec)[0]!.encoding.x.scale.domain;
    expect(low).toBeLessThan(0);
    expect(high).toBeGreaterThan(6);
  });

  it("bars of zero alone still have an axis", async () => {
    expect(await chart([row(0)]).toSvg()).not.toMatch(/NaN|undefined|Infinity/);
  });

  it("escapes what comes from data", async () => {
    const svg = await chart([row(1, "<b>&")]).toSvg();
    expect(svg).toContain("&lt;b&gt;&amp;");
  });

  const refusals: [string, () => unknown, string][] = [
    ["NaN", () => chart([row(Number.NaN)]), 'barChart: panel "slope", row "row": value must be finite, got NaN'],
    ["no rows", () => chart([]), 'barChart: panel "slope" must have at least one row, got none'],
    [
      "a row without bars",
      () => chart([{ label: "bare", bars: [] }]),
      'barChart: panel "slope", row "bare" must have a bar, got none',
    ],
    [
      "a logarithmic axis",
      () => chart([row(1)], { scale: "log" }),
      'barChart: panel "slope" must have a linear axis, for bars start at zero, got log',
    ],
    [
      "no panels",
      () => barChart({ title: "T", description: "D.", panels: [] }),
      "barChart: there must be at least one panel, got none",
    ],
    [
      "an empty title",
      () => barChart({ title: "", description: "D.", panels: [] }),
      'barChart: title must be text that is not empty, got ""',
    ],
    [
      "more groups than looks",
      () =>
        chart([
          { label: "row", bars: Array.from({ length: 7 }, (_, index) => ({ group: String(index), value: index })) },
        ]),
      "barChart: at most 6 groups can be told apart, got 7",
    ],
  ];
  for (const [title, run, text] of refusals) {
    it(`refuses ${title}`, () => {
      expect(run).toThrowError(new RangeError(text));
    });
  }
});
