import {
  type CosmologyError,
  DataRowError,
  DomainError,
  describeValue,
  NoAnswerError,
  NotConvergedError,
  UnknownNameError,
} from "../../../cosmo/errors";
import type { TableRow } from "../../data";

/**
 * What a model or a quantity refused, as a fault of the row: the column is that of the field at fault, or the one that was
 * asked for.
 *
 * @param columnOfField the file's column of each field it gives; @param asked the quantity that was being computed
 */
export function rowFault(
  error: CosmologyError,
  where: string,
  row: TableRow,
  columnOfField: ReadonlyMap<string, string>,
  asked: string | undefined,
): DataRowError {
  const fault = (column: string | undefined, reason: string, value?: unknown): DataRowError =>
    new DataRowError({ where, row: row.number, column, value, reason, hint: error.hint });
  if (error instanceof DomainError) {
    const column = columnOfField.get(error.argument);
    if (column !== undefined) return fault(column, error.rule, error.value);
    return fault(asked, `${error.argument} ${error.rule}`, error.value);
  }
  if (error instanceof UnknownNameError) {
    const name = /^value of (.+)$/.exec(error.kind)?.[1];
    const column = name === undefined ? undefined : columnOfField.get(name);
    return fault(column, `is not a known ${error.kind}`, error.given);
  }
  if (error instanceof NoAnswerError || error instanceof NotConvergedError) {
    // The quantity at fault may be one that the asked one stands on.
    const subject = error.where === where || asked?.startsWith(error.where) ? "" : `${error.where}: `;
    return fault(asked, `${subject}${error.reason}`);
  }
  return fault(asked, error.message.startsWith(`${where}: `) ? error.message.slice(where.length + 2) : error.message);
}

/** The fault as the problem column tells it: the row itself says which row it is. */
export function problemText(error: DataRowError): string {
  const column = error.column === undefined ? "" : `${error.column}: `;
  const value = error.value === undefined ? "" : `, got ${describeValue(error.value)}`;
  const hint = error.hint === undefined ? "" : ` (${error.hint})`;
  return `${column}${error.reason}${value}${hint}`;
}
