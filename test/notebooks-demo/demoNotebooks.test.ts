import { execFileSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { beforeAll, describe, expect, it } from "vitest";
import { evaluateModel, type ModelGivens } from "../../kernel-ext";
import { notebooksToHtml } from "../../kernel-ext/command/htmlReport";
import { plainText } from "../../kernel-ext/command/notebookFile";
import { hasTag, type RunReport } from "../../kernel-ext/command/runNotebook";
import { headlines } from "../../kernel-ext/command/start";
import { demoFolder, demoNames, runDemo } from "./demoNotebooks";
import { schemaComplaints } from "./notebookSchema";

/** The model that the notebooks plan with. */
const plan: ModelGivens = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };

const read = (name: string) => JSON.parse(readFileSync(join(demoFolder, name), "utf8"));

/** Everything that the code cells of an executed notebook wrote to standard output. */
function printed({ notebook }: RunReport): string {
  return notebook.cells
    .flatMap((cell) => (cell.cell_type === "code" ? cell.outputs : []))
    .map((output) => (output.output_type === "stream" ? plainText(output.text) : ""))
    .join("");
}

function chartCount({ notebook }: RunReport): number {
  return notebook.cells
    .flatMap((cell) => (cell.cell_type === "code" ? cell.outputs : []))
    .filter((output) => "data" in output && output.data["image/svg+xml"] !== undefined).length;
}

describe("the demo notebooks as they are kept", () => {
  it("are two at least, in a fixed order", () => {
    expect(demoNames.length).toBeGreaterThanOrEqual(2);
  });

  for (const name of demoNames) {
    it(`${name} is valid nbformat 4.5, names the kernel, holds no outputs and says that its survey is invented`, () => {
      const notebook = read(name);
      expect(schemaComplaints(notebook)).toEqual([]);
      expect(notebook.nbformat_minor).toBe(5);
      expect(notebook.metadata.kernelspec).toMatchObject({ name: "cosmology-cells", language: "typescript" });
      for (const cell of notebook.cells) {
        if (cell.cell_type === "code") expect([cell.outputs, cell.execution_count]).toEqual([[], null]);
      }
      expect(notebook.cells[0].cell_type).toBe("markdown");
      expect(plainText(notebook.cells[0].source)).toContain("invented");
    });
  }

  it("the schema would complain of a notebook without ids and with a wrong output", () => {
    const notebook = read(demoNames[0]!);
    delete notebook.cells[1].id;
    notebook.cells[2].outputs = [{ output_type: "stream", text: 3 }];
    expect(schemaComplaints(notebook).join("\n")).toMatch(/\/cells\/1 must have required property 'id'/);
    expect(schemaComplaints(notebook).join("\n")).toMatch(/\/cells\/2/);
  });

  it("make-data.mjs makes the committed data byte for byte", () => {
    const folder = mkdtempSync(join(tmpdir(), "cosmology-cells-data-"));
    try {
      execFileSync(process.execPath, [join(demoFolder, "make-data.mjs"), folder]);
      const file = "saltmarsh-pilot.csv";
      expect(readFileSync(join(folder, file), "utf8")).toBe(readFileSync(join(demoFolder, file), "utf8"));
    } finally {
      rmSync(folder, { recursive: true, force: true });
    }
  });
});

