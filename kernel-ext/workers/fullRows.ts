import { type BatchColumns, type BatchProblem, rowStatus } from "../../cosmo/batch";
import { CosmologyError, DomainError } from "../../cosmo/errors";
import type { ClosedModel } from "../../cosmo/model";
import { findQuantity, parseRequest } from "../../cosmo/quantities";
import { Evaluation } from "../../cosmo/quantity";
import { closeModel } from "../../cosmo/solve";
import type { WorkerRequest } from "./batchJob";
import { rowGivens } from "./givensOfRow";

const where = "batch";

/** Computes single rows as a cell does, at full accuracy, into the columns of a job. */
export class FullRows {
  private readonly requests;
  private readonly givens;

  constructor(
    request: WorkerRequest,
    columns: BatchColumns,
    rows: number,
    private readonly out: readonly Float64Array[],
    private readonly hubble: Float64Array | undefined,
    private readonly report: (problem: BatchProblem) => void,
  ) {
    this.requests = request.outputs.map((text) => parseRequest(text, where));
    this.givens = rowGivens(request, columns, rows);
  }

  /** Fills one row and returns its status; a value that cannot be had is NaN, with a report. */
  run(row: number): number {
    for (const column of this.out) column[row] = Number.NaN;
    if (this.hubble !== undefined) this.hubble[row] = Number.NaN;
    let model: ClosedModel;
    try {
      model = closeModel(this.givens(row), { where });
    } catch (failure) {
      this.failed(row, undefined, failure);
      return rowStatus.failed;
    }
    if (this.hubble !== undefined) this.hubble[row] = model.hubble;
    const evaluation = new Evaluation(model);
    let missing = 0;
    this.requests.forEach(({ name, arguments: values, text }, k) => {
      try {
        const { value } = findQuantity(name, where).compute(evaluation, values);
        if (!Number.isFinite(value)) {
          throw new DomainError({ where: name, argument: "result", rule: "must be a finite number", value });
        }
        this.out[k]![row] = value;
      } catch (failure) {
        missing++;
        this.failed(row, text, failure);
      }
    });
    if (missing === 0) return rowStatus.outsideRange;
    return missing === this.requests.length ? rowStatus.failed : rowStatus.partlyEmpty;
  }

  private failed(row: number, output: string | undefined, failure: unknown): void {
    // Anything but a known refusal is a defect of the program and must not pass as an empty cell.
    if (!(failure instanceof CosmologyError)) throw failure;
    this.report({ row, output, message: failure.message });
  }
}
