/** The demo notebooks through Debian's nbconvert, which finds the kernel as Jupyter does. */
import { execFileSync, spawnSync } from "node:child_process";
import { existsSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { type NotebookFile, parseNotebook } from "../../kernel-ext/command/notebookFile";
import { headlines } from "../../kernel-ext/command/start";
import { demoFolder, demoNames, root, runDemo } from "./demoNotebooks";
import { schemaComplaints } from "./notebookSchema";

const nbconvert = "/usr/bin/jupyter-nbconvert";
/** In .ci/run a missing Debian package fails. */
const skipped = !existsSync(nbconvert) && process.env["COSMOLOGY_CELLS_REQUIRE_DEBIAN"] !== "1";

describe.skipIf(skipped)("jupyter nbconvert --execute", () => {
  let scratch: string;
  beforeAll(() => {
    scratch = mkdtempSync(join(tmpdir(), "cosmology-cells-nbconvert-"));
    execFileSync(process.execPath, [join(root, "bin.cjs"), "install", "--prefix", join(scratch, "prefix")]);
  });
  afterAll(() => {
    rmSync(scratch, { recursive: true, force: true });
  });

  function convert(path: string): { status: number | null; words: string; executed: NotebookFile | undefined } {
    const { status, stderr } = spawnSync(
      nbconvert,
      ["--to", "notebook", "--execute", "--output-dir", scratch, "--output", "executed", path],
      {
        encoding: "utf8",
        timeout: 200_000,
        env: {
          PATH: "/usr/bin:/bin",
          LANG: "C.UTF-8",
          HOME: scratch,
          JUPYTER_PATH: join(scratch, "prefix", "share", "jupyter"),
          JUPYTER_CONFIG_DIR: join(scratch, "config"),
          JUPYTER_RUNTIME_DIR: join(scratch, "runtime"),
        },
      },
    );
    const target = join(scratch, "executed.ipynb");
    const executed = existsSync(target) ? parseNotebook(readFileSync(target, "utf8"), target) : undefined;
    rmSync(target, { force: true });
    return { status, words: stderr, executed };
  }

  for (const name of demoNames) {
    it(`runs ${name} and gets what the runner gets`, { timeout: 300_000 }, async () => {
      const { status, words, executed } = convert(join(demoFolder, name));
      expect(status, words).toBe(0);
      expect(schemaComplaints(executed)).toEqual([]);
      const { notebook } = await runDemo(name);
      const kinds = (each: NotebookFile) =>
        each.cells.map((cell) =>
          cell.cell_type === "code"
            ? cell.outputs.map((output) => [
                output.output_type,
                "data" in output ? Object.keys(output.data).sort() : "",
              ])
            : cell.cell_type,
        );
      expect(kinds(executed!)).toEqual(kinds(notebook));
      expect(headlines(executed!)).toEqual(headlines(notebook));
    });
  }
});
