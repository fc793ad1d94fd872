/** The demo notebooks, and how the tests run them. */
import { readdirSync } from "node:fs";
import { join } from "node:path";
import { type NotebookFile, readNotebook } from "../../kernel-ext/command/notebookFile";
import { type RunReport, runNotebook } from "../../kernel-ext/command/runNotebook";

/** The project's folder. */
export const root = join(__dirname, "..", "..");

/** The built kernel, which `npm test` makes first. */
const builtKernel = [
  process.execPath,
  "--no-force-async-hooks-checks",
  join(root, "dist", "kernel-ext", "kernel", "main.js"),
  "{connection_file}",
];

export const demoFolder = join(root, "notebooks-demo");

/** File names, in the order in which `npm start` runs them. */
export const demoNames: readonly string[] = readdirSync(demoFolder)
  .filter((name) => name.endsWith(".ipynb"))
  .sort();

/** Runs a notebook in the folder of the demos, through the built kernel. */
export function runNotebookHere(notebook: NotebookFile): Promise<RunReport> {
  return runNotebook(notebook, { kernel: { argv: builtKernel, cwd: demoFolder }, timeout: 100_000 });
}

/** Runs a demo notebook as `cosmology-cells run` does. */
export function runDemo(name: string): Promise<RunReport> {
  return runNotebookHere(readNotebook(join(demoFolder, name)));
}
