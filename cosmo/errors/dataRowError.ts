import { CosmologyError } from "./cosmologyError";
import { describeValue } from "./describeValue";

/** What a {@link DataRowError} is made of. */
export interface DataRowFields {
  where: string;
  /** Row number as the reader of the file counts them: the first row of data is 1. */
  row: number;
  /** The column's name; none where the whole row is at fault. */
  column?: string | undefined;
  /** What the cell held. */
  value?: unknown;
  /** What is wrong, as a clause. */
  reason: string;
  hint?: string | undefined;
}

/** A bad row of a table: names row, column, value and reason. */
export class DataRowError extends CosmologyError {
  override readonly name = "DataRowError";
  readonly row: number;
  readonly column: string | undefined;
  readonly value: unknown;
  readonly reason: string;

  constructor(fields: DataRowFields) {
    const column = fields.column === undefined ? "" : ` of column ${describeValue(fields.column)}`;
    const value = "value" in fields && fields.value !== undefined ? `, got ${describeValue(fields.value)}` : "";
    super(fields.where, `${fields.where}: row ${fields.row}${column}: ${fields.reason}${value}`, fields.hint);
    this.row = fields.row;
    this.column = fields.column;
    this.value = fields.value;
    this.reason = fields.reason;
  }
}
