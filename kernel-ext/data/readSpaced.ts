import { decodeText } from "./decodeText";
import { parseNumber } from "./parseNumber";
import { shownPiece, TableError } from "./tableError";
import { longestRow, type TableReader, type TableRow } from "./tableReader";

/**
 * Reads text whose columns are separated by blanks: the first line that is not blank names the columns, with or without a # before it; later
 * lines that begin with # and blank lines are skipped.
 *
 * A row with too few or too many fields is given with a problem.
 *
 * @throws TableError where there is no line of names, or one name stands twice
 */
export async function readSpaced(bytes: AsyncIterable<Uint8Array>, file: string): Promise<TableReader> {
  const pieces = linesOf(bytes, file);
  let columns: string[] | undefined;
  let rest: string[] = [];
  while (columns === undefined) {
    const next = await pieces.next();
    if (next.done) throw new TableError({ file, reason: "is empty: there is no line that names the columns" });
    const [header, ...more] = next.value;
    columns = header!.replace(/^#+/, "").trim().split(/\s+/);
    rest = more;
  }
  const names = checked(columns, file);

  async function* batches(): AsyncGenerator<readonly TableRow[], void, undefined> {
    let count = 0;
    const toRows = (lines: readonly string[]): TableRow[] =>
      lines.filter((line) => !line.startsWith("#")).map((line) => rowOf(line, names.length, ++count));
    yield toRows(rest);
    rest = [];
    for await (const lines of pieces) yield toRows(lines);
  }
  return { columns: names, batches };
}

async function* linesOf(bytes: AsyncIterable<Uint8Array>, file: string): AsyncGenerator<string[], void, undefined> {
  let open = "";
  for await (const text of decodeText(bytes, file)) {
    const lines = (open + text).split("\n");
    open = lines.pop()!;
    if (open.length > longestRow)
      throw new TableError({ file, reason: `has a line of more than ${longestRow} characters` });
    const filled = lines.map((line) => line.trim()).filter((line) => line !== "");
    if (filled.length > 0) yield filled;
  }
  if (open.trim() !== "") yield [open.trim()];
}

function checked(columns: readonly string[], file: string): readonly string[] {
  if (columns.every((name) => "value" in parseNumber(name))) {
    throw new TableError({
      file,
      reason: `the first line must name the columns, and it holds numbers: ${shownPiece(columns.join(" "))}`,
    });
  }
  const twice = columns.find((name, index) => columns.indexOf(name) !== index);
  if (twice !== undefined) throw new TableError({ file, reason: `two columns have the name ${shownPiece(twice)}` });
  return columns;
}

function rowOf(line: string, width: number, number: number): TableRow {
  const cells = line.split(/\s+/);
  if (cells.length === width) return { number, cells };
  const reason = `has ${cells.length} field${cells.length === 1 ? "" : "s"} where the first line names ${width}`;
  return { number, cells, problem: { row: number, reason } };
}
