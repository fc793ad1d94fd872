/** `cosmology-cells run`: notebooks through the kernel, without Jupyter. */
import { basename, dirname, join, resolve } from "node:path";
import { parseArgs } from "node:util";
import { CommandError, numberOption } from "./commandError";
import { notebookToHtml } from "./htmlReport";
import { ownKernelArguments } from "./kernelClient";
import { type NotebookFile, readNotebook, writeNotebook, writeWhole } from "./notebookFile";
import { type CellFailure, type RunReport, runNotebook } from "./runNotebook";

export const runUsage = `cosmology-cells run NOTEBOOK... [options]

Runs notebooks through the kernel of this package, without Jupyter, and writes the executed
notebook and a self-contained HTML report of each.

  --out DIR         where they are written; default: out
  --timeout S       seconds that one cell may take; default: no limit
  --allow-errors    go on after a cell has failed, and end with 0

A cell tagged raises-exception may fail; one tagged skip-execution is not run.
Ends with 1 when a cell failed, with 2 when a file is no notebook or the command is wrong.
`;

export interface ExecutedNotebook {
  /** Name without folder and without .ipynb. */
  name: string;
  notebook: NotebookFile;
  failures: CellFailure[];
}

export interface RunSettings {
  out: string;
  /** Seconds. */
  timeout: number | undefined;
  allowErrors: boolean;
}

function say(line: string): void {
  process.stderr.write(`${line}\n`);
}

/** Says what failed: notebook, cell, error, line, then the lines of the cell. */
function tellFailure(path: string, failure: CellFailure): void {
  const where = failure.line === undefined ? "" : `, line ${failure.line}`;
  say(`${path}: cell ${failure.cell}${where}: ${failure.ename}: ${failure.evalue}`);
  for (const line of failure.traceback) say(`    ${line}`);
}

/** Runs one notebook, in its own folder, and writes it executed, whether or not all went well. */
export async function runToFolder(path: string, target: string, settings: RunSettings): Promise<ExecutedNotebook> {
  const notebook = readNotebook(path);
  if (resolve(target) === resolve(path)) {
    throw new CommandError(`${path}: the executed notebook would overwrite this one; choose another --out`);
  }
  const name = basename(path).replace(/\.ipynb$/, "");
  const interrupted = new AbortController();
  let signalled: NodeJS.Signals | undefined;
  const onSignal = (signal: NodeJS.Signals): void => {
    signalled = signal;
    interrupted.abort();
  };
  process.once("SIGINT", onSignal).once("SIGTERM", onSignal);
  let report: RunReport;
  try {
    report = await runNotebook(notebook, {
      kernel: { argv: ownKernelArguments(), cwd: dirname(resolve(path)) },
      timeout: settings.timeout === undefined ? undefined : settings.timeout * 1000,
      allowErrors: settings.allowErrors,
      progress: (line) => say(`${name}: ${line}`),
      signal: interrupted.signal,
    });
  } finally {
    process.off("SIGINT", onSignal).off("SIGTERM", onSignal);
    if (signalled) process.exit(signalled === "SIGINT" ? 130 : 143);
  }
  for (const failure of report.failures) tellFailure(path, failure);
  if (!report.finished) say(`${path}: the cells after it were not run`);
  writeNotebook(target, report.notebook);
  return { name, notebook: report.notebook, failures: report.failures };
}

/** The options that `run` and `start` share. */
export const sharedOptions = {
  out: { type: "string" },
  timeout: { type: "string" },
} as const;

/** The `run` command; returns the exit code. */
export async function runCommand(args: string[]): Promise<number> {
  const { values, positionals } = parseArgs({
    args,
    allowPositionals: true,
    options: { ...sharedOptions, "allow-errors": { type: "boolean" } },
  });
  if (positionals.length === 0) throw new CommandError("run: name at least one notebook", runUsage);
  const settings: RunSettings = {
    out: values.out ?? "out",
    timeout: numberOption("timeout", values.timeout),
    allowErrors: values["allow-errors"] === true,
  };
  let failed = false;
  for (const path of positionals) {
    const name = basename(path).replace(/\.ipynb$/, "");
    const target = join(settings.out, `${name}.ipynb`);
    const { notebook, failures } = await runToFolder(path, target, settings);
    const report = join(settings.out, `${name}.html`);
    writeWhole(report, notebookToHtml(notebook));
    say(`${name}: wrote ${target} and ${report}`);
    if (failures.length > 0) failed = true;
  }
  return failed ? 1 : 0;
}
