import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { type CellValue, openTable, readParquet, tableOutput, wholeFile } from "../../../kernel-ext/data";
import { allRows } from "./tables";

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "cosmology-cells-parquet-"));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** Writes rows of cells; returns the file. */
async function write(
  name: string,
  columns: string[],
  rows: CellValue[][],
  textColumns: string[] = [],
): Promise<string> {
  const file = join(folder, name);
  const sink = await wholeFile(file);
  const output = await tableOutput({
    format: "parquet",
    columns,
    added: [],
    sink,
    header: true,
    textColumns: new Set(textColumns),
  });
  try {
    for (const [index, cells] of rows.entries()) {
      output.row({ number: index + 1, cells }, []);
      if (index % 1000 === 999) await output.flush();
    }
    await output.end();
    await sink.finish();
  } catch (error) {
    sink.discard();
    throw error;
  }
  return file;
}

async function cells(file: string): Promise<CellValue[][]> {
  return (await allRows(await readParquet(file))).map((row) => [...row.cells]);
}

describe("Parquet", () => {
  it("gives back numbers to the last digit, text, true and false, and missing values", async () => {
    const rows: CellValue[][] = [
      [1 / 3, 'Grüße, "ω"', true, null],
      [-1e-300, "", false, 5],
      [null, "a\nb", null, 1.5],
    ];
    expect(await cells(await write("kinds.parquet", ["number", "text", "flag", "some"], rows))).toEqual(rows);
  });

  it("makes a column of numbers from text where all its cells are plain numbers, and of nothing else", async () => {
    const rows = [
      ["67.4", "00123", "1e3", "0.06;0", "1"],
      ["-2", "00124", "0.5", "0.06", "x"],
    ];
    const columns = ["a", "b", "c", "d", "e"];
    expect(await cells(await write("text.parquet", columns, rows))).toEqual([
      [67.4, "00123", 1000, "0.06;0", "1"],
      [-2, "00124", 0.5, "0.06", "x"],
    ]);
    expect((await cells(await write("kept.parquet", columns, rows, ["a"])))[0]![0]).toBe("67.4");
  });

  it("holds several row groups, in order, and tells the number of rows", async () => {
    const rows = Array.from({ length: 70_000 }, (_, row) => [row, `row ${row}`]);
    const file = await write("long.parquet", ["n", "words"], rows);
    const table = await readParquet(file);
    expect(table.rows).toBe(70_000);
    expect(table.columns).toEqual(["n", "words"]);
    const read = await allRows(table);
    expect(read.map(({ number }) => number)).toEqual(rows.map((_, row) => row + 1));
    expect(read.map((row) => [...row.cells])).toEqual(rows);
  });

  it("holds a table without rows", async () => {
    const table = await readParquet(await write("none.parquet", ["a"], []));
    expect([table.columns, await allRows(table)]).toEqual([["a"], []]);
  });

  it("writes lists and objects as JSON text", async () => {
    const file = await write("nested.parquet", ["list"], [[[0.06, 0]], [{ a: 1 }]]);
    expect(await cells(file)).toEqual([["[0.06,0]"], ['{"a":1}']]);
  });

  it("refuses a later cell that does not fit its column, with row and column, and leaves nothing behind", async () => {
    const rows = Array.from({ length: 40_000 }, (_, row) => [row === 35_000 ? "x" : "1"]);
    await expect(write("late.parquet", ["a"], rows)).rejects.toThrow(
      'row 35001: column "a" must hold a finite number, as in the first rows, got "x"',
    );
    expect(() => readFileSync(join(folder, "late.parquet"))).toThrow();
  });

  it("gives a row with NaN or an infinity with a problem", async () => {
    const { parquetWriteBuffer } = await import("hyparquet-writer");
    const file = join(folder, "nan.parquet");
    const columnData = [{ name: "a", data: [1, Number.NaN, Number.POSITIVE_INFINITY], type: "DOUBLE" as const }];
    writeFileSync(file, new Uint8Array(parquetWriteBuffer({ columnData })));
    const rows = await allRows(await readParquet(file));
    expect(rows.map((row) => row.problem?.reason)).toEqual([
      undefined,
      "must be a finite number",
      "must be a finite number",
    ]);
    expect(rows[1]!.problem).toMatchObject({ row: 2, column: "a" });
  });

  it("reads integers of 64 bits as numbers where a double holds them, else as text, and times as ISO 8601", async () => {
    const { parquetWriteBuffer } = await import("hyparquet-writer");
    const file = join(folder, "kinds2.parquet");
    const columnData = [
      { name: "n", data: [7n, 9007199254740993n], type: "INT64" as const },
      { name: "t", data: [new Date(0), new Date(86_400_000)], type: "TIMESTAMP" as const },
    ];
    writeFileSync(file, new Uint8Array(parquetWriteBuffer({ columnData })));
    expect(await cells(file)).toEqual([
      [7, "1970-01-01T00:00:00.000Z"],
      ["9007199254740993", "1970-01-02T00:00:00.000Z"],
    ]);
  });

  it("refuses what is no Parquet file, one that is cut, one that is not there, and a stream", async () => {
    const text = join(folder, "text.csv.parquet");
    writeFileSync(text, "a,b\n1,2\n");
    await expect(readParquet(text)).rejects.toThrow("is no Parquet file that can be read");
    const whole = readFileSync(await write("whole.parquet", ["a"], [[1], [2]]));
    const cut = join(folder, "cut.parquet");
    writeFileSync(cut, whole.subarray(0, whole.length - 9));
    await expect(readParquet(cut)).rejects.toThrow("is no Parquet file that can be read");
    await expect(readParquet(join(folder, "absent.parquet"))).rejects.toThrow("there is no such file");
    expect(() => openTable((async function* () {})(), "x", "parquet")).toThrow("cannot be read as a stream");
  });
});
