/** `cosmology-cells derive`: derived columns for a file of models. */
import { statSync } from "node:fs";
import type { Readable, Writable } from "node:stream";
import { CosmologyError } from "../../cosmo/errors";
import {
  ClosedPipeError,
  openFile,
  openStream,
  openTable,
  readParquet,
  TableError,
  type TableFormat,
  type TableReader,
  type TextSink,
  tableOutput,
  wholeFile,
} from "../data";
import { CommandError } from "./commandError";
import { type ColumnPlan, planColumns } from "./derive/columns";
import { NoteCounter } from "./derive/noteCounter";
import { type DeriveOptions, parseOptions } from "./derive/options";
import { type FastPlan, planFast } from "./derive/planFast";
import { RateLine } from "./derive/rateLine";
import { RowDeriver } from "./derive/rowDeriver";
import { runFast } from "./derive/runFast";
import { type RowCount, type RowWork, runRows } from "./derive/runRows";
import { deriveUsage } from "./derive/usage";

export { deriveUsage };

/** The standard streams, or what stands for them. */
export interface CommandStreams {
  readonly stdin: Readable;
  readonly stdout: Writable;
  readonly stderr: Writable & { readonly isTTY?: boolean };
}

/** Where the reader of the output has gone: what a shell reports of a program that died of SIGPIPE. */
const closedPipe = 141;

/** An error together with the exit code it ends the command with. */
class Refusal extends Error {
  constructor(
    override readonly cause: unknown,
    readonly code: 1 | 2,
  ) {
    super("refused");
  }
}

/**
 * The `derive` command.
 *
 * @returns the exit code: 0 done, 1 the data were refused, 2 the command is wrong or does not fit the file
 */
export async function deriveCommand(args: readonly string[], streams: CommandStreams = process): Promise<number> {
  if (args.includes("--help") || args.includes("-h")) {
    streams.stdout.write(deriveUsage);
    return 0;
  }
  const say = (text: string, hint?: string): void => {
    streams.stderr.write(`cosmology-cells ${text}\n${hint === undefined ? "" : `  ${hint}\n`}`);
  };
  try {
    await derive(args, streams, say);
    return 0;
  } catch (refusal) {
    if (refusal instanceof ClosedPipeError) return closedPipe;
    if (!(refusal instanceof Refusal)) throw refusal;
    const { cause: error, code } = refusal;
    if (error instanceof TableError) say(`derive ${error.message}`, error.hint);
    else if (error instanceof CosmologyError) say(error.message, error.hint);
    else if (error instanceof CommandError) say(error.message, "the options: cosmology-cells derive --help");
    else throw error;
    return code;
  }
}

/** Runs a step; what it refuses ends the command with this code. */
async function step<T>(code: 1 | 2, work: () => T | Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    const refused = error instanceof TableError || error instanceof CosmologyError || error instanceof CommandError;
    throw refused ? new Refusal(error, code) : error;
  }
}

async function derive(args: readonly string[], streams: CommandStreams, say: (text: string) => void): Promise<void> {
  const options = await step(2, () => parseOptions(args));
  const name = options.input === "-" ? "standard input" : options.input;
  const { table, share } = await openSource(options, streams, name);
  const plan = await step(2, () => planColumns(table.columns, options));
  const tell = (text: string): void => say(`derive ${name}: ${text}`);
  for (const warning of plan.warnings) tell(warning);
  const fast = await step(2, () => fastPlan(plan, options, tell));

  const sink = await step(2, () =>
    options.output === "-" ? openStream(streams.stdout, "standard output") : wholeFile(options.output),
  );
  const stopListening = discardOnSignal(sink);
  const rateLine = (options.progress ?? streams.stderr.isTTY === true) ? new RateLine(streams.stderr) : undefined;
  const notes = new NoteCounter();
  const deriver = new RowDeriver(plan, options, `derive ${name}`, (column, row, note) => notes.add(column, row, note));
  const typed = options.outputFormat === "jsonl" && isText(options.inputFormat);
  try {
    const { rows, bad } = await step(1, async () => {
      const work: RowWork = {
        table,
        output: await tableOutput({
          format: options.outputFormat,
          columns: plan.columns,
          added: plan.added,
          sink,
          header: options.header,
          textColumns: new Set([options.problemColumn, ...wordColumns(plan)]),
        }),
        derive: (row) => deriver.derive(row),
        outgoing: (row) => (typed ? deriver.typedCells(row) : row.cells),
        keepWith: options.keepBadRows ? plan.added.length : undefined,
        onProgress: (done) => rateLine?.update(done, share(done)),
      };
      const count = await (fast === undefined ? runRows(work) : throughEngine(work, fast, options, tell));
      await sink.finish();
      return count;
    });
    rateLine?.finish(rows);
    for (const sentence of notes.sentences()) say(`derive ${name}: ${sentence}`);
    if (options.keepBadRows) {
      say(
        bad === 0
          ? `derive ${name}: none of ${rows} rows is bad`
          : `derive ${name}: ${bad} of ${rows} rows are bad; their reasons are in the column ${JSON.stringify(options.problemColumn)}`,
      );
    }
  } catch (error) {
    rateLine?.close();
    sink.discard();
    throw error;
  } finally {
    stopListening();
  }
}

