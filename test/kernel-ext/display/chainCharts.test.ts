import { describe, expect, it } from "vitest";
import { correlationChart, type HistogramPanel, histogramChart, regionChart } from "../../../kernel-ext/display";
import { contourLines } from "../../../kernel-ext/display/chart/contourLines";
import { expectPicture } from "./charts/expectPicture";

// All numbers here are invented.

const bins = 28;
const panel = (symbol: string, middle: number, unit?: string): HistogramPanel => ({
  axis: { label: "", symbol, unit },
  range: [middle - 3, middle + 3],
  heights: Float64Array.from({ length: bins }, (_, k) => Math.exp(-0.5 * (((k + 0.5) / bins) * 6 - 3) ** 2)),
  middle,
  interval: [middle - 1, middle + 1],
});

/** A normal density with a correlation over three deviations to each side. */
function plane(count: number, correlation: number): Float64Array {
  const at = (k: number) => ((k + 0.5) / count) * 6 - 3;
  return Float64Array.from({ length: count * count }, (_, cell) => {
    const [x, y] = [at(cell % count), at(Math.floor(cell / count))];
    return Math.exp(-0.5 * ((x * x - 2 * correlation * x * y + y * y) / (1 - correlation ** 2)));
  });
}

// exp(-q/2) at the edge of the region with the share p: q = -2 ln(1 - p), so that the height is 1 - p.
const levels = [0.32, 0.05] as const;

describe("regionChart, histogramChart and correlationChart", () => {
  const charts = {
    regions: () =>
      regionChart({
        title: "Regions",
        description: "Invented regions of three pairs.",
        panels: [panel("H_0", 68, "km/s/Mpc"), panel("omega_b", 0), panel("100 theta_*", 1, "0.01 rad")],
        pairs: [
          { x: 0, y: 1, bins: 56, cells: plane(56, 0.6), levels },
          { x: 0, y: 2, bins: 56, cells: plane(56, -0.8), levels },
          { x: 1, y: 2, bins: 56, cells: plane(56, 0), levels },
        ],
        names: ["68%", "95%"],
        words: ["H_0 and omega_b: correlation 0.60"],
      }),
    histograms: () =>
      histogramChart({
        title: "Distributions",
        description: "Four invented distributions.",
        panels: [panel("a", 0), panel("b", 2, "Mpc"), panel("c", -1), panel("d", 500, "Gyr")],
      }),
    correlations: () =>
      correlationChart({
        title: "Correlations",
        description: "Invented correlations.",
        names: ["H_0", "omega_b", "theta_*"],
        matrix: [
          [1, 0.5, -0.98],
          [0.5, 1, -0.001],
          [-0.98, -0.001, 1],
        ],
      }),
  };
  for (const [name, make] of Object.entries(charts)) {
    it(`${name}: the picture is the one in the tree, no warning is logged, and the specification is small`, async () => {
      expectPicture(name, await make().toSvg());
      expect(JSON.stringify(make().spec).length).toBeLessThan(60_000);
    });
  }

  it("say in words what they show", () => {
    expect(charts.regions().toText()).toContain("H_0 and omega_b: correlation 0.60");
    expect(charts.histograms().toText()).toContain("b: 2, from 1 to 3 Mpc");
    expect(charts.correlations().toText()).toContain("H_0 and θ_*: −0.98");
  });

  it("refuse what cannot be drawn", () => {
    const words = { title: "T", description: "D" };
    expect(() => histogramChart({ ...words, panels: [] })).toThrow("at least one panel");
    expect(() => histogramChart({ ...words, panels: [{ ...panel("a", 0), heights: [Number.NaN] }] })).toThrow(
      "must be finite",
    );
    expect(() =>
      correlationChart({
        ...words,
        names: ["a", "b"],
        matrix: [
          [1, 2],
          [2, 1],
        ],
      }),
    ).toThrow("between -1 and 1, got 2");
    expect(() => correlationChart({ ...words, names: ["a", "b"], matrix: [[1, 0]] })).toThrow(
      "a row and a column a name",
    );
    const one = { ...words, names: ["68%", "95%"] as const, words: [] };
    expect(() => regionChart({ ...one, panels: [panel("a", 0)], pairs: [] })).toThrow("two to six panels, got 1");
    const pair = { x: 1, y: 0, bins: 56, cells: plane(56, 0), levels };
    expect(() => regionChart({ ...one, panels: [panel("a", 0), panel("b", 0)], pairs: [pair] })).toThrow(
      "x before y, got 1 and 0",
    );
  });
});

describe("contourLines", () => {
  it("of a cone are circles", () => {
    const count = 41;
    const cells = Float64Array.from({ length: count * count }, (_, cell) =>
      Math.max(0, 20 - Math.hypot((cell % count) - 20, Math.floor(cell / count) - 20)),
    );
    const [circle, ...others] = contourLines(cells, count, 10);
    expect(others).toEqual([]);
    expect(circle![0]).toEqual(circle!.at(-1));
    // Linear interpolation along the sides of a square of side 1 on a circle of radius 10: measured 0.012.
    for (const [x, y] of circle!) expect(Math.abs(Math.hypot(x - 20, y - 20) - 10)).toBeLessThan(0.05);
  });

  it("close at the edge, and keep two hills apart", () => {
    const cells = Float64Array.from({ length: 100 }, (_, cell) => (cell % 10 < 3 || cell % 10 > 6 ? 1 : 0));
    const lines = contourLines(cells, 10, 0.5);
    expect(lines).toHaveLength(2);
    for (const line of lines) expect(line[0]).toEqual(line.at(-1));
    expect(contourLines(cells, 10, 2)).toEqual([]);
  });
});
