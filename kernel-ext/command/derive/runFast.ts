import { rowStatus } from "../../../cosmo/batch";
import { DataRowError } from "../../../cosmo/errors";
import { type CellValue, digitsText, roundDigits, type TableRow } from "../../data";
import { type BatchRun, runBatch } from "../../workers";
import type { FillValues } from "./fill";
import type { FastPlan } from "./planFast";
import { blockRows, type RowBlock, rowBlock } from "./rowBlock";
import { problemText } from "./rowFault";
import type { RowCount, RowWork } from "./runRows";

/** What {@link runFast} works with, beyond what the full path does. */
export interface FastWork extends RowWork {
  readonly plan: FastPlan;
  readonly fill: FillValues;
  readonly digits: number;
  /** Whether cells come typed (JSON lines). */
  readonly typed: boolean;
  /** Whether the rows go out as text (CSV), so that numbers may be written here. */
  readonly text: boolean;
  /** Undefined: one a core. */
  readonly workers: number | undefined;
}

/** Blocks under way: one with the workers, one waiting for them, one being written. */
const mostBlocks = 3;

/**
 * Runs all rows through the batch engine, a block at a time, and writes them in order; memory does not grow with their number.
 *
 * A row that the engine cannot take as it is, or that fails there, is derived by itself, so that its fault is told in the same words
 * as on the full path. Does not finish the sink of the output.
 *
 * @returns the rows, the bad ones, and how many took the full computation
 */
export async function runFast(work: FastWork): Promise<RowCount & { readonly full: number }> {
  const waiting: { readonly block: RowBlock; readonly run: Promise<BatchRun> }[] = [];
  const count = { rows: 0, bad: 0, full: 0 };
  const stop = new AbortController();
  const start = (rows: readonly TableRow[]): void => {
    const block = rowBlock(rows, work.plan, work.fill, work.typed);
    const run = runBatch(work.plan.request, block.columns, { workers: work.workers, signal: stop.signal });
    // An earlier block may end the work before this one is awaited.
    run.catch(() => undefined);
    waiting.push({ block, run });
  };
  const next = async (): Promise<void> => {
    const { block, run } = waiting.shift()!;
    await writeBlock(work, block, await run, count);
    work.onProgress(count.rows);
  };
  try {
    let rows: TableRow[] = [];
    for await (const batch of work.table.batches()) {
      for (const row of batch) {
        rows.push(row);
        if (rows.length < blockRows) continue;
        start(rows);
        rows = [];
        while (waiting.length >= mostBlocks) await next();
      }
    }
    if (rows.length > 0) start(rows);
    while (waiting.length > 0) await next();
  } finally {
    stop.abort();
  }
  await work.output.end();
  return count;
}

async function writeBlock(
  work: FastWork,
  { rows, odd }: RowBlock,
  run: BatchRun,
  count: { rows: number; bad: number; full: number },
): Promise<void> {
  const columns = Object.values(run.columns);
  const { keepWith, digits } = work;
  const cell = work.text
    ? (value: number): CellValue => digitsText(value, digits)
    : (value: number): CellValue => roundDigits(value, digits);
  for (let index = 0; index < rows.length; index++) {
    const row = rows[index]!;
    const status = run.status[index]!;
    const single = odd.has(index) || status === rowStatus.failed || status === rowStatus.partlyEmpty;
    if (single || status !== rowStatus.engine) count.full++;
    let added: CellValue[];
    try {
      added = single ? work.derive(row) : columns.map((column) => cell(column[index]!));
      if (keepWith !== undefined) added.push(null);
    } catch (error) {
      if (!(error instanceof DataRowError)) throw error;
      if (keepWith === undefined) {
        await work.output.flush();
        throw error;
      }
      count.bad++;
      added = new Array<CellValue>(keepWith - 1).fill(null);
      added.push(problemText(error));
    }
    work.output.row({ ...row, cells: work.outgoing(row) }, added);
    count.rows++;
  }
  await work.output.flush();
}
