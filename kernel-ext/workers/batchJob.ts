import type { BatchColumns } from "../../cosmo/batch";
import type { ModelGivens } from "../../cosmo/model";

/** `fast`: the batch engine, 1e-6 or better, and the full computation only where the engine does not serve. `full`: the full computation throughout. */
export type BatchAccuracy = "fast" | "full";

/** What many models are asked for; plain data, so that it can travel to a worker. */
export interface WorkerRequest {
  /** Quantities of the register by name: "age", "luminosityDistance(1.1)". */
  readonly outputs: readonly string[];
  /** What all rows share: tier, conventions, and numbers that no column gives. */
  readonly shared?: ModelGivens | undefined;
  /** A derived quantity among the columns that stands in place of H0: "acousticAngle". H0 is solved for, row by row. */
  readonly hubbleFrom?: string | undefined;
  /** Default `fast`. */
  readonly accuracy?: BatchAccuracy | undefined;
}

/** Rows that are handed out at once. Fixed, so that which rows are computed together never depends on the number of workers. */
export const chunkRows = 1024;

/** Places of {@link BatchJob.control}. */
export const control = { nextChunk: 0, rowsDone: 1, stop: 2 } as const;

/** One run over all rows, as every worker sees it: the numbers are in memory that all share. */
export interface BatchJob {
  readonly id: number;
  readonly request: WorkerRequest;
  /** Columns by name, the one of `hubbleFrom` included. */
  readonly columns: BatchColumns;
  readonly rows: number;
  /** One array an output. */
  readonly out: readonly Float64Array[];
  /** A byte a row, see rowStatus of cosmo/batch. */
  readonly status: Uint8Array;
  /** H0 where it is solved for. */
  readonly hubble: Float64Array | undefined;
  /** The next chunk to be taken, rows done, and whether to stop; see {@link control}. */
  readonly control: Int32Array;
}
