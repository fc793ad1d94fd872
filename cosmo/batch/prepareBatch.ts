import { type ConstantsSetName, constantsSets } from "../constants";
import { CosmologyError, DomainError } from "../errors";
import { type ClosedModel, type ModelGivens, validateGivens } from "../model";
import { findQuantity, parseRequest, type QuantityRequest } from "../quantities";
import { Evaluation } from "../quantity";
import { type BatchColumns, type BoundColumns, bindColumns, givensOfRow } from "./batchColumns";
import { type EngineOutput, engineOutput, needsOf } from "./engineOutputs";
import { engineServes } from "./engineServes";
import { requireStructure } from "./requireStructure";
import { RowEngine } from "./rowEngine";
import { rowStatus, rowStatusNames } from "./rowStatus";

/** What a batch is asked for. */
export interface BatchRequest {
  /** Quantities of the register by name, with arguments in parentheses: "age", "luminosityDistance(1.1)". */
  readonly outputs: readonly string[];
  /** What all rows share: tier, conventions, and numbers that no column gives. A column takes the place of a shared number. */
  readonly shared?: ModelGivens;
  /** Closes one model: `closeModel` of solve/, which stands above this room. For rows that take the single path. */
  readonly closeModel: (givens: ModelGivens, origin?: { where?: string }) => ClosedModel;
}

/** A value that could not be had. */
export interface BatchProblem {
  /** Row, counted from 0. */
  readonly row: number;
  /** The output without a value; undefined where the row has none at all. */
  readonly output: string | undefined;
  readonly message: string;
}

/** Takes problems as they come; an array will do. */
export interface BatchProblems {
  push(problem: BatchProblem): unknown;
}

/** How many rows of a run came by their values in which way. */
export type BatchCounts = Record<keyof typeof rowStatus, number>;

/** A batch that is ready to run, any number of times. */
export interface BatchPlan {
  /** Names of the output columns, in the order asked for: "luminosityDistance(1.1)". */
  readonly outputs: readonly string[];
  /** Outputs that only the single path computes: some ten milliseconds a row. */
  readonly singlePathOutputs: readonly string[];
  /**
   * Computes rows `from` to before `to` of the columns into the same rows of the output columns.
   *
   * A value that cannot be had is NaN, the mark of an empty cell, and goes to `problems` with its reason; the other rows go on.
   *
   * @param status a byte a row, by {@link rowStatus}, where wanted.
   */
  run(
    columns: BatchColumns,
    rows: { readonly from: number; readonly to: number },
    out: Readonly<Record<string, Float64Array>>,
    problems?: BatchProblems,
    status?: Uint8Array,
  ): BatchCounts;
}

const where = "batch";

/**
 * Prepares the same quantities for many models: columns of givens in, columns of quantities out.
 *
 * Rows inside the validated range take the batch engine (accuracy 1e-6 against the single path, all columns; see
 * test/cosmo/batch/accuracy.test.ts for what was measured); others, and what the engine does not know, take the single path,
 * and the counts and the status say so.
 *
 * Unknown names throw UnknownNameError, a tier or convention outside its list DomainError, before any row is computed.
 *
 * @example
 * const plan = prepareBatch({ outputs: ["age", "acousticAngle"], closeModel });
 * const out = { age: new Float64Array(2), acousticAngle: new Float64Array(2) };
 * const columns = { hubble: Float64Array.of(67, 68), baryonDensity: 0.0224, coldMatterDensity: 0.12 };
 * plan.run(columns, { from: 0, to: 2 }, out);
 */
