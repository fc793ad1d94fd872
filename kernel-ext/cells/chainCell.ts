import { DomainError } from "../../cosmo/errors";
import type { ClosedModel, ModelGivens } from "../../cosmo/model";
import { findQuantity } from "../../cosmo/quantities";
import { closeModel } from "../../cosmo/solve";
import { citation } from "../../cosmo/sources";
import {
  burnInRows,
  type ChainInput,
  type ColumnSummary,
  checkWeights,
  correlationMatrix,
  loadChain,
  markedRows,
  summarizeColumn,
} from "../chain";
import { type CellResult, cellOutput, formatNumber, progress, type SourceLine } from "../display";
import { type BatchAccuracy, type BatchRun, rowGivens, runBatch, type WorkerRequest } from "../workers";
import { type ChainColumn, chainCharts } from "./chain/chainCharts";
import { labelOf, settingsTable, summaryTable } from "./chain/chainTables";
import { type ColumnPlan, planColumns, requestsOf } from "./chain/planColumns";
import { checkOptions } from "./checkOptions";

/** Options of {@link chainCell}. */
export interface ChainCellOptions {
  /** Quantities to derive for every row: "age, acousticAngle, luminosityDistance(1.1)", or a list of them. */
  add?: string | readonly string[];
  /** What the chain calls otherwise: { H0: "hubble" }. */
  map?: { readonly [column: string]: string };
  /** Givens that all rows share: { recombination: "peebles", photonTemperature: 2.7255 }. */
  shared?: ModelGivens;
  /** The column of weights. Default: "weight" where there is one; else all rows count the same. */
  weights?: string;
  /** Rows at the beginning to leave out: a share below 1, or a number of rows. */
  burnIn?: number;
  /** Further columns to be summed up, that are no parameters of the model. */
  also?: readonly string[];
  /** The two to six columns of the chart of regions, by the names in the summary. */
  regions?: readonly string[];
  /** `fast` (default): 1e-6 or better. `full`: as the other cells compute, some hundred rows a second. */
  accuracy?: BatchAccuracy;
  /** Worker threads; default one a core. */
  workers?: number;
  signal?: AbortSignal;
}

/** What the next cell gets. Rows: those after the burn-in, all columns of one length; NaN in a derived column where it failed. */
export interface ChainValues {
  /** Parameters by the vocabulary's names, further columns by their own, derived quantities as they were asked for. */
  columns: { [name: string]: Float64Array };
  /** Undefined where all rows count the same. */
  weights: Float64Array | undefined;
  /** By the same names. */
  summaries: { [name: string]: ColumnSummary };
  correlation: { names: string[]; matrix: number[][] };
  /** Rows after the burn-in. */
  rows: number;
  /** Rows of the chain whose derived quantities could not all be had, with the reasons; the first row of the chain is 1. */
  problems: { row: number; column: string | undefined; reason: string }[];
}

const where = "chainCell";
const known = ["add", "map", "shared", "weights", "burnIn", "also", "regions", "accuracy", "workers", "signal"];

/**
 * A chain of models: derived quantities for every row, and the posterior summed up.
 *
 * Mean and standard deviation sum w x/sum w and the like; equal-tailed 68% and 95% credible intervals; effective sample size by Geyer's initial
 * monotone sequence with weights (Kish); regions that hold 68% and 95% of the weight.
 *
 * @param chain a file's name (.csv, .tsv, .jsonl, .parquet, else columns separated by blanks), columns, or rows
 * @param options `add`, `map`, `shared`, `weights`, `burnIn`, `also`, `regions`, `accuracy`
 * Columns by the vocabulary's names (after `map`) are the parameters. Where none gives H0, one derived number (acousticAngle, age)
 * may stand in its place. Errors: a cell that is no number, with row and column; a column that is not there.
 * Accuracy of derived columns: 1e-6 or better (`accuracy: "full"`: that of the other cells).
 * Sources: Hyndman & Fan 1996; Geyer 1992; Kish 1965; Scott 1992.
 * @example await chainCell("chain.csv", { map: { H0: "hubble" }, burnIn: 0.3, add: "age, acousticAngle" })
 */
