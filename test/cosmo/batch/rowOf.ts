import { type BoundColumns, bindColumns } from "../../../cosmo/batch/batchColumns";
import { BatchRow } from "../../../cosmo/batch/batchRow";
import { RowCloser } from "../../../cosmo/batch/closeRow";
import { constantsSets } from "../../../cosmo/constants";
import type { ModelGivens } from "../../../cosmo/model";

/** Columns that state one model, all of it shared. */
export function columnsOf(givens: ModelGivens): BoundColumns {
  return bindColumns({}, givens, 1);
}

/** A model as the batch engine closes it, or undefined where the engine leaves it to the single path. */
export function rowOf(givens: ModelGivens): BatchRow | undefined {
  const row = new BatchRow();
  const closer = new RowCloser(columnsOf(givens), constantsSets[givens.conventions?.constants ?? "codata2022"]);
  return closer.close(0, row) ? row : undefined;
}
