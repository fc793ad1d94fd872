/** The demo notebooks, and how the tests run them. */
import { readdirSync } from "node:fs";
import { join } from "node:path";
import { readNotebook } from "../../kernel-ext/command/notebookFile";
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

/** Runs a demo notebook as `cosmology-cells run` does, in its own folder, through the built kernel. */
export function runDemo(name: string): Promise<RunReport> {
  const kernel = { argv: builtKernel, cwd: demoFolder };
  return runNotebook(readNotebook(join(demoFolder, name)), { kernel, timeout: 100_000 });
}