export async function chainCell(chain: ChainInput, options: ChainCellOptions = {}): Promise<CellResult<ChainValues>> {
  checkOptions(options, known, where);
  const requests = requestsOf(options.add);
  let plan: ColumnPlan | undefined;
  const loaded = await loadChain(
    chain,
    (names) => {
      plan = planColumns(names, options, requests.length > 0);
      return [...plan.columns.keys(), ...(plan.weights === undefined ? [] : [plan.weights])];
    },
    where,
  );
  const { columns: names, weights: weightColumn, hubbleFrom } = plan!;
  if (!(loaded.rows > 0))
    throw new DomainError({ where, argument: "chain", rule: "must have rows", value: loaded.rows });
  const dropped = burnInRows(options.burnIn, loaded.rows, where);
  const rows = loaded.rows - dropped;
  const kept = (column: string): Float64Array => loaded.columns.get(column)!.subarray(dropped);
  const allWeights = weightColumn === undefined ? undefined : loaded.columns.get(weightColumn)!;
  if (allWeights !== undefined) checkWeights(allWeights, dropped, weightColumn!, where);
  const weights = allWeights?.subarray(dropped);

  const columns: ChainValues["columns"] = {};
  for (const [column, name] of names) columns[name] = kept(column);
  const taken = requests.find(({ text }) => columns[text] !== undefined);
  if (taken !== undefined) {
    throw new DomainError({
      where,
      argument: "add",
      rule: "must not name a column that the chain gives",
      value: taken.text,
    });
  }
  const request: WorkerRequest = {
    outputs: requests.map((each) => each.text),
    shared: options.shared,
    hubbleFrom,
    accuracy: options.accuracy,
  };
  const run = requests.length === 0 ? undefined : await derive(request, plan!, columns, rows, options);
  const used = new Uint8Array(rows).fill(1);
  let usedRows = rows;
  if (run !== undefined) {
    if (run.hubble !== undefined) columns["hubble"] = run.hubble;
    for (const [name, column] of Object.entries(run.columns)) columns[name] = column;
    for (const { row } of run.problems) {
      if (used[row] === 1) usedRows--;
      used[row] = 0;
    }
  }
  if (usedRows === 0) {
    throw new DomainError({
      where,
      argument: "chain",
      rule: `must have rows that give a model: ${run?.problems[0]?.message}`,
      value: 0,
    });
  }
  const model = run === undefined ? undefined : firstModel(request, givenColumns(plan!, columns), used);
  const usedWeights = weights === undefined ? undefined : markedRows(weights, used, usedRows);
  const described: ChainColumn[] = Object.entries(columns).map(([name, column]) => {
    const values = markedRows(column, used, usedRows);
    const { symbol, unit } = labelOf(name);
    return { name, symbol, unit, values, summary: summarizeColumn(name, values, usedWeights) };
  });
  const derivedNames = requests.map((each) => each.text);
  const varying = described.filter(({ summary }) => summary.deviation > 0);
  const matrix = correlationMatrix(
    varying.map(({ values }) => values),
    usedWeights,
  );
  const reached = reachedAccuracy(run, options.accuracy);
  const values: ChainValues = {
    columns,
    weights,
    summaries: Object.fromEntries(described.map(({ name, summary }) => [name, summary])),
    correlation: { names: varying.map(({ name }) => name), matrix },
    rows,
    problems: (run?.problems ?? []).map(({ row, output, message }) => ({
      row: row + dropped + 1,
      column: output,
      reason: message,
    })),
  };
  const smallest = varying.reduce((least, { summary }) => Math.min(least, summary.effectiveSize), usedRows);
  return cellOutput({
    title: typeof chain === "string" ? `Chain ${chain}` : "Chain",
    summary: `${formatNumber(usedRows, { digits: "all" })} rows, at least ${formatNumber(Math.round(smallest), { digits: "all" })} effective${derivedNames.length === 0 ? "" : `; derived: ${derivedNames.join(", ")}`}`,
    tables: [summaryTable(described), settingsTable(loaded.rows, dropped, usedRows, plan!, options, reached, model)],
    charts: chainCharts(varying, usedWeights, matrix, derivedNames, options.regions),
    notes: notesOf(run, usedRows, rows, values, hubbleFrom, reached),
    sources: sources(
      requests.map(({ name }) => name),
      model,
    ),
    values,
  });
}

