import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { openTable, tableWriter } from "../../../kernel-ext/data";
import { allRows, cellsOf, open } from "./tables";

// All tables here are invented.

describe("openTable for csv and tsv", () => {
  it("reads the forms that RFC 4180, section 2, defines", async () => {
    // Rules 1 to 4: line ends, none needed after the last row, header, fields.
    expect(await cellsOf("x,y,z\r\naaa,bbb,ccc\r\nzzz,yyy,xxx\r\n")).toEqual([
      ["aaa", "bbb", "ccc"],
      ["zzz", "yyy", "xxx"],
    ]);
    expect(await cellsOf("x,y,z\naaa,bbb,ccc\nzzz,yyy,xxx")).toEqual([
      ["aaa", "bbb", "ccc"],
      ["zzz", "yyy", "xxx"],
    ]);
    // Rule 5 and 6: quoted fields, with line ends inside.
    expect(await cellsOf('x,y,z\r\n"aaa","b \r\nbb","ccc"\r\nzzz,yyy,xxx')).toEqual([
      ["aaa", "b \r\nbb", "ccc"],
      ["zzz", "yyy", "xxx"],
    ]);
    // Rule 7: a quote inside is doubled.
    expect(await cellsOf('x,y,z\n"aaa","b""bb","ccc"')).toEqual([["aaa", 'b"bb', "ccc"]]);
  });

  it("leaves text as it is and missing values missing", async () => {
    expect(await cellsOf("id,note,value\n00123, spaced ,1e400\n,,\n-0,NaN,\n")).toEqual([
      ["00123", " spaced ", "1e400"],
      [null, null, null],
      ["-0", "NaN", null],
    ]);
  });

  it("skips comments, blank lines and a byte order mark, and trims names of columns", async () => {
    const table = await open("\uFEFF# invented\n\n a , b\n# between\n1,2\n\n3,4\r\n#end");
    expect(table.columns).toEqual(["a", "b"]);
    const rows = await allRows(table);
    expect(rows.map((row) => [row.number, ...row.cells])).toEqual([
      [1, "1", "2"],
      [2, "3", "4"],
    ]);
  });

  it("takes mixed line ends, and a # that is quoted or not at the beginning", async () => {
    expect(await cellsOf('a,b\n1,2\r\n"#3",#4\n5,"6"\r\n')).toEqual([
      ["1", "2"],
      ["#3", "#4"],
      ["5", "6"],
    ]);
  });

  it("separates by tabs where the format is tsv", async () => {
    expect(await cellsOf('a\tb\n1,5\t"x\ty"\n', "tsv")).toEqual([["1,5", "x\ty"]]);
  });

  it("gives a header without rows as an empty table", async () => {
    const table = await open("a,b\n");
    expect(table.columns).toEqual(["a", "b"]);
    expect(await allRows(table)).toEqual([]);
  });

  it("gives a ragged row in its place, with its number and what does not fit", async () => {
    const rows = await allRows(await open('a,b,c\n1,2,3\n# no row\n4,5\n6,7,8,9,"x y"\n10,11,12\n'));
    expect(rows.map((row) => row.problem?.reason)).toEqual([
      undefined,
      "has 2 fields where the header has 3",
      'has 5 fields where the header has 3; beyond the header: "9 x y"',
      undefined,
    ]);
    expect(rows[1]!.problem!.row).toBe(2);
    expect(rows[1]!.cells).toEqual(["4", "5", null]);
    expect(rows[3]!.cells).toEqual(["10", "11", "12"]);
  });

  it("reads the same cells however the bytes are cut, and what tableWriter wrote", async () => {
    // Letters that need two to four bytes in UTF-8, and all characters that CSV gives a meaning.
    const letters = [..."aZ0 é\u03c9\u{1F30C}\",;\n\t#'-."];
    const cell = fc
      .string({ unit: fc.constantFrom(...letters), maxLength: 6 })
      .map((text) => (text === "" ? null : text));
    const rows = fc.array(fc.tuple(cell, cell, cell), { minLength: 1, maxLength: 12 });
    const formats = fc.constantFrom("csv" as const, "tsv" as const);
    await fc.assert(
      fc.asyncProperty(rows, fc.integer({ min: 1, max: 40 }), formats, async (data, piece, format) => {
        const writer = tableWriter(format, ["one", "two"], ["three,four"]);
        const lines = data.map((row, index) => writer.row({ number: index + 1, cells: row.slice(0, 2) }, row.slice(2)));
        const table = await open(writer.header() + lines.join(""), format, piece);
        expect(table.columns).toEqual(["one", "two", "three,four"]);
        expect((await allRows(table)).map((row) => row.cells)).toEqual(data);
      }),
      { numRuns: 300 },
    );
  });

  it("does not hold more than a piece of a long table", async () => {
    let given = 0;
    async function* endless(): AsyncGenerator<Uint8Array> {
      yield new TextEncoder().encode("a,b\n");
      for (;;) {
        given++;
        yield new TextEncoder().encode("1,2\n".repeat(1000));
      }
    }
    const table = await openTable(endless(), "endless", "csv");
    let rows = 0;
    for await (const batch of table.batches()) {
      rows += batch.length;
      if (rows >= 5000) break;
    }
    expect(rows).toBe(5000);
    expect(given).toBe(5);
  });
});

