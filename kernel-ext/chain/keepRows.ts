import { DataRowError, DomainError } from "../../cosmo/errors";

/** How many rows at the beginning are left out: a share of all below 1, else a number of rows. */
export function burnInRows(burnIn: number | undefined, rows: number, where: string): number {
  if (burnIn === undefined) return 0;
  if (!(burnIn >= 0) || (burnIn >= 1 && !Number.isInteger(burnIn))) {
    const rule = "must be a share of the rows from 0 to below 1, or a whole number of rows";
    throw new DomainError({ where, argument: "burnIn", rule, value: burnIn });
  }
  const dropped = burnIn < 1 ? Math.floor(burnIn * rows) : burnIn;
  if (!(dropped < rows)) {
    throw new DomainError({ where, argument: "burnIn", rule: `must leave rows: the chain has ${rows}`, value: burnIn });
  }
  return dropped;
}

/** Refuses weights that are negative, and those that are all 0 after the rows that are left out. */
export function checkWeights(weights: Float64Array, dropped: number, column: string, where: string): void {
  let sum = 0;
  weights.forEach((weight, row) => {
    if (!(weight >= 0)) {
      throw new DataRowError({
        where,
        row: row + 1,
        column,
        value: weight,
        reason: "must not be negative: it is the weight",
      });
    }
    if (row >= dropped) sum += weight;
  });
  if (!(sum > 0))
    throw new DomainError({ where, argument: column, rule: "must have a weight above 0 in some row", value: sum });
}

/** The rows of a column that are marked. */
export function markedRows(column: Float64Array, marks: Uint8Array, count: number): Float64Array {
  if (count === column.length) return column;
  const kept = new Float64Array(count);
  let next = 0;
  for (let row = 0; row < column.length; row++) if (marks[row] === 1) kept[next++] = column[row]!;
  return kept;
}
