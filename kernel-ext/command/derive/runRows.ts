import { setImmediate as nextTurn } from "node:timers/promises";
import { DataRowError } from "../../../cosmo/errors";
import type { CellValue, TableOutput, TableReader, TableRow } from "../../data";
import { problemText } from "./rowFault";

/** What {@link runRows} works with. */
export interface RowWork {
  readonly table: TableReader;
  readonly output: TableOutput;
  /** The added cells of a row, without the problem column; throws DataRowError for a bad row. */
  readonly derive: (row: TableRow) => CellValue[];
  /** The cells that were read, as the output wants them. */
  readonly outgoing: (row: TableRow) => readonly CellValue[];
  /** The number of added columns where bad rows are kept, the problem column counted; undefined where they are refused. */
  readonly keepWith: number | undefined;
  readonly onProgress: (rows: number) => void;
}

/** How many rows went through. */
export interface RowCount {
  readonly rows: number;
  readonly bad: number;
}

/** Rows are written, signals heard and progress shown after so many milliseconds of computing. */
const breath = 50;

/**
 * Runs all rows in order and writes them; memory does not grow with their number. Does not finish the sink of the output.
 *
 * @throws DataRowError at the first bad row where bad rows are refused, after the rows before it have been written
 */
export async function runRows(work: RowWork): Promise<RowCount> {
  let rows = 0;
  let bad = 0;
  let breathedAt = performance.now();
  for await (const batch of work.table.batches()) {
    for (const row of batch) {
      let added: CellValue[];
      try {
        added = work.derive(row);
        if (work.keepWith !== undefined) added.push(null);
      } catch (error) {
        if (!(error instanceof DataRowError)) throw error;
        if (work.keepWith === undefined) {
          await work.output.flush();
          throw error;
        }
        bad++;
        added = new Array<CellValue>(work.keepWith - 1).fill(null);
        added.push(problemText(error));
      }
      work.output.row({ ...row, cells: work.outgoing(row) }, added);
      rows++;
      if (performance.now() - breathedAt > breath) {
        await work.output.flush();
        work.onProgress(rows);
        await nextTurn();
        breathedAt = performance.now();
      }
    }
  }
  await work.output.end();
  return { rows, bad };
}
