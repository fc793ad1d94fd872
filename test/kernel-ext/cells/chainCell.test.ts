import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { type ChainCellOptions, chainCell } from "../../../kernel-ext/cells/chainCell";
import type { ChainInput } from "../../../kernel-ext/chain";
import { displaySymbol } from "../../../kernel-ext/display";
import { normalNumbers } from "../chain/invented";

// The chain of the invented survey, as the demo notebook reads it.
const saltmarsh = join(__dirname, "..", "..", "..", "notebooks-demo", "saltmarsh-chain.csv");
const map = { H0: "hubble", omegab: "baryonDensity", omegac: "coldMatterDensity" };

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "cosmology-cells-chain-"));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** Independent invented models. */
function models(rows: number): Record<string, Float64Array> {
  const normal = normalNumbers(606);
  const column = (mean: number, spread: number) => Float64Array.from({ length: rows }, () => mean + spread * normal());
  return {
    hubble: column(68, 0.5),
    baryonDensity: column(0.0224, 0.00015),
    coldMatterDensity: column(0.12, 0.001),
  };
}

describe("chainCell", () => {
  const options: ChainCellOptions = { map, burnIn: 0.1, add: "age, acousticAngle, volumeDistance(1.1)", workers: 0 };

  it("shows the posterior, what was done, three charts and its sources, complete in plain text", async () => {
    const cell = await chainCell(saltmarsh, options);
    const bundle = await cell[displaySymbol]();
    const text = bundle["text/plain"] as string;
    expect(cell.charts).toHaveLength(3);
    for (const words of [
      "rows of the chain                5168",
      "left out as burn-in              516",
      "column weight",
      "H0 is hubble",
      "batch engine, 1e-6 or better",
      "conventions: constants codata2022, closure radiationInside",
      "effective samples",
      "68% interval",
      "hubble and age: correlation",
      "[geyer1992]",
    ]) {
      expect(text).toContain(words);
    }
    expect(text).not.toMatch(/NaN|undefined|Infinity|\[object/);
    expect(bundle["text/html"] as string).not.toMatch(/NaN|undefined|Infinity|\[object/);
  });

  it("finds what the invented posterior was made with", async () => {
    const { values } = await chainCell(saltmarsh, options);
    // make-data.mjs: means 68 and 0.1193, errors 0.45 and 0.001, correlation -0.8; 142 effective samples leave an error of 0.08 of a deviation in a mean,
    // and about as much in a deviation.
    const { hubble, coldMatterDensity } = values.summaries;
    expect(Math.abs(hubble!.mean - 68)).toBeLessThan(4 * 0.084 * 0.45);
    expect(Math.abs(hubble!.deviation / 0.45 - 1)).toBeLessThan(0.25);
    expect(Math.abs(coldMatterDensity!.mean - 0.1193)).toBeLessThan(4 * 0.084 * 0.001);
    const [i, j] = ["hubble", "coldMatterDensity"].map((name) => values.correlation.names.indexOf(name));
    expect(Math.abs(values.correlation.matrix[i!]![j!]! + 0.8)).toBeLessThan(0.1);
  });

  it("gives columns row for row, as evaluateModel does within 1e-6", async () => {
    const { values } = await chainCell(saltmarsh, options);
    expect(values.rows).toBe(4652);
    for (const row of [0, 2000, 4651]) {
      const at = (name: string) => values.columns[name]![row]!;
      const numbers = evaluateModel({
        hubble: at("hubble"),
        baryonDensity: at("baryonDensity"),
        coldMatterDensity: at("coldMatterDensity"),
      });
      expect(Math.abs(at("age") / numbers.value("age") - 1)).toBeLessThan(1e-6);
      expect(Math.abs(at("acousticAngle") / numbers.value("acousticAngle") - 1)).toBeLessThan(1e-6);
      expect(Math.abs(at("volumeDistance(1.1)") / numbers.value("volumeDistance", 1.1) - 1)).toBeLessThan(1e-6);
    }
    expect(values.weights).toHaveLength(4652);
  });

  it("gives the digits of the other cells with accuracy full", async () => {
    const columns = models(5);
    const cell = await chainCell(columns, { add: ["age"], accuracy: "full", shared: { recombination: "peebles" } });
    const first = Object.fromEntries(Object.entries(columns).map(([name, column]) => [name, column[0]!]));
    expect(cell.values.columns["age"]![0]).toBe(evaluateModel({ ...first, recombination: "peebles" }).value("age"));
    expect(cell.toText()).toContain("full computation");
    expect(cell.toText()).toContain("recombination = peebles; the rest by default");
  });

  it("has charts below 300 kB whatever the number of rows, in pictures without a warning", async () => {
    const few = await chainCell(models(300), { add: "age, equalityRedshift" });
    const many = await chainCell(
      Object.fromEntries(Object.entries(models(150_000)).map(([name, column]) => [name, column])),
      { regions: ["hubble", "baryonDensity", "coldMatterDensity"] },
    );
    for (const chart of [...few.charts, ...many.charts]) {
      const { length } = JSON.stringify(await chart.bundle());
      expect(length).toBeGreaterThan(1000);
      // Measured 180 kB for specification, picture and text of five columns.
      expect(length).toBeLessThan(300_000);
    }
  });

  it("leaves rows that give no model out of the sums, and says which and why", async () => {
    const columns = models(40);
    columns["hubble"]![6] = -1;
    const cell = await chainCell(columns, { add: "age", burnIn: 5 });
    expect(cell.values.problems).toMatchObject([{ row: 7, column: undefined }]);
    expect(Number.isNaN(cell.values.columns["age"]![1]!)).toBe(true);
    expect(cell.values.summaries["hubble"]!.mean).toBeGreaterThan(60);
    expect(cell.toText()).toContain(
      "Warning: 1 rows without all derived quantities are left out of the sums, the first is row 7",
    );
  });

  it("solves for H0 where theta_* stands in its place", async () => {
    const forward = await chainCell(models(50), { add: "acousticAngle" });
    const { hubble, baryonDensity, coldMatterDensity, acousticAngle } = forward.values.columns;
    const back = await chainCell(
      { theta: acousticAngle!, baryonDensity: baryonDensity!, coldMatterDensity: coldMatterDensity! },
      { map: { theta: "acousticAngle" }, add: "age" },
    );
    hubble!.forEach((value, row) => {
      // Measured 7e-15.
      expect(Math.abs(back.values.columns["hubble"]![row]! / value - 1)).toBeLessThan(1e-13);
    });
    expect(back.toText()).toContain("H0 of each row is solved for from acousticAngle");
  });

  it("reads the same chain from Parquet, and from columns separated by blanks", async () => {
    const lines = readFileSync(saltmarsh, "utf8").split("\n").slice(1, 400);
    const spaced = join(folder, "chain_1.txt");
    writeFileSync(spaced, `# ${lines.map((line) => line.replaceAll(",", "  ")).join("\n")}\n`);
    const csv = join(folder, "chain.csv");
    writeFileSync(csv, `${lines.join("\n")}\n`);
    const [one, other] = [await chainCell(csv, { map }), await chainCell(spaced, { map })];
    expect(other.values).toEqual(one.values);
  });

  it("sums up a single column and one that does not vary", async () => {
    const cell = await chainCell({ a: [1, 2, 3], b: [2, 2, 2] }, { also: ["a", "b"] });
    expect(cell.values.summaries["a"]).toMatchObject({ mean: 2, median: 2 });
    expect(cell.values.correlation).toEqual({ names: ["a"], matrix: [[1]] });
    expect((await chainCell({ b: [2, 2] }, { also: ["b"] })).charts).toEqual([]);
    expect(cell.toText()).not.toMatch(/NaN|Infinity/);
  });

  it("stops at its signal", async () => {
    const running = chainCell(models(3000), { add: "age", accuracy: "full", signal: AbortSignal.timeout(300) });
    await expect(running).rejects.toThrow(/stopped after \d+ of 3000 rows/);
  });

  const good = { hubble: [67, 68], baryonDensity: [0.022, 0.0221], coldMatterDensity: [0.12, 0.121] };
  const refusals: [string, ChainInput, ChainCellOptions, string][] = [
    ["an option that it does not have", good, { burnin: 3 } as ChainCellOptions, '"burnin" is not a known option'],
    [
      "a column to rename that is not there",
      good,
      { map: { h0: "hubble" } },
      '"h0" is not a known column of the chain',
    ],
    ["a name to rename to that is none", good, { map: { hubble: "hubbel" } }, '"hubbel" is not a known parameter'],
    ["a chain without a known column", { x: [1] }, {}, "must have a column by the vocabulary's names"],
    ["an unknown quantity", good, { add: "agee" }, "agee"],
    ["a quantity that the chain gives", good, { add: "hubble" }, "must not name a column that the chain gives"],
    ["a quantity twice", good, { add: "age, age" }, "must not ask twice"],
    [
      "a parameter in two columns",
      { ...good, H0: [1, 2] },
      { map: { H0: "hubble" } },
      "must give hubble in one column only",
    ],
    ["a region of one column", good, { regions: ["hubble"] }, "regions must name two to six different columns"],
    ["a region of a column that is not there", good, { regions: ["hubble", "age"] }, '"age" is not a known column'],
    [
      "two derived numbers in place of H0",
      { age: [13], acousticAngle: [1], baryonDensity: [0.02], coldMatterDensity: [0.1] },
      { add: "hubble" },
      "one derived number in its place",
    ],
    ["too few givens", { hubble: [67] }, { add: "age" }, "gives the baryons"],
    ["rows that all fail", { ...good, hubble: [-1, -1] }, { add: "age" }, "must have rows that give a model"],
    ["a cell that is no number", { ...good, hubble: [67, Number.NaN] }, {}, 'row 2 of column "hubble"'],
    ["no rows", { hubble: [] }, {}, "must have rows"],
  ];
  for (const [name, chain, options_, message] of refusals) {
    it(`refuses ${name}`, async () => {
      await expect(chainCell(chain, options_)).rejects.toThrow(message);
    });
  }
});