/** The columns that make the models. */
function givenColumns(
  { fields, hubbleFrom }: ColumnPlan,
  columns: ChainValues["columns"],
): Record<string, Float64Array> {
  const names = hubbleFrom === undefined ? fields : [...fields, hubbleFrom];
  return Object.fromEntries(names.map((name) => [name, columns[name]!]));
}

/** The model of the first row that gives one: conventions and sources are the same for all. */
function firstModel(request: WorkerRequest, given: Record<string, Float64Array>, used: Uint8Array): ClosedModel {
  return closeModel(rowGivens(request, given, used.length)(used.indexOf(1)), { where });
}

async function derive(
  request: WorkerRequest,
  plan: ColumnPlan,
  columns: ChainValues["columns"],
  rows: number,
  { workers, signal }: ChainCellOptions,
): Promise<BatchRun> {
  const given = givenColumns(plan, columns);
  const bar = rows > 256 ? progress({ label: "Derived columns", total: rows, unit: "models" }) : undefined;
  try {
    const run = await runBatch(request, given, { workers, signal, onProgress: (done) => bar?.update(done) });
    bar?.finish();
    return run;
  } catch (error) {
    bar?.interrupted();
    throw error;
  }
}

function reachedAccuracy(run: BatchRun | undefined, accuracy: BatchAccuracy | undefined): string | undefined {
  if (run === undefined) return undefined;
  if (accuracy === "full") return "full computation";
  const { fullOutputs, rows, counts } = run;
  const exact = rows - counts.engine;
  const parts = ["batch engine, 1e-6 or better"];
  if (fullOutputs.length > 0) parts.push(`full computation for ${fullOutputs.join(", ")}`);
  if (exact > 0)
    parts.push(`full computation for ${formatNumber(exact, { digits: "all" })} rows outside the engine's range`);
  return parts.join("; ");
}

function notesOf(
  run: BatchRun | undefined,
  used: number,
  rows: number,
  { problems }: ChainValues,
  hubbleFrom: string | undefined,
  reached: string | undefined,
): string[] {
  const notes: string[] = [];
  if (used < rows) {
    const [{ row, reason }] = problems as [ChainValues["problems"][number]];
    notes.push(
      `Warning: ${rows - used} rows without all derived quantities are left out of the sums, the first is row ${row}: ${reason}`,
    );
  }
  if (hubbleFrom !== undefined) notes.push(`H0 of each row is solved for from ${hubbleFrom}`);
  if (run !== undefined && reached !== undefined) notes.push(`accuracy of the derived columns: ${reached}`);
  return notes;
}

function sources(names: readonly string[], model: ClosedModel | undefined): SourceLine[] {
  const physics = names.flatMap((name) => {
    const { sources } = findQuantity(name, where);
    return typeof sources !== "function" ? sources : model === undefined ? [] : sources(model);
  });
  const keys = [...new Set(physics)].map((key) => ({ key, citation: citation(key) }));
  return [
    ...keys,
    {
      key: "geyer1992",
      citation:
        "Geyer 1992, Practical Markov chain Monte Carlo, Statistical Science 7, 473, section 3.3: effective samples",
    },
    { key: "kish1965", citation: "Kish 1965, Survey Sampling, section 11.7: effective samples with weights" },
    {
      key: "hyndmanFan1996",
      citation:
        "Hyndman & Fan 1996, Sample quantiles in statistical packages, The American Statistician 50, 361, definition 1",
    },
    {
      key: "scott1992",
      citation: "Scott 1992, Multivariate Density Estimation, section 6.3: smoothing of the regions",
    },
  ];
}
