import type { BatchColumns } from "../../../cosmo/batch";
import type { CellValue, TableRow } from "../../data";
import { sharedDoubles } from "../../workers";
import type { FillValues } from "./fill";
import { valueOfCell } from "./givensOfRow";
import type { FastPlan } from "./planFast";

/** Rows that go to the batch engine together. Fixed, as everything that decides which rows are computed together. */
export const blockRows = 8192;

const mostMasses = 3;

/** Rows as columns of numbers. */
export interface RowBlock {
  readonly rows: readonly TableRow[];
  readonly columns: BatchColumns;
  /** Rows that are no plain numbers: bad ones, and those that leave a given out. NaN stands in their columns. */
  readonly odd: ReadonlySet<number>;
}

/** Sorts the cells of rows into columns. */
export function rowBlock(rows: readonly TableRow[], plan: FastPlan, fill: FillValues, typed: boolean): RowBlock {
  const odd = new Set<number>();
  rows.forEach((row, index) => {
    if (row.problem !== undefined) odd.add(index);
  });
  const columns: Record<string, Float64Array | Float64Array[]> = {};
  for (const { index, given } of plan.numbers) {
    const column = sharedDoubles(rows.length);
    const filler = fill.get(given.name);
    for (let row = 0; row < rows.length; row++) {
      const cell = rows[row]!.cells[index];
      const value = isMissing(cell) ? filler : read(cell);
      if (typeof value === "number") column[row] = value;
      else {
        column[row] = Number.NaN;
        odd.add(row);
      }
    }
    columns[given.name] = column;

    function read(cell: Exclude<CellValue, null | undefined>): unknown {
      const parsed = valueOfCell(given, cell, typed);
      return "value" in parsed ? parsed.value : undefined;
    }
  }
  if (plan.masses !== undefined) {
    const { index, given } = plan.masses;
    const lists = Array.from({ length: mostMasses }, () => sharedDoubles(rows.length));
    for (let row = 0; row < rows.length; row++) {
      const cell = rows[row]!.cells[index];
      const parsed = isMissing(cell) ? { value: fill.get(given.name) } : valueOfCell(given, cell, typed);
      const list = "value" in parsed ? parsed.value : undefined;
      if (Array.isArray(list) && list.length <= mostMasses) {
        for (let k = 0; k < list.length; k++) lists[k]![row] = list[k];
      } else odd.add(row);
    }
    columns[given.name] = lists;
  }
  return { rows, columns, odd };
}

function isMissing(cell: CellValue): cell is null | undefined {
  return cell === null || cell === undefined;
}
