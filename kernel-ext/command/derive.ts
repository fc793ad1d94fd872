/** `cosmology-cells derive`: derived columns for a file of models. */
import { statSync } from "node:fs";
import type { Readable, Writable } from "node:stream";
import { CosmologyError } from "../../cosmo/errors";
import {
  ClosedPipeError,
  type OpenedFile,
  openFile,
  openStream,
  openTable,
  TableError,
  type TextSink,
  tableWriter,
  wholeFile,
} from "../data";
import { CommandError } from "./commandError";
import { planColumns } from "./derive/columns";
import { NoteCounter } from "./derive/noteCounter";
import { type DeriveOptions, parseOptions } from "./derive/options";
import { RateLine } from "./derive/rateLine";
import { RowDeriver } from "./derive/rowDeriver";
import { runRows } from "./derive/runRows";
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
  const source: OpenedFile = await step(2, () => {
    refuseSamePlace(options);
    return options.input === "-" ? { bytes: streams.stdin, length: undefined } : openFile(options.input);
  });
  const name = options.input === "-" ? "standard input" : options.input;
  let bytesRead = 0;
  async function* counted(): AsyncGenerator<Uint8Array> {
    for await (const piece of source.bytes) {
      bytesRead += piece.length;
      yield piece;
    }
  }
  const table = await step(1, () => openTable(counted(), name, options.inputFormat));
  const plan = await step(2, () => planColumns(table.columns, options));
  for (const warning of plan.warnings) say(`derive ${name}: ${warning}`);

  const sink = await step(2, () =>
    options.output === "-" ? openStream(streams.stdout, "standard output") : wholeFile(options.output),
  );
  const stopListening = discardOnSignal(sink);
  const rateLine = (options.progress ?? streams.stderr.isTTY === true) ? new RateLine(streams.stderr) : undefined;
  const notes = new NoteCounter();
  const deriver = new RowDeriver(plan, options, `derive ${name}`, (column, row, note) => notes.add(column, row, note));
  const typed = options.outputFormat === "jsonl" && options.inputFormat !== "jsonl";
  try {
    const { rows, bad } = await step(1, async () => {
      const count = await runRows({
        table,
        writer: tableWriter(options.outputFormat, plan.columns, plan.added),
        sink,
        header: options.header,
        derive: (row) => deriver.derive(row),
        outgoing: (row) => (typed ? deriver.typedCells(row) : row.cells),
        keepWith: options.keepBadRows ? plan.added.length : undefined,
        onProgress: (done) =>
          rateLine?.update(done, source.length === undefined ? undefined : bytesRead / source.length),
      });
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
