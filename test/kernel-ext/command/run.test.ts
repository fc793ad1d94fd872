import { existsSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { type CodeCell, type NotebookFile, readNotebook } from "../../../kernel-ext/command/notebookFile";
import { codeCell, command, markdownCell, newFolder, writeCells } from "./notebooks";

let folder: string;
beforeAll(() => {
  folder = newFolder();
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function codeOf(notebook: NotebookFile): CodeCell[] {
  return notebook.cells.filter((cell): cell is CodeCell => cell.cell_type === "code");
}

describe("cosmology-cells run", () => {
  it("writes the executed notebook and a report, with a progress line a cell, and ends with 0", async () => {
    writeFileSync(join(folder, "beside.txt"), "from beside");
    writeCells(folder, "good.ipynb", [
      markdownCell("# A title"),
      codeCell(["const a = 40;\n", "a + 2"]),
      codeCell(
        'console.log(require("fs").readFileSync("beside.txt", "utf8")); const bar = progress({ label: "Rows", total: 2 }); bar.update(1); bar.finish();',
      ),
      codeCell("   \n"),
      codeCell("throw 1", ["skip-execution"]),
      codeCell("throw new RangeError('as planned')", ["raises-exception"]),
    ]);
    const { code, stdout, stderr } = await command(
      ["run", join(folder, "good.ipynb"), "--out", join(folder, "out")],
      "/",
    );
    expect([code, stdout]).toEqual([0, ""]);
    const lines = stderr
      .trim()
      .split("\n")
      .map((line) => line.replace(/\d+\.\d\d s/, "T"));
    expect(lines.slice(0, 3)).toEqual([
      "good: cell 2 of 6: ok, T",
      "good: cell 3 of 6: ok, T",
      "good: cell 6 of 6: failed as allowed, T",
    ]);
    const notebook = readNotebook(join(folder, "out", "good.ipynb"));
    const cells = codeOf(notebook);
    expect(cells.map((cell) => cell.execution_count)).toEqual([1, 2, null, null, 3]);
    expect(cells[0].outputs).toEqual([
      { output_type: "execute_result", execution_count: 1, data: { "text/plain": ["42"] }, metadata: {} },
    ]);
    expect(cells[1].outputs.map((output) => output.output_type)).toEqual(["stream", "display_data"]);
    expect(cells[1].outputs[0]).toMatchObject({ text: ["from beside\n"] });
    expect(JSON.stringify(cells[1].outputs[1])).toContain("finished");
    expect(notebook.metadata.kernelspec).toMatchObject({ name: "cosmology-cells", language: "typescript" });
    const html = readFileSync(join(folder, "out", "good.html"), "utf8");
    expect(html).toContain("A title");
    expect(html).toContain("42");
    expect(readdirSync(join(folder, "out")).sort()).toEqual(["good.html", "good.ipynb"]);
  });

  it("ends with 1 and tells cell, line and error when a cell fails, writes what there is, and runs nothing after it", async () => {
    const path = writeCells(folder, "bad.ipynb", [
      codeCell('console.log("one")'),
      markdownCell("between"),
      codeCell("const b = 1;\n\nhubbleOf(b);"),
      codeCell('console.log("never")'),
    ]);
    const { code, stderr } = await command(["run", path, "--out", join(folder, "out")], folder);
    expect(code).toBe(1);
    expect(stderr).toContain(
      "bad.ipynb: cell 3, line 3: TypeCheckError: line 3, column 1: Cannot find name 'hubbleOf'.",
    );
    expect(stderr).toContain("the cells after it were not run");
    const cells = codeOf(readNotebook(join(folder, "out", "bad.ipynb")));
    expect(cells.map(({ outputs }) => outputs.map((output) => output.output_type))).toEqual([
      ["stream"],
      ["error"],
      [],
    ]);
  });

  it("goes on after errors and ends with 0 where --allow-errors is given", async () => {
    const path = writeCells(folder, "allowed.ipynb", [codeCell("throw new Error('x')"), codeCell("1 + 1")]);
    const { code } = await command(["run", path, "--out", join(folder, "out"), "--allow-errors"], folder);
    expect(code).toBe(0);
    const cells = codeOf(readNotebook(join(folder, "out", "allowed.ipynb")));
    expect(cells.map(({ outputs }) => outputs.map((output) => output.output_type))).toEqual([
      ["error"],
      ["execute_result"],
    ]);
  });

  it("ends with 1 when a cell fails after its end, and puts the error into that cell", async () => {
    const path = writeCells(folder, "late.ipynb", [
      codeCell("setTimeout(() => {\n  throw new Error('late');\n}, 600);"),
      codeCell("await new Promise((resolve) => setTimeout(resolve, 1500));"),
    ]);
    const { code, stderr } = await command(["run", path, "--out", join(folder, "out")], folder);
    expect(code).toBe(1);
    expect(stderr).toContain("late.ipynb: cell 1, line 2: Error: late");
    const cells = codeOf(readNotebook(join(folder, "out", "late.ipynb")));
    expect(cells.map(({ outputs }) => outputs.map((output) => output.output_type))).toEqual([
      ["execute_result", "error"],
      [],
    ]);
  });

  it("interrupts a cell that takes longer than --timeout", async () => {
    const path = writeCells(folder, "slow.ipynb", [codeCell("await null; for (;;) {}"), codeCell("1")]);
    const { code, stderr } = await command(["run", path, "--out", join(folder, "out"), "--timeout", "1"], folder);
    expect(code).toBe(1);
    expect(stderr).toContain("slow.ipynb: cell 1: TimeoutError: the cell did not end within 1 s and was interrupted");
    expect(codeOf(readNotebook(join(folder, "out", "slow.ipynb")))[0].outputs.length).toBeGreaterThan(0);
  });

  it("tells when the kernel dies", async () => {
    const path = writeCells(folder, "dies.ipynb", [codeCell('process.kill(process.pid, "SIGKILL"); for (;;) {}')]);
    const { code, stderr } = await command(["run", path, "--out", join(folder, "out")], folder);
    expect(code).toBe(1);
    expect(stderr).toContain("dies.ipynb: cell 1: KernelFailure: the kernel was ended by SIGKILL");
  });

  it("ends with 2 and a clear message for a file that is no notebook, and writes nothing", async () => {
    for (const [name, text, message] of [
      ["broken.ipynb", "{ not json", /broken\.ipynb: is not a notebook: not valid JSON/],
      ["old.ipynb", '{"nbformat":3,"worksheets":[]}', /old\.ipynb: is not a notebook of format 4/],
    ] as const) {
      writeFileSync(join(folder, name), text);
      const { code, stderr } = await command(["run", join(folder, name), "--out", join(folder, "none")], folder);
      expect(code).toBe(2);
      expect(stderr).toMatch(message);
    }
    expect((await command(["run", "missing.ipynb"], folder)).stderr).toMatch(/missing\.ipynb: there is no such file/);
    expect(existsSync(join(folder, "none"))).toBe(false);
  });

  it("never overwrites the notebook that it runs", async () => {
    const path = writeCells(folder, "same.ipynb", [codeCell("1")]);
    const before = readFileSync(path, "utf8");
    const { code, stderr } = await command(["run", "same.ipynb", "--out", "."], folder);
    expect(code).toBe(2);
    expect(stderr).toContain("choose another --out");
    expect(readFileSync(path, "utf8")).toBe(before);
  });

  it("refuses options that it does not know, and a timeout that is no positive number", async () => {
    const path = writeCells(folder, "options.ipynb", [codeCell("1")]);
    const unknown = await command(["run", path, "--quick"], folder);
    expect([unknown.code, unknown.stderr]).toEqual([2, expect.stringContaining("--quick")]);
    const zero = await command(["run", path, "--timeout", "0"], folder);
    expect([zero.code, zero.stderr]).toEqual([
      2,
      expect.stringContaining('--timeout must be a positive number, got "0"'),
    ]);
    expect((await command(["run"], folder)).code).toBe(2);
  });
});

describe("cosmology-cells start", () => {
  it("prints the text of headline cells and writes executed notebooks and one report", async () => {
    const first = writeCells(folder, "one.ipynb", [
      codeCell('"shown".length', ["headline"]),
      codeCell('console.log("theta 1.04")', ["headline"]),
      codeCell("123456"),
    ]);
    const inner = join(folder, "out");
    const second = writeCells(inner, "one.ipynb", [codeCell("7 * 7", ["headline"])]);
    const out = join(folder, "started");
    const { code, stdout } = await command(["start", first, second, "--out", out], folder);
    expect(code).toBe(0);
    expect(stdout).toBe(
      `one\n5\ntheta 1.04\n\none-2\n49\n\nexecuted notebooks: ${join(out, "one.ipynb")}, ${join(out, "one-2.ipynb")}\nreport: ${join(out, "report.html")}\n`,
    );
    expect(readdirSync(out).sort()).toEqual(["one-2.ipynb", "one.ipynb", "report.html"]);
    expect(statSync(join(out, "report.html")).size).toBeGreaterThan(500);
  });

  it("ends with 1 when a cell fails", async () => {
    const path = writeCells(folder, "fails.ipynb", [codeCell("throw new Error('no')")]);
    const { code, stderr } = await command(["start", path, "--out", join(folder, "started")], folder);
    expect(code).toBe(1);
    expect(stderr).toContain("fails.ipynb: cell 1, line 1: Error: no");
  });
});
