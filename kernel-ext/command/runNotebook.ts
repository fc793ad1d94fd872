/** Runs a notebook through a kernel of its own, cell by cell. */
import { randomUUID } from "node:crypto";
import { KernelClient, type KernelCommand, KernelFailure } from "./kernelClient";
import { type CodeCell, type NotebookFile, plainText } from "./notebookFile";
import { OutputCollector, type ReportedError } from "./outputCollector";

export interface RunOptions {
  kernel: KernelCommand;
  /** Milliseconds that one cell may take; unlimited by default. */
  timeout?: number | undefined;
  /** Whether later cells run after one has failed. */
  allowErrors?: boolean;
  /** Takes one line a cell. */
  progress?: (line: string) => void;
  /** Aborting it ends the kernel and the run. */
  signal?: AbortSignal;
}

/** A cell that failed. */
export interface CellFailure {
  /** Number of the cell among all cells of the notebook, from one. */
  cell: number;
  ename: string;
  evalue: string;
  line: number | undefined;
  traceback: string[];
}

export interface RunReport {
  notebook: NotebookFile;
  failures: CellFailure[];
  /** Whether every cell was run. */
  finished: boolean;
}

/** The kernelspec that executed notebooks name. */
export const kernelSpecification = {
  name: "cosmology-cells",
  display_name: "Cosmology cells (TypeScript)",
  language: "typescript",
} as const;

function tagsOf(cell: { metadata: Record<string, unknown> }): string[] {
  const { tags } = cell.metadata;
  return Array.isArray(tags) ? tags.filter((tag): tag is string => typeof tag === "string") : [];
}

/** Whether a cell carries a tag. */
export function hasTag(cell: { metadata: Record<string, unknown> }, tag: string): boolean {
  return tagsOf(cell).includes(tag);
}

/**
 * Runs all code cells of a notebook.
 *
 * Cells without code are skipped, as are those tagged `skip-execution`; a cell tagged `raises-exception` may fail. The run
 * ends at the first failure unless errors are allowed, and in any case when the kernel dies or a cell takes too long.
 *
 * @param notebook what to run; it is not changed
 * @returns the notebook with its outputs, and what failed
 */
export async function runNotebook(notebook: NotebookFile, options: RunOptions): Promise<RunReport> {
  const executed = structuredClone(notebook);
  const codeCells = executed.cells.filter((cell): cell is CodeCell => cell.cell_type === "code");
  for (const cell of codeCells) {
    cell.outputs = [];
    cell.execution_count = null;
  }
  const collector = new OutputCollector();
  const failures: CellFailure[] = [];
  const numberOf = (cell: CodeCell): number => executed.cells.indexOf(cell) + 1;
  const progress = options.progress ?? (() => undefined);
  const allowed = (cell: CodeCell): boolean => options.allowErrors === true || hasTag(cell, "raises-exception");
  const failure = (cell: CodeCell, ename: string, evalue: string, rest: Partial<ReportedError> = {}): CellFailure => ({
    cell: numberOf(cell),
    ename,
    evalue,
    line: rest.line,
    traceback: rest.traceback ?? [],
  });
  const note = (cell: CodeCell, ename: string, evalue: string): void => {
    cell.outputs.push({ output_type: "error", ename, evalue, traceback: [`${ename}: ${evalue}`] });
  };

  const client = await KernelClient.start(options.kernel);
  const onAbort = (): void => {
    client.kill().catch(() => undefined);
  };
  options.signal?.addEventListener("abort", onAbort, { once: true });
  const stop = client.onPublished((message) => collector.take(message));
  let finished = true;
  let alive = true;
  try {
    executed.metadata = {
      ...executed.metadata,
      kernelspec: { ...kernelSpecification },
      language_info: await client.languageInfo(),
    };
    for (const cell of codeCells) {
      const code = plainText(cell.source);
      const name = `cell ${numberOf(cell)} of ${executed.cells.length}`;
      if (code.trim() === "" || hasTag(cell, "skip-execution")) continue;
      const started = performance.now();
      const seconds = (): string => `${((performance.now() - started) / 1000).toFixed(2)} s`;
      const id = randomUUID();
      collector.assign(id, cell);
      try {
        const { timedOut, reply } = await client.execute(code, { id, timeout: options.timeout });
        collector.end(id);
        if (timedOut) {
          const evalue = `the cell did not end within ${(options.timeout ?? 0) / 1000} s and was interrupted`;
          note(cell, "TimeoutError", evalue);
          failures.push(failure(cell, "TimeoutError", evalue));
          progress(`${name}: too slow, ${seconds()}`);
          finished = false;
          break;
        }
        if (reply.content.status !== "ok") {
          const error = collector.errors.findLast((one) => one.cell === cell);
          const { ename, evalue } = reply.content;
          if (!allowed(cell)) failures.push(failure(cell, String(ename), String(evalue), error));
          progress(`${name}: ${allowed(cell) ? "failed as allowed" : "failed"}, ${seconds()}`);
          if (!allowed(cell)) {
            finished = cell === codeCells.at(-1);
            break;
          }
        } else progress(`${name}: ok, ${seconds()}`);
      } catch (error) {
        if (!(error instanceof KernelFailure)) throw error;
        note(cell, "KernelFailure", error.message);
        failures.push(failure(cell, "KernelFailure", error.message));
        progress(`${name}: the kernel failed, ${seconds()}`);
        alive = false;
        finished = false;
        break;
      }
    }
    // One more exchange, so that failures which came with the last cell's end have arrived.
    if (alive) await client.request("kernel_info_request", {});
  } finally {
    stop();
    options.signal?.removeEventListener("abort", onAbort);
    await (alive ? client.shutdown() : client.kill());
  }
  for (const late of collector.errors.filter((error) => error.late && !allowed(error.cell))) {
    failures.push(failure(late.cell, late.ename, late.evalue, late));
  }
  collector.finish(codeCells);
  return { notebook: executed, failures, finished };
}
