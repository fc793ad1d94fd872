import type { TableFormat } from "./tableFormat";
import type { CellValue, TableRow } from "./tableReader";
import { tableWriter } from "./tableWriter";
import type { TextSink } from "./wholeFile";
import { parquetOutput } from "./writeParquet";

/** Rows on their way into a sink, in one format. */
export interface TableOutput {
  /** Takes a row: the cells that were read and those that are added. It leaves at the next flush. */
  row(row: TableRow, added: readonly CellValue[]): void;
  /** Resolves when more is welcome. */
  flush(): Promise<void>;
  /** Sends what is still here. The sink is the caller's to finish. */
  end(): Promise<void>;
}

/** What a table's output is made for. */
export interface TableOutputOptions {
  readonly format: TableFormat;
  /** Columns that were read. */
  readonly columns: readonly string[];
  /** Columns behind them. */
  readonly added: readonly string[];
  readonly sink: TextSink;
  /** Whether text begins with a header. */
  readonly header: boolean;
  /** Columns that hold text whatever their cells look like; Parquet needs to know. */
  readonly textColumns: ReadonlySet<string>;
}

/** Starts the output of a table. */
export async function tableOutput(options: TableOutputOptions): Promise<TableOutput> {
  const { format, columns, added, sink, header } = options;
  if (format === "parquet") return parquetOutput(options);
  const writer = tableWriter(format, columns, added);
  let text = header ? writer.header() : "";
  const flush = async (): Promise<void> => {
    const piece = text;
    text = "";
    await sink.write(piece);
  };
  return {
    row(row, more) {
      text += writer.row(row, more);
    },
    flush,
    end: flush,
  };
}
