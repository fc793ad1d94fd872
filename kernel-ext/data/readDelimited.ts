import { type ParseError, Parser } from "papaparse";
import { decodeText } from "./decodeText";
import { parseNumber } from "./parseNumber";
import { shownPiece, TableError } from "./tableError";
import { longestRow, type TableReader, type TableRow } from "./tableReader";

/** The characters of an open row from which on it is parsed less often. */
const patience = 256 * 1024;

/** What papaparse's parser returns for one piece of text. */
interface ParsedPiece {
  data: string[][];
  errors: ParseError[];
  meta: { cursor: number };
}

/**
 * Reads comma or tab separated text with a header row, in pieces: lines that begin with # and blank lines are skipped, quoted
 * fields may hold separators, line ends and doubled quotes, LF and CRLF may be mixed. An empty field is a missing value.
 *
 * A row with too few or too many fields is given with a problem. A quote that is not closed or not doubled ends the reading,
 * because nobody knows where the next row begins.
 *
 * Papaparse's parser is driven directly, a piece at a time: its own streaming loses the parser's complaints.
 */
export async function readDelimited(
  bytes: AsyncIterable<Uint8Array>,
  file: string,
  format: "csv" | "tsv",
): Promise<TableReader> {
  const pieces = rowsOf(bytes, file, format === "csv" ? "," : "\t");
  let header: string[] | undefined;
  let rest: string[][] = [];
  while (header === undefined) {
    const next = await pieces.next();
    if (next.done) throw new TableError({ file, reason: "is empty: there is no header row" });
    [header, ...rest] = next.value;
  }
  const columns = checkedHeader(header, file, format);

  async function* batches(): AsyncGenerator<readonly TableRow[], void, undefined> {
    let count = 0;
    const toRow = (fields: string[]): TableRow => tableRow(fields, columns, ++count);
    if (rest.length > 0) yield rest.map(toRow);
    rest = [];
    for await (const rows of pieces) yield rows.map(toRow);
  }
  return { columns, batches };
}

/** Rows of fields, header included, as many at once as a piece of the input completes. */
async function* rowsOf(
  bytes: AsyncIterable<Uint8Array>,
  file: string,
  delimiter: string,
): AsyncGenerator<string[][], void, undefined> {
  // LF as the line end takes CRLF too: a CR at the end of a row's last field is taken off below.
  const settings = { delimiter, newline: "\n" as const, comments: "#", quoteChar: '"' };
  let before = 0;
  let open = "";

  const parse = (text: string, last: boolean): string[][] => {
    const parsed = new Parser(settings).parse(text, 0, !last) as ParsedPiece;
    // An error in the row that is still incomplete may only be its being cut.
    const error = parsed.errors.find((each) => last || (each.row ?? 0) < parsed.data.length);
    if (error !== undefined) throw quoteError(error, parsed.data, before, file);
    open = last ? "" : text.slice(parsed.meta.cursor);
    const rows = parsed.data.map(withoutCarriageReturn).filter((fields) => fields.length > 1 || fields[0] !== "");
    if (open.length > longestRow) {
      throw new TableError({
        file,
        row: before + rows.length,
        reason: `takes more than ${longestRow} characters`,
        hint: "look for a quote that is never closed",
      });
    }
    before += rows.length;
    return rows;
  };

  // Each parse begins at the beginning of the open row. Where that row is very long, and only there, pieces are gathered until
  // they have doubled it, so that the work stays in proportion to the length.
  let enough = 0;
  for await (const text of decodeText(bytes, file)) {
    open += text;
    if (open.length < enough) continue;
    const rows = parse(open, false);
    enough = open.length > patience ? 2 * open.length : 0;
    if (rows.length > 0) yield rows;
  }
  const rows = parse(open, true);
  if (rows.length > 0) yield rows;
}

function withoutCarriageReturn(fields: string[]): string[] {
  const last = fields[fields.length - 1]!;
  if (last.endsWith("\r")) fields[fields.length - 1] = last.slice(0, -1);
  return fields;
}

function quoteError(error: ParseError, data: string[][], before: number, file: string): TableError {
  const blank = data
    .slice(0, error.row ?? 0)
    .filter((fields) => fields.length === 1 && /^\r?$/.test(fields[0]!)).length;
  // The header is the first of all rows, so that the number of rows before this one is the number of this one.
  const row = before + (error.row ?? 0) - blank;
  const reason =
    error.code === "MissingQuotes"
      ? "a quote that opens a field is never closed"
      : "text follows the quote that closes a field";
  return new TableError({
    file,
    row: row > 0 ? row : undefined,
    reason: row > 0 ? reason : `in the header, ${reason}`,
    hint: "a quote inside a quoted field is written twice",
  });
}

function checkedHeader(header: readonly string[], file: string, format: "csv" | "tsv"): string[] {
  const columns = header.map((name) => name.trim());
  const refuse = (reason: string, hint?: string): never => {
    throw new TableError({ file, reason, hint });
  };
  if (columns.some((name) => name.includes("\r"))) {
    refuse("separates its lines by CR alone", "convert the line ends to LF or CRLF first");
  }
  if (columns.length === 1) {
    const other = [";", "\t", ","].find((separator) => columns[0]!.includes(separator));
    if (other !== undefined) {
      const name = other === "\t" ? "tabs" : `"${other}"`;
      const hint = other === "\t" ? "name it .tsv, or say --format tsv" : undefined;
      refuse(
        `seems to separate its columns by ${name}, and ${format} needs ${format === "csv" ? '","' : "tabs"}`,
        hint,
      );
    }
  }
  if (columns.every((name) => "value" in parseNumber(name))) {
    refuse(`the first row must name the columns, and it holds numbers: ${shownPiece(columns.join(" "))}`);
  }
  const seen = new Map<string, number>();
  columns.forEach((name, index) => {
    const first = seen.get(name);
    if (first !== undefined) {
      refuse(`columns ${first + 1} and ${index + 1} have the same name ${shownPiece(name)}`, "rename one of them");
    }
    seen.set(name, index);
  });
  return columns;
}

function tableRow(fields: readonly string[], columns: readonly string[], number: number): TableRow {
  const cells = columns.map((_, index) => (fields[index] === undefined || fields[index] === "" ? null : fields[index]));
  if (fields.length === columns.length) return { number, cells };
  const extra = fields.slice(columns.length);
  const surplus = extra.length === 0 ? "" : `; beyond the header: ${shownPiece(extra.join(" "))}`;
  const reason = `has ${fields.length} field${fields.length === 1 ? "" : "s"} where the header has ${columns.length}${surplus}`;
  return { number, cells, problem: { row: number, reason } };
}
