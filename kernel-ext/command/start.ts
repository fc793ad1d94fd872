/** `cosmology-cells start`: the demo notebooks, or the user's, with their headline numbers and one report. */
import { existsSync, readdirSync } from "node:fs";
import { basename, join } from "node:path";
import { parseArgs } from "node:util";
import { CommandError, numberOption } from "./commandError";
import { notebooksToHtml } from "./htmlReport";
import { type MultilineText, type NotebookFile, plainText, writeWhole } from "./notebookFile";
import { type ExecutedNotebook, runToFolder, sharedOptions } from "./run";
import { hasTag } from "./runNotebook";

export const startUsage = `cosmology-cells start [NOTEBOOK...] [options]

Runs the given notebooks, or the demo notebooks, through the kernel of this package; prints the
headline numbers (what cells tagged "headline" show as text) and writes the executed notebooks and
one self-contained HTML report.

  --out DIR         where they are written; default: out
  --timeout S       seconds that one cell may take; default: no limit
`;

const demoFolder = join(__dirname, "..", "..", "..", "notebooks-demo");

function demoNotebooks(): string[] {
  if (!existsSync(demoFolder)) throw new CommandError("start: there are no demo notebooks here; name a notebook");
  const found = readdirSync(demoFolder).filter((name) => name.endsWith(".ipynb"));
  if (found.length === 0) throw new CommandError(`start: there is no notebook in ${demoFolder}`);
  return found.sort().map((name) => join(demoFolder, name));
}

/** The text of the outputs of the cells that are tagged as headlines. */
export function headlines(notebook: NotebookFile): string[] {
  const lines: string[] = [];
  for (const cell of notebook.cells) {
    if (cell.cell_type !== "code" || !hasTag(cell, "headline")) continue;
    for (const output of cell.outputs) {
      if (output.output_type === "stream" && output.name === "stdout") lines.push(plainText(output.text).trimEnd());
      if (output.output_type !== "display_data" && output.output_type !== "execute_result") continue;
      const text = output.data["text/plain"] as MultilineText | undefined;
      if (text !== undefined) lines.push(plainText(text).trimEnd());
    }
  }
  return lines;
}

/** Names for the outputs: the files' own, numbered where two are alike. */
export function distinctNames(paths: readonly string[]): string[] {
  const taken = new Set<string>();
  return paths.map((path) => {
    const base = basename(path).replace(/\.ipynb$/, "");
    let name = base;
    for (let number = 2; taken.has(name); number++) name = `${base}-${number}`;
    taken.add(name);
    return name;
  });
}

/** The `start` command; returns the exit code. */
export async function startCommand(args: string[]): Promise<number> {
  const { values, positionals } = parseArgs({ args, allowPositionals: true, options: sharedOptions });
  const paths = positionals.length > 0 ? positionals : demoNotebooks();
  const out = values.out ?? "out";
  const timeout = numberOption("timeout", values.timeout);
  const names = distinctNames(paths);
  const executed: ExecutedNotebook[] = [];
  const written: string[] = [];
  for (const [index, path] of paths.entries()) {
    const target = join(out, `${names[index]}.ipynb`);
    const result = await runToFolder(path, target, { out, timeout, allowErrors: false });
    executed.push({ ...result, name: names[index] });
    written.push(target);
  }
  const report = join(out, "report.html");
  writeWhole(
    report,
    notebooksToHtml(
      executed.map(({ name, notebook }) => ({ name, notebook })),
      { title: executed.length === 1 ? executed[0].name : "Cosmology cells" },
    ),
  );
  for (const { name, notebook } of executed) {
    const lines = headlines(notebook);
    if (lines.length > 0) process.stdout.write(`${name}\n${lines.map((line) => `${line}\n`).join("")}\n`);
  }
  process.stdout.write(`executed notebooks: ${written.join(", ")}\nreport: ${report}\n`);
  return executed.some(({ failures }) => failures.length > 0) ? 1 : 0;
}
