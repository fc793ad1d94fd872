import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { burnInRows, type ChainInput, checkWeights, loadChain } from "../../../kernel-ext/chain";

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "cosmology-cells-chain-"));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function file(name: string, text: string): string {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
}

const both = (): readonly string[] => ["H0", "weight"];
const load = (input: ChainInput, wanted = both) => loadChain(input, wanted, "chainCell");

describe("loadChain", () => {
  const sources: Record<string, () => ChainInput> = {
    "a CSV file": () => file("a.csv", "weight,name,H0\n2,first,67.5\n1,second,68\n"),
    "a TSV file": () => file("a.tsv", "weight\tH0\n2\t67.5\n1\t68\n"),
    "JSON lines": () =>
      file("a.jsonl", '{"weight":2,"H0":67.5,"name":"first"}\n{"weight":1,"H0":68,"name":"second"}\n'),
    "columns separated by blanks, named after a #": () =>
      file("chain_1.txt", "#   weight   H0  other\n  2   67.5  1e-3\n# a comment\n\n  1.0   68.0\t2\n"),
    "columns separated by blanks, named in the first line": () => file("chain.dat", "weight H0\r\n2 67.5\r\n1 68\r\n"),
    "typed arrays": () => ({ weight: Float32Array.of(2, 1), H0: Float64Array.of(67.5, 68) }),
    arrays: () => ({ weight: [2, 1], H0: [67.5, 68] }),
    "rows as objects": () => [
      { weight: 2, H0: 67.5 },
      { weight: 1, H0: 68 },
    ],
  };
  for (const [name, source] of Object.entries(sources)) {
    it(`reads ${name}`, async () => {
      const chain = await load(source());
      expect(chain.rows).toBe(2);
      expect([...chain.columns]).toEqual([
        ["H0", Float64Array.of(67.5, 68)],
        ["weight", Float64Array.of(2, 1)],
      ]);
    });
  }

  it("holds columns that are longer than its first memory", async () => {
    const text = `H0,weight\n${Array.from({ length: 10_000 }, (_, row) => `${60 + row / 1000},1`).join("\n")}\n`;
    const chain = await load(file("long.csv", text));
    expect(chain.rows).toBe(10_000);
    expect(chain.columns.get("H0")![9999]).toBe(69.999);
  });

  const refusals: [string, () => ChainInput, string][] = [
    [
      "a cell that is no number",
      () => file("b.csv", "weight,H0\n1,67\n1,6x\n"),
      'row 2 of column "H0": must be a number such as',
    ],
    [
      "an empty cell",
      () => file("c.csv", "weight,H0\n1,67\n,68\n"),
      'row 2 of column "weight": must be a finite number',
    ],
    ["NaN", () => ({ weight: [1, 1], H0: [67, Number.NaN] }), 'row 2 of column "H0": must be a finite number, got NaN'],
    [
      "a row that is too short",
      () => file("d.txt", "weight H0\n1 67\n1\n"),
      "row 2: has 1 field where the first line names 2",
    ],
    [
      "columns of different lengths",
      () => ({ weight: [1], H0: [67, 68] }),
      'column "H0" must have as many rows as "weight", 1, got 2',
    ],
    ["a column that is not there", () => ({ weight: [1] }), '"H0" is not a known column of the chain'],
    ["a list without rows", () => [], "chain must have at least one row"],
    ["a file that is not there", () => join(folder, "none.csv"), "there is no such file"],
    ["numbers where names should be", () => file("e.txt", "1 67\n1 68\n"), "the first line must name the columns"],
    ["one name twice", () => file("f.txt", "H0 H0\n1 68\n"), 'two columns have the name "H0"'],
    ["an empty file", () => file("g.txt", "\n\n"), "is empty"],
  ];
  for (const [name, source, message] of refusals) {
    it(`refuses ${name}`, async () => {
      await expect(load(source())).rejects.toThrow(message);
    });
  }

  it("does not mind what stands in columns that nobody reads", async () => {
    expect((await load({ weight: [1], H0: [67], other: [Number.NaN] })).rows).toBe(1);
  });
});

describe("burnInRows", () => {
  it("takes a share of the rows or a number of them", () => {
    expect([undefined, 0, 0.3, 1, 7].map((each) => burnInRows(each, 10, "chainCell"))).toEqual([0, 0, 3, 1, 7]);
  });

  it("refuses what is neither, and what leaves nothing", () => {
    for (const wrong of [-0.1, 1.5, Number.NaN]) {
      expect(() => burnInRows(wrong, 10, "chainCell")).toThrow("chainCell: burnIn must be a share of the rows");
    }
    expect(() => burnInRows(10, 10, "chainCell")).toThrow("must leave rows: the chain has 10, got 10");
  });
});

describe("checkWeights", () => {
  it("refuses a negative weight with its row, and weights that are all 0 behind the burn-in", () => {
    expect(() => checkWeights(Float64Array.of(1, -1), 0, "weight", "chainCell")).toThrow('row 2 of column "weight"');
    expect(() => checkWeights(Float64Array.of(1, 0, 0), 1, "weight", "chainCell")).toThrow(
      "weight above 0 in some row",
    );
  });
});