describe("the demo notebooks through the kernel", () => {
  const reports = new Map<string, RunReport>();
  const report = (start: string): RunReport => {
    const name = demoNames.find((each) => each.startsWith(start));
    return reports.get(name ?? "")!;
  };
  beforeAll(async () => {
    for (const name of demoNames) reports.set(name, await runDemo(name));
  }, 300_000);

  for (const name of demoNames) {
    it(`${name} runs to its end without an error and comes out as valid nbformat 4.5`, () => {
      const { failures, finished, notebook } = reports.get(name)!;
      expect(failures).toEqual([]);
      expect(finished).toBe(true);
      expect(schemaComplaints(notebook)).toEqual([]);
      const codeCells = notebook.cells.filter((cell) => cell.cell_type === "code");
      expect(codeCells.map((cell) => cell.execution_count)).toEqual(codeCells.map((_, index) => index + 1));
      for (const cell of codeCells) {
        expect(cell.outputs.length).toBeGreaterThan(0);
        expect(cell.outputs.map((output) => output.output_type)).not.toContain("error");
        expect(cell.outputs.filter((output) => output.output_type === "stream" && output.name === "stderr")).toEqual(
          [],
        );
      }
      expect(
        plainText(
          codeCells
            .at(-1)!
            .outputs.map((output) => output.output_type)
            .join(),
        ),
      ).toContain("stream");
    });
  }

  it("the headline cell prints z_*, r_*, r_drag, 100 theta_* and the age to the digits of evaluateModel", () => {
    const { notebook } = report("2-");
    expect(notebook.cells.filter((cell) => hasTag(cell, "headline")).length).toBe(1);
    const lines = headlines(notebook).join("\n");
    const numbers = evaluateModel(plan);
    const digits = (name: string, count: number) => numbers.value(name).toFixed(count).replace(".", "\\.");
    expect(lines).toMatch(new RegExp(`^ *z_\\* +${digits("lastScatteringRedshift", 3)}$`, "m"));
    expect(lines).toMatch(new RegExp(`^ *r_\\* +${digits("lastScatteringSoundHorizon", 3)} Mpc$`, "m"));
    expect(lines).toMatch(new RegExp(`^ *r_drag +${digits("dragSoundHorizon", 3)} Mpc$`, "m"));
    expect(lines).toMatch(new RegExp(`^ *100 theta_\\* +${digits("acousticAngle", 5)}$`, "m"));
    expect(lines).toMatch(new RegExp(`^ *age +${digits("age", 3)} Gyr$`, "m"));
  });

  it("the table for the note follows from the committed bins and evaluateModel", () => {
    const lines = printed(report("1-")).split("\n");
    const numbers = evaluateModel(plan);
    const rows = readFileSync(join(demoFolder, "saltmarsh-pilot.csv"), "utf8")
      .trim()
      .split("\n")
      .slice(2)
      .map((line) => line.split(","));
    expect(rows.length).toBe(7);
    for (const [bin, low, high, effective, galaxies] of rows) {
      const cells = lines
        .find((line) => line.trim().startsWith(`${bin} `))!
        .trim()
        .split(/\s+/);
      const angle =
        (numbers.value("dragSoundHorizon") / numbers.value("transverseDistance", Number(effective))) * (180 / Math.PI);
      const shell = numbers.value("comovingVolume", Number(high)) - numbers.value("comovingVolume", Number(low));
      // The whole sky in square degrees: 41252.96, common practice, no source.
      const volume = (shell * 5200) / 41252.96;
      const density = (Number(galaxies) * 1e-5) / ((shell * 15) / 41252.96);
      expect(cells[1]).toBe(effective);
      expect(Number(cells[2]) / angle).toBeCloseTo(1, 3);
      expect(Number(cells[3]) / volume).toBeCloseTo(1, 3);
      expect(Number(cells[4]) / density).toBeCloseTo(1, 2);
      expect(cells.at(-1)).toBe(density > 1 ? "yes" : "no");
    }
  });

  it("the report holds every chart as SVG and no reference to anything outside itself", () => {
    const notebooks = demoNames.map((name) => ({ name, notebook: reports.get(name)!.notebook }));
    const html = notebooksToHtml(notebooks);
    const charts = demoNames.reduce((sum, name) => sum + chartCount(reports.get(name)!), 0);
    expect(charts).toBeGreaterThanOrEqual(7);
    const pictures = [...html.matchAll(/<img[^>]* src="data:image\/svg\+xml;base64,([^"]+)"/g)].map((match) =>
      Buffer.from(match[1]!, "base64").toString("utf8"),
    );
    expect(pictures.length).toBe(charts);
    for (const text of [html, ...pictures]) {
      expect(text).not.toMatch(/<(script|link|iframe|object|embed|base)\b/i);
      expect(text).not.toMatch(
        /\b(src|srcset|poster|data|action|formaction|background|(xlink:)?href)\s*=\s*["']?\s*(https?:|\/\/)/i,
      );
      expect(text).not.toMatch(/url\(\s*["']?\s*(https?:|\/\/)|@import/i);
    }
  });
});