describe("openTable refuses as a whole", () => {
  const encoder = new TextEncoder();
  const cases: [name: string, content: string | Uint8Array, message: string, format?: "csv" | "tsv" | "jsonl"][] = [
    ["an empty file", "", "invented.csv: is empty: there is no header row"],
    ["a file of comments", "# only\n\n# this\n", "invented.csv: is empty: there is no header row"],
    ["a column named twice", "a,b,a\n1,2,3\n", 'invented.csv: columns 1 and 3 have the same name "a"'],
    ["a column named twice but for blanks", "a,b, a\n", 'invented.csv: columns 1 and 3 have the same name "a"'],
    [
      "no header",
      "67.4,0.0224,0.12\n",
      'invented.csv: the first row must name the columns, and it holds numbers: "67.4 0.0224 0.12"',
    ],
    ["semicolons", "a;b\n1;2\n", 'invented.csv: seems to separate its columns by ";", and csv needs ","'],
    ["tabs in csv", "a\tb\n1\t2\n", 'invented.csv: seems to separate its columns by tabs, and csv needs ","'],
    ["commas in tsv", "a,b\n1,2\n", 'invented.tsv: seems to separate its columns by ",", and tsv needs tabs', "tsv"],
    ["line ends of CR alone", "a,b\r1,2\r", "invented.csv: separates its lines by CR alone"],
    [
      "a quote that is never closed",
      'a,b\n1,2\n3,"4\n5,6\n',
      "invented.csv: row 2: a quote that opens a field is never closed",
    ],
    [
      "a quote that is not doubled",
      'a,b\n1,"2"3\n4,"5"\n',
      "invented.csv: row 1: text follows the quote that closes a field",
    ],
    [
      "a broken quote in the header",
      'a,"b"c\n1,"2"\n',
      "invented.csv: in the header, text follows the quote that closes a field",
    ],
    ["Latin-1", new Uint8Array([...encoder.encode("a,b\n1,caf"), 0xe9, 0x0a]), "invented.csv: is not UTF-8 text"],
    ["UTF-8 cut inside a letter", encoder.encode("a,b\n1,é").subarray(0, -1), "invented.csv: is not UTF-8 text"],
    ["UTF-16", new Uint8Array([0xff, 0xfe, 0x61, 0, 0x2c, 0]), "invented.csv: is UTF-16 text"],
    [
      "UTF-16 without a mark",
      new Uint8Array([0x61, 0, 0x2c, 0, 0x62, 0]),
      "invented.csv: holds a NUL character: it is no text file",
    ],
    ["gzip", new Uint8Array([0x1f, 0x8b, 8, 0]), "invented.csv: is compressed (gzip)"],
    ["Parquet", encoder.encode("PAR1\x15\x04"), "invented.csv: is a Parquet file"],
    ["a spreadsheet", new Uint8Array([0x50, 0x4b, 3, 4, 20]), "invented.csv: is a ZIP archive or a spreadsheet"],
    [
      "an empty file of JSON lines",
      "\n\n",
      "invented.jsonl: is empty: there is no first row to name the columns",
      "jsonl",
    ],
    ["a JSON list", "[1, 2]\n", 'invented.jsonl: row 1: must be a JSON object, got "[1, 2]"', "jsonl"],
    [
      "a first object with a field twice",
      '{"a":1,"a":2}\n',
      'invented.jsonl: row 1: names a field twice, got "{\\"a\\":1,\\"a\\":2}"',
      "jsonl",
    ],
  ];
  for (const [name, content, message, format] of cases) {
    it(name, async () => {
      const reading = open(content, format).then(allRows);
      await expect(reading).rejects.toMatchObject({ name: "TableError", message });
    });
  }

  it("a row longer than any table has, before it fills the memory", async () => {
    async function* endless(): AsyncGenerator<Uint8Array> {
      yield encoder.encode('a,b\n1,2\n3,"');
      for (;;) yield encoder.encode("4,5\n".repeat(10_000));
    }
    const reading = openTable(endless(), "endless.csv", "csv").then(allRows);
    await expect(reading).rejects.toMatchObject({ message: "endless.csv: row 2: takes more than 4194304 characters" });
  });
});
