/** What a {@link TableError} is made of. */
export interface TableErrorFields {
  /** The file as the user named it; "standard input" for a stream without a name. */
  file: string;
  /** The row of data from which nothing can be read any more, counted from 1. */
  row?: number | undefined;
  /** What is wrong, as a clause. */
  reason: string;
  /** What would mend it, in one sentence. */
  hint?: string | undefined;
}

/** A table that cannot be read or written as a whole. What is wrong with one row only is a {@link RowProblem} instead. */
export class TableError extends Error {
  override readonly name = "TableError";
  readonly file: string;
  readonly row: number | undefined;
  readonly reason: string;
  readonly hint: string | undefined;

  constructor(fields: TableErrorFields) {
    super(`${fields.file}: ${fields.row === undefined ? "" : `row ${fields.row}: `}${fields.reason}`);
    this.file = fields.file;
    this.row = fields.row;
    this.reason = fields.reason;
    this.hint = fields.hint;
  }
}

/** What is wrong with one row of a table, as data: whoever reads the table says it in words of their own. */
export interface RowProblem {
  /** The first row of data is 1; header, comments and blank lines do not count. */
  readonly row: number;
  /** The column's name as the file writes it; none where the whole row is at fault. */
  readonly column?: string | undefined;
  /** What the cell or the line held. */
  readonly value?: unknown;
  /** What is wrong, as a clause: "must be a number". */
  readonly reason: string;
}

/** A piece of a table as an error shows it: quoted, on one line, cut where it is long. */
export function shownPiece(text: string): string {
  return JSON.stringify(text.length > 60 ? `${text.slice(0, 57)}...` : text);
}
