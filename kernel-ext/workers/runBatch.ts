import { availableParallelism } from "node:os";
import {
  type BatchColumn,
  type BatchColumns,
  type BatchProblem,
  engineServes,
  prepareBatch,
  type rowStatus,
  rowStatusNames,
} from "../../cosmo/batch";
import { DomainError, UnknownNameError } from "../../cosmo/errors";
import { quantityRegister } from "../../cosmo/quantities";
import { closeModel } from "../../cosmo/solve";
import { later, nextTurn } from "../kernel/ownTimers";
import { type BatchJob, chunkRows, control, type WorkerRequest } from "./batchJob";
import { watchCellInterrupt } from "./cellInterrupt";
import { fieldColumns } from "./givensOfRow";
import { JobRun } from "./jobRun";
import { asShared, sharedDoubles } from "./sharedMemory";
import { workerPool } from "./workerPool";

/** Options of {@link runBatch}. */
export interface RunOptions {
  /** Worker threads; 0 computes in this thread. Default: one a core for more than a chunk of rows, else 0. */
  readonly workers?: number | undefined;
  /** Hears of the rows done, about ten times a second. An error that it throws stops the run. */
  readonly onProgress?: ((done: number, rows: number) => void) | undefined;
  readonly signal?: AbortSignal | undefined;
}

/** What a run over many models gives. */
export interface BatchRun {
  readonly rows: number;
  /** The outputs as they were asked for, in order, each a column; NaN where a value could not be had. */
  readonly columns: Readonly<Record<string, Float64Array>>;
  /** H0 in km/s/Mpc where it was solved for. */
  readonly hubble: Float64Array | undefined;
  /** Why values could not be had, by row. */
  readonly problems: readonly BatchProblem[];
  /** A byte a row: see rowStatus of cosmo/batch. */
  readonly status: Uint8Array;
  /** Rows by how they came by their values. */
  readonly counts: Readonly<Record<keyof typeof rowStatus, number>>;
  /** Outputs that the engine does not know; they took the full computation. */
  readonly fullOutputs: readonly string[];
}

/** The rejection of a run that was stopped by its signal. */
export class BatchStoppedError extends Error {
  override readonly name = "BatchStoppedError";
  constructor(done: number, rows: number) {
    super(`the run was stopped after ${done} of ${rows} rows`);
  }
}

const where = "batch";
let lastId = 0;

/**
 * The same quantities for many models, spread over worker threads: columns of givens in, columns of quantities out, in memory that
 * all threads share.
 *
 * The rows are handed out in chunks of {@link chunkRows}, and each row's digits depend on that row alone: they are the same
 * whatever the number of workers. A row that fails has NaN and its reason among the problems; the others go on. A stop by the signal, or
 * an interrupt of the notebook cell, ends the run within a row's time. A worker that dies rejects with WorkerFailedError.
 *
 * Accuracy: `fast` 1e-6 or better (test/cosmo/batch/accuracy.test.ts), `full` as a cell gives.
 *
 * @param request outputs, what all rows share, accuracy; unknown names throw UnknownNameError before a row is computed
 * @param columns columns of givens, all of the same length
 * @example const run = await runBatch({ outputs: ["age"] }, { hubble, baryonDensity, coldMatterDensity }); run.columns.age
 */
export async function runBatch(
  request: WorkerRequest,
  columns: BatchColumns,
  options: RunOptions = {},
): Promise<BatchRun> {
  const rows = rowCount(columns);
  const { names, fullOutputs } = check(request, columns, rows);
  const solving = request.hubbleFrom !== undefined;
  const job: BatchJob = {
    id: ++lastId,
    request: { ...request, outputs: names },
    columns: Object.fromEntries(Object.entries(columns).map(([name, column]) => [name, sharedColumn(column)])),
    rows,
    out: names.map(() => sharedDoubles(rows)),
    status: new Uint8Array(new SharedArrayBuffer(rows)),
    hubble: solving ? sharedDoubles(rows) : undefined,
    control: new Int32Array(new SharedArrayBuffer(12)),
  };
  const problems: BatchProblem[] = [];
  await finished(job, workerCount(options.workers, rows), problems, options);
  problems.sort((a, b) => a.row - b.row);
  const tally = new Array<number>(rowStatusNames.length).fill(0);
  for (const code of job.status) tally[code]!++;
  return {
    rows,
    columns: Object.fromEntries(names.map((name, k) => [name, job.out[k]!])),
    hubble: job.hubble,
    problems,
    status: job.status,
    counts: Object.fromEntries(rowStatusNames.map((name, code) => [name, tally[code]])) as BatchRun["counts"],
    fullOutputs,
  };
}

/** How many workers a run gets. */
function workerCount(wanted: number | undefined, rows: number): number {
  if (wanted === undefined)
    return rows <= chunkRows ? 0 : Math.min(availableParallelism(), Math.ceil(rows / chunkRows));
  if (!(Number.isInteger(wanted) && wanted >= 0 && wanted <= 256)) {
    throw new DomainError({ where, argument: "workers", rule: "must be a whole number from 0 to 256", value: wanted });
  }
  return wanted;
}

function sharedColumn(column: BatchColumn): BatchColumn {
  if (column instanceof Float64Array) return asShared(column);
  if (typeof column === "number") return column;
  return column.map((each) => (each instanceof Float64Array ? asShared(each) : each));
}

