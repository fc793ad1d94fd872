// The notebook format is that of nbformat 4.5, as its JSON schema describes it (memory).
import { readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { afterAll, describe, expect, it } from "vitest";
import {
  NotebookFileError,
  parseNotebook,
  plainText,
  readNotebook,
  textLines,
  writeNotebook,
  writeWhole,
} from "../../../kernel-ext/command/notebookFile";
import { codeCell, markdownCell, newFolder, notebookText } from "./notebooks";

const folder = newFolder();
afterAll(() => rmSync(folder, { recursive: true, force: true }));

describe("parseNotebook", () => {
  it("reads cells, sources as text or lines, and brings the format to 4.5 with an id for every cell", () => {
    const older = JSON.stringify({
      nbformat: 4,
      nbformat_minor: 2,
      metadata: { title: "t" },
      cells: [
        { cell_type: "code", metadata: {}, source: ["a\n", "b"], execution_count: 3, outputs: [] },
        { cell_type: "markdown", metadata: {}, source: "# x" },
        { cell_type: "raw", metadata: {}, source: "" },
      ],
    });
    const notebook = parseNotebook(`\uFEFF${older}`, "n");
    expect([notebook.nbformat, notebook.nbformat_minor]).toEqual([4, 5]);
    expect(notebook.metadata).toEqual({ title: "t" });
    expect(notebook.cells.map((cell) => plainText(cell.source))).toEqual(["a\nb", "# x", ""]);
    for (const { id } of notebook.cells) expect(id).toMatch(/^[a-zA-Z0-9_-]{1,64}$/);
  });

  it("keeps good ids and replaces double ones", () => {
    const cells = ["same", "same", "other"].map((id) => ({ ...codeCell("1"), id }));
    const ids = parseNotebook(notebookText(cells), "n").cells.map(({ id }) => id);
    expect([ids[0], ids[2]]).toEqual(["same", "other"]);
    expect(new Set(ids).size).toBe(3);
  });

  it("says what is wrong with a file that is no notebook", () => {
    const refusal = (text: string): string => {
      try {
        parseNotebook(text, "x.ipynb");
        return "accepted";
      } catch (error) {
        expect(error).toBeInstanceOf(NotebookFileError);
        return (error as Error).message;
      }
    };
    expect(refusal("{")).toMatch(/^x\.ipynb: is not a notebook: not valid JSON/);
    expect(refusal("[]")).toMatch(/must hold one JSON object/);
    expect(refusal('{"nbformat":3,"worksheets":[]}')).toMatch(/"nbformat" must be 4, got 3/);
    expect(refusal('{"nbformat":4}')).toMatch(/"cells" must be a list/);
    expect(refusal(notebookText([codeCell("1"), { cell_type: "chart", source: "" }]))).toMatch(
      /cell 2: "cell_type" must be code, markdown or raw, got "chart"/,
    );
    expect(refusal(notebookText([{ cell_type: "code", source: 5 }]))).toMatch(/cell 1: "source" must be text/);
    expect(refusal(notebookText([null as unknown as object]))).toMatch(/cell 1 must be an object/);
  });
});

describe("readNotebook and writeNotebook", () => {
  it("give back the same notebook", () => {
    const path = join(folder, "same.ipynb");
    const notebook = parseNotebook(notebookText([codeCell("1 + 1"), markdownCell("# θ")]), "n");
    writeNotebook(path, notebook);
    expect(readNotebook(path)).toEqual(notebook);
  });

  it("say when there is no such file", () => {
    expect(() => readNotebook(join(folder, "missing.ipynb"))).toThrow(/missing\.ipynb: there is no such file/);
  });

  it("leave no temporary file behind, and the old file where writing fails", () => {
    const inner = join(folder, "inner");
    writeWhole(join(inner, "a.txt"), "one");
    writeWhole(join(inner, "a.txt"), "two");
    expect(readdirSync(inner)).toEqual(["a.txt"]);
    writeFileSync(join(folder, "file"), "");
    expect(() => writeWhole(join(inner, "a.txt", "b.txt"), "three")).toThrow();
    expect(readFileSync(join(inner, "a.txt"), "utf8")).toBe("two");
    expect(readdirSync(inner)).toEqual(["a.txt"]);
  });
});

describe("textLines", () => {
  it("cuts after line ends and keeps them", () => {
    expect(textLines("a\n\nb")).toEqual(["a\n", "\n", "b"]);
    expect(textLines("a\n")).toEqual(["a\n"]);
    expect(textLines("")).toEqual([]);
  });
});
