import { inspect } from "node:util";
import { afterEach, describe, expect, it, vi } from "vitest";
import { cellOutput, displaySymbol, type MimeBundle, setDisplaySink, table } from "../../../kernel-ext/display";
import { sampleCharts } from "./charts/sampleCharts";

const evil = "<img src=x onerror=alert(1)>";

/** An output over invented data. */
function sample() {
  return cellOutput({
    title: "Bins of a survey",
    summary: "Two invented bins.",
    tables: [
      table({ title: "Bins", columns: [{ key: "z", label: "redshift", digits: 3 }], rows: [{ z: 0.5 }, { z: 1.5 }] }),
    ],
    charts: [(sampleCharts["measured"] as NonNullable<(typeof sampleCharts)[string]>)()],
    notes: ["Closure: radiationInside.", "Closure: radiationInside.", evil],
    sources: [
      { key: "hogg1999", citation: "Hogg 1999, eq. 15" },
      { key: "hogg1999", citation: "Hogg 1999, eq. 15" },
    ],
    values: { redshifts: [0.5, 1.5] },
  });
}

afterEach(() => setDisplaySink(undefined));

describe("cellOutput", () => {
  it("hands on the values as they are", () => {
    expect(sample().values).toEqual({ redshifts: [0.5, 1.5] });
  });

  it("sends each chart as a display of its own before the result, which carries the tables", async () => {
    const shown: MimeBundle[] = [];
    setDisplaySink({ show: (bundle) => shown.push(bundle), update: () => {} });
    const result = await sample()[displaySymbol]();
    expect(shown.map((bundle) => Object.keys(bundle))).toEqual([
      ["application/vnd.vegalite.v5+json", "image/svg+xml", "text/plain"],
    ]);
    expect(Object.keys(result)).toEqual(["text/html", "text/plain"]);
    expect(result["text/html"]).toContain('<table class="cell-table">');
    expect(result["text/html"]).not.toContain("<img");
  });

  it("without a sink puts the charts into the HTML as pictures with alternative text", async () => {
    const html = String((await sample()[displaySymbol]())["text/html"]);
    const [, alt, data] =
      /<img class="cell-chart" alt="([^"]*)" src="data:image\/svg\+xml;base64,([^"]*)">/.exec(html) ?? [];
    expect(alt).toContain("An invented curve rises from 67 to 201");
    expect(Buffer.from(String(data), "base64").toString("utf8")).toMatch(/^<svg.*<\/svg>$/s);
  });

  it("says everything in its plain text: title, summary, chart, table, notes, sources, each once", () => {
    expect(sample().toText()).toBe(
      [
        "Bins of a survey\n================",
        "Two invented bins.",
        "Chart: Expansion rate and the points of a survey\nAn invented curve rises from 67 to 201 and passes three invented " +
          "points within their errors.\n  base model: from 67 km/s/Mpc at z = 0 to 201 km/s/Mpc at z = 2\n" +
          "  survey: from 80 km/s/Mpc at z = 0.3 to 155 km/s/Mpc at z = 1.4",
        "Bins\n\nredshift\n--------\n   0.500\n   1.50",
        `Notes\n* Closure: radiationInside.\n* ${evil}`,
        "Sources\n[hogg1999] Hogg 1999, eq. 15",
      ].join("\n\n"),
    );
    expect(inspect(sample())).toBe(sample().toText());
  });

  it("escapes notes and sources in its HTML", () => {
    const html = cellOutput({
      title: evil,
      summary: evil,
      notes: [evil],
      sources: [{ key: evil, citation: evil }],
      values: 1,
    }).toHtml();
    expect(html).not.toContain("<img");
    expect(html.match(/&lt;img/g)).toHaveLength(5);
  });

  it("show() displays charts and tables through the sink and gives the result back", async () => {
    const shown: MimeBundle[] = [];
    setDisplaySink({ show: (bundle) => shown.push(bundle), update: () => {} });
    const output = sample();
    expect(await output.show()).toBe(output);
    expect(shown.map((bundle) => "text/html" in bundle)).toEqual([false, true]);
  });

  it("show() without a sink writes the plain text", async () => {
    const log = vi.spyOn(console, "log").mockImplementation(() => {});
    await sample().show();
    expect(log).toHaveBeenCalledExactlyOnceWith(sample().toText());
    log.mockRestore();
  });

  it("refuses an output without a title", () => {
    expect(() => cellOutput({ title: "", values: 1 })).toThrow("cellOutput: title must be text that is not empty");
  });
});
