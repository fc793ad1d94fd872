import { type BatchPlan, type BatchProblem, engineServes, prepareBatch, rowStatus } from "../../cosmo/batch";
import { closeModel } from "../../cosmo/solve";
import { type BatchJob, chunkRows, control } from "./batchJob";
import { FullRows } from "./fullRows";
import { fieldColumns } from "./givensOfRow";
import { HubbleSolver } from "./solveHubble";

/** A slice of a chunk takes about so many milliseconds, so that a stop is heard and progress seen. */
const sliceTime = 20;
const firstSlice = 16;

/** The part of a job that one thread does: chunk after chunk, each taken by nobody else, slice by slice. */
export class JobRun {
  private readonly plan: BatchPlan | undefined;
  private readonly full: FullRows;
  private readonly solver: HubbleSolver | undefined;
  private readonly out: Record<string, Float64Array>;
  private readonly columns;
  private at = 0;
  private end = 0;
  private slice = firstSlice;

  constructor(
    private readonly job: BatchJob,
    private readonly report: (problem: BatchProblem) => void,
  ) {
    const { request, columns, rows, out, hubble } = job;
    const { hubbleFrom } = request;
    this.full = new FullRows(request, columns, rows, out, hubble, report);
    const fields = fieldColumns(columns, hubbleFrom);
    this.columns = hubble === undefined ? fields : { ...fields, hubble };
    this.out = {};
    if (request.accuracy === "full" || !engineServes(request.shared)) return;
    this.plan = prepareBatch({ outputs: request.outputs, shared: request.shared ?? {}, closeModel });
    this.plan.outputs.forEach((name, k) => {
      this.out[name] = out[k]!;
    });
    if (hubbleFrom !== undefined) {
      this.solver = new HubbleSolver({ ...request, hubbleFrom }, fields, columns[hubbleFrom] as Float64Array | number);
    }
  }

  /** Does the next slice; false when nothing is left, or the job is to stop. */
  step(): boolean {
    const { job } = this;
    if (this.stopped()) return false;
    if (this.at >= this.end) {
      const from = Atomics.add(job.control, control.nextChunk, 1) * chunkRows;
      if (from >= job.rows) return false;
      this.at = from;
      this.end = Math.min(from + chunkRows, job.rows);
    }
    const to = Math.min(this.at + this.slice, this.end);
    const before = performance.now();
    this.compute(this.at, to);
    const took = performance.now() - before;
    Atomics.add(job.control, control.rowsDone, to - this.at);
    this.at = to;
    if (took < sliceTime / 2) this.slice = Math.min(2 * this.slice, chunkRows);
    else if (took > 2 * sliceTime && this.slice > 2) this.slice /= 2;
    return true;
  }

  private stopped(): boolean {
    return Atomics.load(this.job.control, control.stop) !== 0;
  }

  private compute(from: number, to: number): void {
    const { job, plan, full, solver } = this;
    const { hubble, status } = job;
    if (plan === undefined) {
      for (let row = from; row < to && !this.stopped(); row++) status[row] = full.run(row);
      return;
    }
    if (solver === undefined || hubble === undefined) {
      plan.run(this.columns, { from, to }, this.out, { push: this.report }, status);
      return;
    }
    solver.solve(from, to, hubble);
    const unsolved = (row: number): boolean => Number.isNaN(hubble[row]!);
    const report = (problem: BatchProblem): void => {
      if (!unsolved(problem.row)) this.report(problem);
    };
    plan.run(this.columns, { from, to }, this.out, { push: report }, status);
    for (let row = from; row < to; row++) {
      if (!unsolved(row) || this.stopped()) continue;
      status[row] = full.run(row);
      if (status[row] === rowStatus.engine) status[row] = rowStatus.outsideRange;
    }
  }
}
