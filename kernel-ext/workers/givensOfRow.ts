import type { BatchColumns } from "../../cosmo/batch";
import { bindColumns, givensOfRow } from "../../cosmo/batch/batchColumns";
import type { ModelGivens } from "../../cosmo/model";
import type { WorkerRequest } from "./batchJob";

/** The columns without the derived one that stands in place of H0. */
export function fieldColumns(columns: BatchColumns, hubbleFrom: string | undefined): BatchColumns {
  if (hubbleFrom === undefined) return columns;
  const { [hubbleFrom]: _, ...rest } = columns;
  return rest;
}

/** The givens of single rows, as the full computation takes them: the derived column included. */
export function rowGivens(request: WorkerRequest, columns: BatchColumns, rows: number): (row: number) => ModelGivens {
  const { hubbleFrom } = request;
  const bound = bindColumns(fieldColumns(columns, hubbleFrom), request.shared ?? {}, rows);
  if (hubbleFrom === undefined) return (row) => givensOfRow(bound, row);
  const given = columns[hubbleFrom] as Float64Array | number;
  return (row) => ({
    ...givensOfRow(bound, row),
    [hubbleFrom]: typeof given === "number" ? given : given[row]!,
  });
}
