/** What README.md and CHANGELOG.md state, against what the program does. */
import { existsSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import type { CodeCell, NotebookFile } from "../../kernel-ext/command/notebookFile";
import { plainText } from "../../kernel-ext/command/notebookFile";
import { referenceBounds } from "../reference/bounds";
import { root, runNotebookHere } from "./demoNotebooks";

const text = (file: string): string => readFileSync(join(root, file), "utf8");
const readme = text("README.md");

describe("README.md", () => {
  it("its examples run in the kernel one after another, and give the number they print", async () => {
    const sources = [...readme.matchAll(/```ts\n([\s\S]*?)```/g)].map((match) => match[1]!);
    expect(sources.length).toBe(2);
    const cells = sources.map((source, index): CodeCell => {
      return { cell_type: "code", id: `c${index}`, metadata: {}, source, execution_count: null, outputs: [] };
    });
    cells.push({ ...cells[0]!, id: "ruler", source: "ruler.toFixed(2)" });
    const notebook: NotebookFile = { nbformat: 4, nbformat_minor: 5, metadata: {}, cells };
    const { failures, notebook: executed } = await runNotebookHere(notebook);
    expect(failures).toEqual([]);
    const [shown] = (executed.cells.at(-1) as CodeCell).outputs;
    const ruler = shown?.output_type === "execute_result" ? plainText(shown.data["text/plain"] as string) : "";
    expect(ruler).toMatch(/^\D*147\.07\D*$/);
    expect(sources[1]).toContain("// 147.07 Mpc");
  });

  it("its helpers are exported, and the files it names exist", async () => {
    const index = text("kernel-ext/index.ts");
    const helpers = [...new Set([...readme.matchAll(/`(\w+Cell)\(/g)].map((match) => match[1]!))];
    const exported = [...new Set([...index.matchAll(/^ {2}(\w+Cell),$/gm)].map((match) => match[1]!))];
    expect(helpers.sort()).toEqual(exported.sort());
    const files = [...readme.matchAll(/\b(?:notebooks-demo|test|cosmo)\/[\w./-]+\w/g)].map((match) => match[0]);
    expect(files.length).toBeGreaterThan(3);
    for (const file of files) expect(existsSync(join(root, file)), file).toBe(true);
  });

  it("its table of accuracy promises no more than the reference tests hold, and not a hundred times less", () => {
    const background =
      /(^|[a-z])(Distance|Horizon|Time|Volume|VolumeElement|Modulus|Scale|Rate)(\.between)?$|^age(At)?$/;
    const lines: [start: string, quantities: RegExp][] = [
      ["distances, volumes, times, H(z)", background],
      ["x_e, Saha", /^residualIonizedFraction\.saha$/],
      ["x_e, the two three-level tiers", /^residualIonizedFraction\.(peebles|calibrated)$/],
      ["z_*, z_drag", /^(lastScattering|drag)Redshift\./],
      ["r_*, r_drag", /^(lastScatteringSoundHorizon|dragSoundHorizon|acousticAngle|acousticMultipole)\./],
      ["k_D", /^dampingWavenumber\./],
    ];
    for (const [start, quantities] of lines) {
      const line = readme.split("\n").find((each) => each.startsWith(`| ${start}`))!;
      const bound = Number(line.split("|")[2]);
      const bounds = Object.entries(referenceBounds).flatMap(([name, [each]]) => (quantities.test(name) ? [each] : []));
      expect(bounds.length, start).toBeGreaterThan(0);
      expect(bound, start).toBeGreaterThanOrEqual(Math.max(...bounds));
      expect(bound, start).toBeLessThan(100 * Math.max(...bounds));
    }
  });
});

describe("CHANGELOG.md", () => {
  it("names the coefficients of the calibrated tier to seven digits", () => {
    const { coefficients } = JSON.parse(text("cosmo/recombination/calibrationCoefficients.json"));
    expect(coefficients.length).toBe(3);
    for (const coefficient of coefficients) expect(text("CHANGELOG.md")).toContain(coefficient.toPrecision(7));
  });
});
