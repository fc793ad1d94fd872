import { inspect } from "node:util";
import MarkdownIt from "markdown-it";
import { describe, expect, it } from "vitest";
import { displaySymbol, table } from "../../../kernel-ext/display";

/** Invented rows; none of the numbers is a result of anything. */
const sample = table({
  title: "Survey bins",
  columns: [
    { key: "z", label: "redshift", symbol: "z", digits: 3 },
    { key: "distance", label: "luminosity distance", symbol: "D_L", unit: "Mpc", digits: 6 },
    { key: "angle", label: "angle", symbol: "theta_*" },
    { key: "name", label: "name" },
    { key: "used", label: "used" },
  ],
  rows: [
    { z: 0.5, distance: 2853.123, angle: { value: 1.0411, error: 0.0003 }, name: "near", used: true },
    { z: 1.25, distance: 13869.94, angle: null, name: "middle", used: false },
    { z: 10, distance: -123.4567, angle: { value: 1.1, error: 0.02 }, name: undefined, used: true },
  ],
  notes: ["Invented."],
});

describe("table", () => {
  it("is plain text with heads, units and decimal points in line", () => {
    expect(`\n${sample.toText()}\n`).toBe(`
Survey bins

redshift z  luminosity distance D_L [Mpc]          angle \u03b8_*  name    used
----------  -----------------------------  -----------------  ------  ----
     0.500                       2853.12   1.04110 \u00b1 0.00030  near    yes
     1.25                      13\u202f869.9            \u2014          middle  no
    10.0                         \u2212123.457  1.100 \u00b1 0.020      \u2014       yes
* Invented.
`);
  });

  it("is HTML whose cells carry their heads", () => {
    expect(sample.toHtmlBody()).toMatchSnapshot();
    expect(sample.toHtml()).toMatch(/^<div class="cell-output">\n<style>/);
  });

  it("names no color in its style, so that light and dark pages both work", () => {
    expect(sample.toHtml()).not.toMatch(/#[0-9a-f]{3,8}\b|rgb|background:(?!none)|(?<!-)color:(?!inherit)/i);
  });

  it("is a Markdown table that a Markdown reader reads as the same cells", () => {
    const html = new MarkdownIt().render(sample.toMarkdown());
    const cells = [...html.matchAll(/<t[dh][^>]*>(.*?)<\/t[dh]>/g)].map(([, cell]) => cell);
    expect(cells).toHaveLength(20);
    expect(cells.slice(5, 10)).toEqual(["0.500", "2853.12", "1.04110 \u00b1 0.00030", "near", "yes"]);
  });

  it("shows itself as HTML and plain text, and in a console as plain text", async () => {
    expect(Object.keys(await sample[displaySymbol]())).toEqual(["text/html", "text/plain"]);
    expect(inspect(sample)).toBe(sample.toText());
  });

  it("sets a column of symbols or units as such", () => {
    const made = table({
      title: "T",
      columns: [{ key: "s", label: "symbol", symbols: true }],
      rows: [{ s: "theta_*" }, { s: "Mpc^-1" }, { s: "<b>_x" }],
    });
    expect(made.toHtml()).toContain(">\u03b8<sub>*</sub><");
    expect(made.toHtml()).toContain(">&lt;b&gt;<sub>x</sub><");
    expect(made.toText().split("\n").slice(4)).toEqual(["\u03b8_*", "Mpc\u207b\u00b9", "<b>_x"]);
    expect(made.toMarkdown()).toContain("| \u03b8\\_\\* |");
  });

  it("escapes every text that comes from data", () => {
    const evil = '</td><script>alert("1")</script>\u001b[31m\u202e';
    const made = table({
      title: evil,
      columns: [
        { key: "a", label: evil, symbol: evil, unit: evil },
        { key: "b", label: "b", format: () => evil },
      ],
      rows: [{ a: evil, b: 1 }],
      notes: [evil],
    });
    for (const sign of ["<script", "\u001b", "\u202e"]) expect(made.toHtml()).not.toContain(sign);
    expect(made.toHtml().match(/&lt;script&gt;/g)).toHaveLength(8);
    for (const sign of ["\u001b", "\u202e"]) expect(made.toText()).not.toContain(sign);
    expect(new MarkdownIt({ html: true }).render(made.toMarkdown())).not.toContain("<script");
  });

  it("refuses NaN and names column and row, also where a format would have hidden it", () => {
    const make = (column: object, value: unknown) => () =>
      table({ title: "T", columns: [{ key: "a", label: "age", ...column }], rows: [{ a: 1 }, { a: value as number }] });
    expect(make({}, Number.NaN)).toThrow('table "T": column "age", row 2: value must be a number, got NaN');
    expect(make({ format: () => "fine" }, Number.NaN)).toThrow("row 2: value must be a number, got NaN");
    expect(make({}, { value: 1, error: Number.NaN })).toThrow("row 2: value must be a number, got NaN");
    expect(make({}, { value: 1, error: -1 })).toThrow("row 2: formatWithError: error must be finite and not negative");
    expect(make({}, () => 1)).toThrow("row 2: value must be text, a number, yes or no, got function");
  });

  it("refuses options that make no table", () => {
    expect(() => table({ title: "", columns: [{ key: "a", label: "a" }], rows: [] })).toThrow(
      "table: title must be text",
    );
    expect(() => table({ title: "T", columns: [], rows: [] })).toThrow("at least one column");
    const twice = [
      { key: "a", label: "a" },
      { key: "a", label: "b" },
    ];
    expect(() => table({ title: "T", columns: twice, rows: [] })).toThrow('different keys, got "a" twice');
  });

  it("cuts a long table in the middle and says so", () => {
    const rows = Array.from({ length: 1000 }, (_, index) => ({ n: index }));
    const long = table({ title: "T", columns: [{ key: "n", label: "n", digits: "all" }], rows, maxRows: 10 });
    const lines = long.toText().split("\n");
    expect(lines).toHaveLength(2 + 2 + 11);
    expect(lines[9]).toBe("\u22ee 990 more rows are not shown");
    expect(lines.at(-1)?.trim()).toBe("999");
    expect(long.toHtml().match(/<tr>/g)).toHaveLength(12);
  });

  it("says when there are no rows", () => {
    const empty = table({ title: "T", columns: [{ key: "n", label: "n" }], rows: [] });
    expect(empty.toText()).toContain("no rows");
    expect(empty.toHtml()).toContain("no rows");
  });
});
