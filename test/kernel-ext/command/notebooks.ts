/** For tests: notebooks made on the spot, and the built command line. */
import { spawn } from "node:child_process";
import { mkdtempSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";

export const root = join(__dirname, "..", "..", "..");

export function newFolder(): string {
  return mkdtempSync(join(tmpdir(), "cosmology-cells-command-"));
}

let lastId = 0;

export function codeCell(source: string | string[], tags?: string[]): object {
  const metadata = tags ? { tags } : {};
  return { cell_type: "code", id: `c${++lastId}`, metadata, source, execution_count: null, outputs: [] };
}

export function markdownCell(source: string): object {
  return { cell_type: "markdown", id: `m${++lastId}`, metadata: {}, source };
}

export function notebookText(cells: object[]): string {
  return JSON.stringify({ nbformat: 4, nbformat_minor: 5, metadata: {}, cells });
}

export function writeCells(folder: string, name: string, cells: object[]): string {
  const path = join(folder, name);
  writeFileSync(path, notebookText(cells));
  return path;
}

export interface CommandRun {
  code: number | null;
  stdout: string;
  stderr: string;
}

/** Runs the built command line. */
export function command(args: string[], cwd: string, environment: Record<string, string> = {}): Promise<CommandRun> {
  const child = spawn(process.execPath, [join(root, "bin.cjs"), ...args], {
    cwd,
    env: { ...process.env, ...environment },
    stdio: ["ignore", "pipe", "pipe"],
  });
  let stdout = "";
  let stderr = "";
  child.stdout.on("data", (text) => {
    stdout += text;
  });
  child.stderr.on("data", (text) => {
    stderr += text;
  });
  return new Promise((resolve, reject) => {
    child.on("error", reject);
    child.on("close", (code) => resolve({ code, stdout, stderr }));
  });
}