function rowCount(columns: BatchColumns): number {
  let rows: number | undefined;
  let first = "";
  for (const [name, column] of Object.entries(columns)) {
    for (const each of Array.isArray(column) ? column : [column]) {
      if (!(each instanceof Float64Array)) continue;
      if (rows === undefined) [rows, first] = [each.length, name];
      else if (each.length !== rows) {
        const rule = `must have as many rows as ${first}, ${rows}`;
        throw new DomainError({ where, argument: name, rule, value: each.length });
      }
    }
  }
  if (rows === undefined || rows === 0) {
    throw new DomainError({
      where,
      argument: "columns",
      rule: "must have at least one column with at least one row",
      value: rows,
    });
  }
  return rows;
}

/** Refuses in this thread, before a row is computed, what the workers would refuse. */
function check(
  request: WorkerRequest,
  columns: BatchColumns,
  rows: number,
): { names: readonly string[]; fullOutputs: readonly string[] } {
  const { hubbleFrom, accuracy } = request;
  if (accuracy !== undefined && accuracy !== "fast" && accuracy !== "full") {
    throw new UnknownNameError({ where, kind: "accuracy", given: accuracy, known: ["fast", "full"] });
  }
  const plan = prepareBatch({ outputs: request.outputs, shared: request.shared ?? {}, closeModel });
  const names = plan.outputs;
  if (names.length === 0) {
    throw new DomainError({ where, argument: "outputs", rule: "must name at least one quantity", value: names });
  }
  const twice = names.find((name, index) => names.indexOf(name) !== index);
  if (twice !== undefined)
    throw new DomainError({ where, argument: "outputs", rule: "must not ask twice for one quantity", value: twice });
  let fields = columns;
  if (hubbleFrom !== undefined) {
    if (quantityRegister.get(hubbleFrom)?.arguments.length !== 0) {
      const known = [...quantityRegister.values()]
        .filter((each) => each.arguments.length === 0)
        .map((each) => each.name);
      throw new UnknownNameError({ where, kind: "quantity in place of hubble", given: hubbleFrom, known });
    }
    if (columns[hubbleFrom] === undefined || Array.isArray(columns[hubbleFrom])) {
      throw new DomainError({
        where,
        argument: hubbleFrom,
        rule: "must be among the columns",
        value: columns[hubbleFrom],
      });
    }
    fields = { ...fieldColumns(columns, hubbleFrom), hubble: new Float64Array(rows) };
  }
  const none = Object.fromEntries(names.map((name) => [name, new Float64Array(rows)]));
  plan.run(fields, { from: 0, to: 0 }, none);
  const full = accuracy === "full" || !engineServes(request.shared);
  return { names, fullOutputs: full ? names : plan.singlePathOutputs };
}

function finished(job: BatchJob, workers: number, problems: BatchProblem[], options: RunOptions): Promise<void> {
  const { onProgress, signal } = options;
  const done = (): number => Atomics.load(job.control, control.rowsDone);
  return new Promise<void>((resolve, reject) => {
    let over = false;
    const stop = (): void => {
      Atomics.store(job.control, control.stop, 1);
      if (workers > 0) workerPool().stop(job.id);
    };
    const end = (settle: () => void): void => {
      if (over) return;
      over = true;
      unwatch();
      signal?.removeEventListener("abort", aborted);
      settle();
    };
    const fail = (error: unknown): void => {
      stop();
      end(() => reject(error));
    };
    const aborted = (): void => fail(new BatchStoppedError(done(), job.rows));
    // Nothing of an interrupted cell comes back to life: its promise stays open, as those of its timers do.
    const unwatch = watchCellInterrupt(() => {
      stop();
      end(() => undefined);
    });
    const tell = (): boolean => {
      try {
        onProgress?.(done(), job.rows);
        return true;
      } catch (error) {
        fail(error);
        return false;
      }
    };
    const complete = (): void => {
      if (!over && tell()) end(resolve);
    };
    if (signal?.aborted) {
      aborted();
      return;
    }
    signal?.addEventListener("abort", aborted, { once: true });
    if (workers === 0) {
      hereAndNow(job, problems, () => over, tell, complete, fail);
      return;
    }
    const tick = (): void => {
      if (!over && tell()) later(tick, 100);
    };
    later(tick, 100);
    try {
      workerPool().start(job, workers, {
        problems: (list) => {
          for (const each of list) problems.push(each);
        },
        done: complete,
        failed: (error) => fail(error),
      });
    } catch (error) {
      fail(error);
    }
  });
}

/** Computes in this thread, with room for other work every tenth of a second. */
function hereAndNow(
  job: BatchJob,
  problems: BatchProblem[],
  over: () => boolean,
  tell: () => boolean,
  complete: () => void,
  fail: (error: unknown) => void,
): void {
  const turn = (run: JobRun): void => {
    if (over()) return;
    let more = true;
    try {
      const until = performance.now() + 100;
      while (more && performance.now() < until) more = run.step();
    } catch (error) {
      fail(error);
      return;
    }
    if (!more) complete();
    else if (tell()) nextTurn(() => turn(run));
  };
  try {
    turn(new JobRun(job, (problem) => problems.push(problem)));
  } catch (error) {
    fail(error);
  }
}