export function prepareBatch(request: BatchRequest): BatchPlan {
  const shared = request.shared ?? {};
  const flat = validateGivens(shared, where);
  const tier = flat.get("recombination") ?? "calibrated";
  const constants = constantsSets[(flat.get("conventions.constants") ?? "codata2022") as ConstantsSetName];
  const requests = request.outputs.map((text) => parseRequest(text, where));
  const fromEngine = requests.map((each) => engineOutput(each));
  // Saha equilibrium is not marched; what does not hang on recombination is the engine's all the same.
  const served = fromEngine.map((each) => (tier === "saha" && each?.output.needs.history === true ? undefined : each));
  const needs = needsOf(served.filter((each) => each !== undefined));
  const allMatter = flat.get("conventions.equalityMatter") === "allMatter";
  const engine = new RowEngine(constants, tier === "peebles" ? "peebles" : "calibrated", allMatter, needs);
  const marches = engineServes(shared);
  const single = requests.filter((_, i) => !marches || served[i] === undefined);

  return {
    outputs: requests.map((each) => each.text),
    singlePathOutputs: single.map((each) => each.text),
    run(columns, rows, out, problems, status) {
      checkRows(rows);
      const bound = bindColumns(columns, shared, rows.to);
      requireStructure(bound);
      engine.bind(bound);
      const path = new SinglePath(bound, request.closeModel, problems);
      const targets = requests.map((each) => outputColumn(out, each.text, rows.to));
      const readers: EngineOutput["read"][] = [];
      const readTargets: Float64Array[] = [];
      served.forEach((each, i) => {
        if (each === undefined) return;
        readers.push(each.output.read);
        readTargets.push(targets[i]);
      });
      const singleTargets = targets.filter((_, i) => served[i] === undefined);
      const tally = new Int32Array(rowStatusNames.length);
      for (let index = rows.from; index < rows.to; index++) {
        let code = marches ? engine.compute(index) : rowStatus.notServed;
        if (code === rowStatus.engine) {
          for (let k = 0; k < readers.length; k++) {
            const value = readers[k](engine);
            readTargets[k][index] = value;
            if (!Number.isFinite(value)) code = rowStatus.offGrid;
          }
        }
        if (code !== rowStatus.engine) code = path.run(index, requests, targets, code);
        else if (single.length > 0) {
          code = path.run(index, single, singleTargets, tier === "saha" ? rowStatus.notServed : rowStatus.engine);
        }
        tally[code]++;
        if (status !== undefined) status[index] = code;
      }
      return Object.fromEntries(rowStatusNames.map((name, code) => [name, tally[code]])) as BatchCounts;
    },
  };
}

function checkRows({ from, to }: { from: number; to: number }): void {
  if (!(Number.isInteger(from) && Number.isInteger(to) && from >= 0 && to >= from)) {
    throw new DomainError({
      where,
      argument: "rows",
      rule: "must be whole numbers 0 <= from <= to",
      value: [from, to],
    });
  }
}

function outputColumn(out: Readonly<Record<string, Float64Array>>, name: string, to: number): Float64Array {
  const column = out[name];
  if (column === undefined || column.length < to) {
    throw new DomainError({
      where,
      argument: `output column "${name}"`,
      rule: `must be a Float64Array with at least ${to} rows`,
      value: column?.length,
    });
  }
  return column;
}

/** One row at a time through the full computation, as a cell does it. */
class SinglePath {
  constructor(
    private readonly bound: BoundColumns,
    private readonly closeModel: BatchRequest["closeModel"],
    private readonly problems: BatchProblems | undefined,
  ) {}

  /** Fills the targets; returns the status to keep. */
  run(row: number, requests: readonly QuantityRequest[], targets: readonly Float64Array[], status: number): number {
    for (const target of targets) target[row] = Number.NaN;
    let model: ClosedModel;
    try {
      model = this.closeModel(givensOfRow(this.bound, row), { where });
    } catch (failure) {
      this.report(row, undefined, failure);
      return rowStatus.failed;
    }
    const evaluation = new Evaluation(model);
    let missing = 0;
    requests.forEach((each, k) => {
      try {
        const { value } = findQuantity(each.name, where).compute(evaluation, each.arguments);
        if (!Number.isFinite(value)) {
          throw new DomainError({ where: each.name, argument: "result", rule: "must be a finite number", value });
        }
        targets[k][row] = value;
      } catch (failure) {
        missing++;
        this.report(row, each.text, failure);
      }
    });
    if (missing === 0) return status;
    return missing === requests.length && status !== rowStatus.engine ? rowStatus.failed : rowStatus.partlyEmpty;
  }

  private report(row: number, output: string | undefined, failure: unknown): void {
    // Anything but a known refusal is a defect of the program and must not pass as an empty cell.
    if (!(failure instanceof CosmologyError)) throw failure;
    this.problems?.push({ row, output, message: failure.message });
  }
}