/** Opens the table, and what tells how much of it is read, 0 to 1, where its length is known. */
async function openSource(
  options: DeriveOptions,
  streams: CommandStreams,
  name: string,
): Promise<{ table: TableReader; share: (rows: number) => number | undefined }> {
  await step(2, () => refuseSamePlace(options));
  if (options.inputFormat === "parquet") {
    // That the file is there is the command's affair, what it holds the file's.
    for await (const _ of (await step(2, () => openFile(options.input))).bytes) break;
    const table = await step(1, () => readParquet(options.input));
    return { table, share: (rows) => rows / table.rows };
  }
  const source = await step(2, () =>
    options.input === "-" ? { bytes: streams.stdin, length: undefined } : openFile(options.input),
  );
  let bytesRead = 0;
  async function* counted(): AsyncGenerator<Uint8Array> {
    for await (const piece of source.bytes) {
      bytesRead += piece.length;
      yield piece;
    }
  }
  const table = await step(1, () => openTable(counted(), name, options.inputFormat));
  return { table, share: () => (source.length === undefined ? undefined : bytesRead / source.length) };
}

function isText(format: TableFormat): boolean {
  return format === "csv" || format === "tsv";
}

/** Columns of the file whose cells are words or lists. */
function wordColumns(plan: ColumnPlan): string[] {
  return plan.givens.filter(({ given }) => given.kind !== "number").map(({ column }) => column);
}

/** The plan of the fast path where it was asked for and can be had; says which path the rows take. */
function fastPlan(plan: ColumnPlan, options: DeriveOptions, tell: (text: string) => void): FastPlan | undefined {
  if (!options.fast) return undefined;
  const fast = planFast(plan, options);
  if ("reason" in fast) {
    tell(`--fast cannot be used: ${fast.reason}; all rows take the full computation`);
    return undefined;
  }
  const solved = fast.request.hubbleFrom === undefined ? "" : `; H0 is solved for from ${fast.request.hubbleFrom}`;
  tell(`batch engine, accuracy 1e-6 or better${solved}`);
  return fast;
}

async function throughEngine(
  work: RowWork,
  plan: FastPlan,
  options: DeriveOptions,
  tell: (text: string) => void,
): Promise<RowCount> {
  const { fill, digits, workers } = options;
  const typed = !isText(options.inputFormat);
  const text = isText(options.outputFormat);
  const count = await runFast({ ...work, plan, fill, digits, workers, typed, text });
  if (count.full > 0) {
    tell(
      `${count.full} of ${count.rows} rows took the full computation: outside the batch engine's range, or no plain numbers`,
    );
  }
  return count;
}

/** Reading a file while its new content takes its place would work, and would lose the old content unasked. */
function refuseSamePlace({ input, output }: DeriveOptions): void {
  if (input === "-" || output === "-") return;
  const one = statSync(input, { throwIfNoEntry: false });
  const other = statSync(output, { throwIfNoEntry: false });
  if (one !== undefined && other !== undefined && one.dev === other.dev && one.ino === other.ino) {
    throw new CommandError(`derive: --out is the file that is read, ${JSON.stringify(input)}; write to another name`);
  }
}

/** Takes the half-written file away when the command is stopped. */
function discardOnSignal(sink: TextSink): () => void {
  const stop = (signal: NodeJS.Signals): void => {
    sink.discard();
    process.exit(signal === "SIGINT" ? 130 : 143);
  };
  process.once("SIGINT", stop).once("SIGTERM", stop);
  return () => {
    process.off("SIGINT", stop).off("SIGTERM", stop);
  };
}
