import { describe, expect, it } from "vitest";
import { tableWriter } from "../../../kernel-ext/data";
import { allRows, cellsOf, open } from "./tables";

// All tables here are invented.

describe("openTable for jsonl", () => {
  it("reads typed cells, keeps null and left-out fields apart, and takes fields in any order", async () => {
    const text =
      '{"id":"00123","x":1.5,"ok":true,"list":[0.06,0]}\r\n\n{"x":null,"id":"b"}\n{"list":[],"ok":false,"x":2,"id":""}';
    expect(await cellsOf(text, "jsonl")).toEqual([
      ["00123", 1.5, true, [0.06, 0]],
      ["b", null, undefined, undefined],
      ["", 2, false, []],
    ]);
  });

  it("reads the same rows however the bytes are cut", async () => {
    const text = '{"name":"\u03c9_b \u{1F30C}","x":1}\n{"name":"a:b \\" \\\\","x":2}\n';
    const whole = await cellsOf(text, "jsonl");
    for (let piece = 1; piece < 20; piece++) expect(await cellsOf(text, "jsonl", piece)).toEqual(whole);
    expect(whole).toEqual([
      ["\u03c9_b \u{1F30C}", 1],
      ['a:b " \\', 2],
    ]);
  });

  it("gives a bad line in its place with its reason", async () => {
    const lines = [
      '{"x":1,"y":{"z":1}}',
      '{"x":1',
      "[1]",
      '{"x":1,"x":2}',
      '{"x":3,"w":4}',
      '{"x":NaN}',
      '{"x":1,"y":{"z":1,"z":2}}',
      '{"x":5}',
    ];
    const rows = await allRows(await open(lines.join("\n"), "jsonl"));
    expect(rows.map((row) => row.problem?.reason.replace(/\(.*/, "(...)"))).toEqual([
      undefined,
      "is not valid JSON (...)",
      "must be a JSON object",
      "names a field twice",
      "is a field that the first row does not have",
      "is not valid JSON (...)",
      "names a field twice",
      undefined,
    ]);
    expect(rows[1]!.problem).toMatchObject({ row: 2, value: '{"x":1' });
    expect(rows[4]!.problem).toMatchObject({ row: 5, column: "w", value: 4 });
    expect(rows[7]!.cells).toEqual([5, undefined]);
  });
});

describe("tableWriter for jsonl", () => {
  it("adds fields to a line and leaves what stood there untouched, digits beyond a double included", async () => {
    const line = '{ "id": 12345678901234567890, "x": 1.50 }';
    const table = await open(line, "jsonl");
    const [row] = await allRows(table);
    const writer = tableWriter("jsonl", table.columns, ["age", "problem"]);
    expect(writer.header()).toBe("");
    expect(writer.row(row!, [13.5, null])).toBe('{ "id": 12345678901234567890, "x": 1.50,"age":13.5,"problem":null}\n');
  });

  it("writes rows of a text file as objects, missing values as null", () => {
    const writer = tableWriter("jsonl", ["id", "x"], ["age"]);
    expect(writer.row({ number: 1, cells: ["00123", null] }, [-0])).toBe('{"id":"00123","x":null,"age":0}\n');
    expect(writer.row({ number: 2, cells: [undefined, 'a"b\n'] }, [1e-7])).toBe('{"x":"a\\"b\\n","age":1e-7}\n');
    expect(tableWriter("jsonl", [], ["age"]).row({ number: 1, cells: [], line: "{}" }, [1])).toBe('{"age":1}\n');
  });
});

describe("tableWriter for csv", () => {
  const writer = tableWriter("csv", ["id", "list"], ["comovingDistance(0.5,1)"]);

  it("quotes what needs it and nothing else (RFC 4180, section 2, rules 6 and 7)", () => {
    expect(writer.header()).toBe('id,list,"comovingDistance(0.5,1)"\n');
    expect(writer.row({ number: 1, cells: ["a,b", 'say "x"'] }, [1.25])).toBe('"a,b","say ""x""",1.25\n');
    expect(writer.row({ number: 2, cells: ["#1", " padded "] }, [null])).toBe('"#1"," padded ",\n');
    expect(writer.row({ number: 3, cells: ["two\nlines", "plain"] }, [3])).toBe('"two\nlines",plain,3\n');
  });

  it("writes lists with ; and objects as JSON, and refuses numbers that are not finite", () => {
    expect(writer.row({ number: 1, cells: [true, [0.06, 0]] }, [-1e-7])).toBe("true,0.06;0,-1e-7\n");
    expect(writer.row({ number: 2, cells: [{ a: 1 }, undefined] }, [0])).toBe('"{""a"":1}",,0\n');
    expect(() => writer.row({ number: 3, cells: ["", ""] }, [Number.NaN])).toThrow("must be finite, got NaN");
  });
});
