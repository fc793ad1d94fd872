import Ajv from "ajv";
import addFormats from "ajv-formats";
import { beforeAll, describe, expect, it } from "vitest";
import { type Chart, intervalChart, lineChart, renderSvg } from "../../../kernel-ext/display";
import { expectPicture } from "./charts/expectPicture";
import { sampleCharts } from "./charts/sampleCharts";

const words = { title: "A title", description: "What is to be seen." };
const axes = { x: { label: "x" }, y: { label: "y" } };
const line = (y: number[], x = y.map((_, index) => index)) => ({ label: "line", x, y });

/** All marks of a specification, from all its layers. */
function marksOf(chart: Chart): {
  mark: Record<string, unknown>;
  encoding: Record<string, Record<string, unknown>>;
  data: { values: Record<string, number>[] };
}[] {
  const found: never[] = [];
  const visit = (node: unknown): void => {
    if (typeof node !== "object" || node === null) return;
    if ("mark" in node) found.push(node as never);
    for (const value of Object.values(node)) visit(value);
  };
  visit(chart.spec);
  return found;
}

describe("the sample charts (invented data)", () => {
  let valid: (spec: unknown) => boolean;
  let reasons: () => string;
  beforeAll(async () => {
    // The schema that Vega-Lite publishes with its package: an outside judge of the specifications.
    const schema = (await import("vega-lite/vega-lite-schema.json", { with: { type: "json" } })) as { default: object };
    const ajv = new Ajv({ strict: false, allErrors: false });
    addFormats(ajv);
    ajv.addFormat("color-hex", () => true);
    const check = ajv.compile(schema.default);
    valid = (spec) => check(JSON.parse(JSON.stringify(spec))) === true;
    reasons = () => JSON.stringify(check.errors?.slice(0, 3));
  });

  for (const [name, make] of Object.entries(sampleCharts)) {
    it(`${name}: the picture is the one in the tree and no warning is logged`, async () => {
      expectPicture(name, await make().toSvg());
    });

    it(`${name}: the specification follows the schema of Vega-Lite`, () => {
      expect(valid(make().spec), reasons()).toBe(true);
    });

    it(`${name}: the picture has a role, a title and a description, and refers to nothing outside`, async () => {
      const chart = make();
      const svg = await chart.toSvg();
      expect(svg).toMatch(/^<svg[^>]* role="img" aria-label="/);
      expect(svg).toContain(`<title>${chart.title}</title><desc>${chart.description}</desc>`);
      expect(svg.replace(/xmlns(:xlink)?="[^"]*"/g, "")).not.toMatch(/https?:|href|@import|<image|<script/);
      for (const [, numbers] of svg.matchAll(/ (?:d|transform|x|y|x2|y2|width|height)="([^"]*)"/g)) {
        expect(numbers).not.toMatch(/\.\d{3,}/);
      }
    });

    it(`${name}: the specification is small and carries no more than seven digits`, () => {
      const text = JSON.stringify(make().spec);
      expect(text.length).toBeLessThan(60_000);
      for (const { data } of marksOf(make())) {
        for (const row of data.values) {
          for (const value of Object.values(row)) {
            if (typeof value === "number") expect(Number(value.toPrecision(7))).toBe(value);
          }
        }
      }
    });
  }

  it("the schema refuses a specification with a mark that does not exist", () => {
    expect(valid({ ...sampleCharts["measured"]?.().spec, vconcat: [{ mark: "wheel", encoding: {} }] })).toBe(false);
  });
});

describe("lineChart", () => {
  it("tells series apart by color, dash and shape at once", () => {
    const marks = marksOf((sampleCharts["distances"] as () => Chart)());
    const lines = marks.filter(({ mark }) => mark["type"] === "line");
    const shapes = marks.filter(({ mark, data }) => mark["type"] === "point" && data.values.length > 1);
    expect(lines).toHaveLength(3);
    expect(new Set(lines.map(({ mark }) => mark["color"])).size).toBe(3);
    expect(new Set(lines.map(({ mark }) => String(mark["strokeDash"]))).size).toBe(3);
    expect(new Set(shapes.map(({ mark }) => mark["shape"])).size).toBe(3);
  });

  it("puts a redshift axis in 1+z on a logarithmic scale", () => {
    const marks = marksOf((sampleCharts["distances"] as () => Chart)());
    const { encoding, data } = marks.find(({ mark }) => mark["type"] === "line") as ReturnType<typeof marksOf>[number];
    expect(encoding["x"]).toMatchObject({ field: "onePlusZ", scale: { type: "log" }, axis: { title: "1 + z" } });
    expect(data.values[0]?.["onePlusZ"]).toBeCloseTo(10 ** 0.02, 6);
    const rule = marks.find(({ data: { values } }) => values[0]?.["at"] === 1090.9);
    expect(rule?.mark["type"]).toBe("rule");
  });

  it("names symbol and unit on the axis", () => {
    const chart = lineChart({
      ...words,
      x: axes.x,
      y: { label: "", symbol: "r_s", unit: "Mpc" },
      series: [line([1, 2])],
    });
    expect(JSON.stringify(chart.spec)).toContain('"title":"r_s [Mpc]"');
  });

  it("keeps the first and the last point of a long curve and every peak that can be seen", () => {
    const y = Array.from({ length: 20_001 }, (_, index) => (index === 7_003 ? 5 : Math.sin(index / 900)));
    const chart = lineChart({ ...words, ...axes, series: [line(y)] });
    const rows = marksOf(chart).find(({ mark }) => mark["type"] === "line")?.data.values ?? [];
    expect(rows.length).toBeLessThanOrEqual(400);
    expect(rows[0]).toEqual({ x: 0, y: 0 });
    expect(rows.at(-1)).toEqual({ x: 20_000, y: Number((y.at(-1) as number).toPrecision(7)) });
    expect(rows).toContainEqual({ x: 7_003, y: 5 });
  });

  it("draws a cloud of many points with fewer that cover the same area", () => {
    const x = Array.from({ length: 20_000 }, (_, index) => ((index * 7919) % 20_011) / 20_011);
    const y = Array.from({ length: 20_000 }, (_, index) => ((index * 104_729) % 19_997) / 19_997);
    const chart = lineChart({ ...words, ...axes, points: [{ label: "cloud", x, y }] });
    const rows = marksOf(chart).find(({ mark }) => mark["type"] === "point")?.data.values ?? [];
    expect(rows.length).toBeGreaterThan(1000);
    expect(rows.length).toBeLessThanOrEqual(2500);
    // Every point of the cloud has a drawn one within the diagonal of a square of 11 pixels of the 520 x 300 plot.
    for (let index = 0; index < x.length; index += 97) {
      const near = rows.some(
        (row) =>
          Math.hypot(
            ((row["x"] as number) - (x[index] as number)) * 520,
            ((row["y"] as number) - (y[index] as number)) * 300,
          ) < 16,
      );
      expect(near).toBe(true);
    }
  });

  it("draws a point on the edge whole and leaves out one beyond it", async () => {
    const at = (value: number): number => {
      const chart = lineChart({
        ...words,
        x: { label: "x", domain: [0, 1] },
        y: axes.y,
        points: [{ label: "p", x: [0.5, value], y: [1, 2] }],
      });
      const point = marksOf(chart).find(({ mark }) => mark["type"] === "point");
      expect(point?.mark["clip"]).toBeUndefined();
      return point?.data.values.length as number;
    };
    expect(at(1)).toBe(2);
    expect(at(1.01)).toBe(1);
  });

  it("says the ends of each series in its plain text", () => {
    const chart = lineChart({
      ...words,
      x: { label: "redshift", symbol: "z" },
      y: { label: "d", unit: "Mpc" },
      series: [line([0, 3400.5])],
    });
    expect(chart.toText()).toBe("A title\nWhat is to be seen.\n  line: from 0 Mpc at z = 0 to 3400.5 Mpc at z = 1");
  });

  it("offers Vega-Lite 5, SVG and plain text, and no HTML, which would win over the picture", async () => {
    const bundle = await lineChart({ ...words, ...axes, series: [line([1, 2])] }).bundle();
    expect(Object.keys(bundle)).toEqual(["application/vnd.vegalite.v5+json", "image/svg+xml", "text/plain"]);
    expect(bundle["application/vnd.vegalite.v5+json"]).toMatchObject({
      $schema: "https://vega.github.io/schema/vega-lite/v5.json",
      background: "transparent",
    });
  });

  it("refuses what it cannot draw, and names it", () => {
    const make = (extra: object) => () => lineChart({ ...words, ...axes, series: [line([1, 2])], ...extra });
    expect(make({ series: [line([1, Number.NaN])] })).toThrow('lineChart: series "line", y[1] must be finite, got NaN');
    expect(make({ series: [line([1, 0])], y: { label: "y", scale: "log" } })).toThrow(
      'lineChart: series "line", y[1] must be positive on a logarithmic axis, got 0',
    );
    expect(make({ series: [line([1, 2], [-1, 3])], x: { label: "z", scale: "onePlusRedshift" } })).toThrow(
      "x[0] must be a redshift above -1, got -1",
    );
    expect(make({ series: [line([1, 2], [0])] })).toThrow("must have as many y as x, got 2 and 1");
    expect(make({ series: [] })).toThrow("at least one series");
    expect(make({ description: " " })).toThrow("lineChart: description must be text that is not empty");
    expect(make({ rules: [{ axis: "x", at: Number.NaN, label: "r" }] })).toThrow(
      'rule "r" must lie on its axis, got NaN',
    );
    expect(make({ points: [{ ...line([1]), label: "p", error: [-1] }] })).toThrow(
      "error[0] must be finite and not negative",
    );
    expect(make({ series: Array.from({ length: 7 }, (_, i) => ({ ...line([1, 2]), label: `s${i}` })) })).toThrow(
      "at most 6 series can be told apart, got 7",
    );
  });

  it("escapes names from data in the picture", async () => {
    const evil = '</text><script>alert("1")</script>';
    const svg = await lineChart({
      title: evil,
      description: evil,
      x: { label: evil },
      y: { label: evil },
      series: [
        { ...line([1, 2]), label: evil },
        { ...line([2, 3]), label: "other" },
      ],
      rules: [{ axis: "x", at: 0.5, label: evil }],
    }).toSvg();
    expect(svg).not.toContain("<script");
    expect(svg).toContain("&lt;script");
  });

  it("draws a single point and a level line", async () => {
    await expect(lineChart({ ...words, ...axes, series: [line([3])] }).toSvg()).resolves.toContain("<svg");
    await expect(lineChart({ ...words, ...axes, series: [line([2, 2, 2])] }).toSvg()).resolves.toContain("<svg");
    await expect(lineChart({ ...words, ...axes, series: [line([0, 0])] }).toSvg()).resolves.toContain("<svg");
  });
});

describe("intervalChart", () => {
  it("writes value and error at the right of each row", async () => {
    const svg = await (sampleCharts["beside"] as () => Chart)().toSvg();
    expect(svg).toContain("1.04101 \u00b1 0.00029");
    expect(svg).toContain("301.50 \u00b1 0.10");
  });

  it("refuses a value that is not finite and a negative error", () => {
    const make = (row: object) => () =>
      intervalChart({
        ...words,
        panels: [{ axis: { label: "a" }, rows: [{ label: "r", value: 1, group: "g", ...row }] }],
      });
    expect(make({ value: Number.NaN })).toThrow('intervalChart: panel "a", row "r": value must be finite, got NaN');
    expect(make({ error: -1 })).toThrow("error must be finite and not negative, got -1");
  });
});

describe("renderSvg", () => {
  const bars = (extra: object) => ({
    $schema: "https://vega.github.io/schema/vega-lite/v5.json",
    title: "T",
    mark: "bar",
    encoding: { x: { field: "a", type: "quantitative" } },
    ...extra,
  });

  it("refuses to load data from an address or a file", async () => {
    await expect(renderSvg(bars({ data: { url: "http://127.0.0.1:9/data.json" } }))).rejects.toThrow(
      "may not load anything",
    );
    await expect(renderSvg(bars({ data: { url: "/etc/hostname", format: { type: "csv" } } }))).rejects.toThrow();
  });

  it("fails on a warning, unless the caller wants to hear it", async () => {
    const odd = bars({
      data: { values: [{ a: 1 }] },
      encoding: { x: { field: "a", type: "quantitative", scale: { type: "log", zero: true } } },
    });
    await expect(renderSvg(odd)).rejects.toThrow('the chart "T" was drawn with warnings: ');
    const heard: string[] = [];
    const svg = await renderSvg(odd, { onWarning: (warning) => heard.push(warning) });
    expect(svg).toContain("<svg");
    expect(heard.join()).toContain("zero");
  });

  it("gives the same text for the same specification, and other ids for another", async () => {
    const one = await (sampleCharts["measured"] as () => Chart)().toSvg();
    const again = await (sampleCharts["measured"] as () => Chart)().toSvg();
    const other = await (sampleCharts["distances"] as () => Chart)().toSvg();
    const ids = (svg: string) => [...svg.matchAll(/ id="([^"]*)"/g)].map(([, id]) => id);
    expect(again).toBe(one);
    expect(ids(one).length).toBeGreaterThan(0);
    expect(ids(one).filter((id) => ids(other).includes(id))).toEqual([]);
    for (const [, id] of one.matchAll(/url\(#([^)]*)\)/g)) expect(ids(one)).toContain(id);
  });
});
