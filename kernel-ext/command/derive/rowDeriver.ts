import { CosmologyError, DataRowError } from "../../../cosmo/errors";
import { type ModelGivens, modelFields } from "../../../cosmo/model";
import { findQuantity } from "../../../cosmo/quantities";
import { computeWithNotes, Evaluation, evaluateQuantity, type ValidityNote } from "../../../cosmo/quantity";
import { closeModel } from "../../../cosmo/solve";
import { compileModel } from "../../cells/compileModel";
import { type CellValue, roundDigits, type TableRow } from "../../data";
import type { ColumnPlan } from "./columns";
import { findGiven, type Given } from "./givenNames";
import { nestGivens, valueOfCell } from "./givensOfRow";
import type { DeriveOptions } from "./options";
import { rowFault } from "./rowFault";

/** Digits of an error estimate: more would pretend. */
const errorDigits = 3;

/** Hears of a note that comes with a number. */
export type NoteListener = (column: string, row: number, note: ValidityNote) => void;

/** Derives the added cells of rows, each by itself. */
export class RowDeriver {
  private readonly requests;
  private readonly columnOfField: ReadonlyMap<string, string>;

  /** @param where what errors begin with: "derive models.csv" */
  constructor(
    private readonly plan: ColumnPlan,
    private readonly options: DeriveOptions,
    private readonly where: string,
    private readonly onNote: NoteListener,
  ) {
    this.requests = options.requests.map((request) => ({
      text: request.text,
      values: request.arguments,
      definition: findQuantity(request.name, where),
    }));
    this.columnOfField = new Map(plan.givens.map(({ given, column }) => [given.name, column]));
  }

  /**
   * The cells of the columns asked for, without the problem column.
   *
   * @throws DataRowError with row, column, value and reason where the row gives no model or the model has no such number
   */
  derive(row: TableRow): CellValue[] {
    if (row.problem !== undefined) {
      const { column, value, reason } = row.problem;
      throw new DataRowError({ where: this.where, row: row.number, column, value, reason });
    }
    const givens = this.givens(row);
    let asked: string | undefined;
    try {
      const evaluation = new Evaluation(closeModel(compileModel(givens, this.where), { where: this.where }));
      const cells: CellValue[] = [];
      for (const { text, values, definition } of this.requests) {
        asked = text;
        if (this.options.errors) {
          const { value, error, notes } = evaluateQuantity(definition, evaluation, values);
          cells.push(roundDigits(value, this.options.digits), roundDigits(error, errorDigits));
          this.tell(text, row.number, notes);
        } else {
          const { value, notes } = computeWithNotes(definition, evaluation, values);
          cells.push(roundDigits(value, this.options.digits));
          this.tell(text, row.number, notes);
        }
      }
      return cells;
    } catch (error) {
      if (!(error instanceof CosmologyError)) throw error;
      throw rowFault(error, this.where, row, this.columnOfField, asked);
    }
  }

  /** The row's model cells as numbers and lists, for output that knows them; others as they are. */
  typedCells(row: TableRow): CellValue[] {
    const cells = [...row.cells];
    for (const { index, given } of this.plan.givens) {
      const cell = cells[index];
      if (typeof cell !== "string") continue;
      const parsed = valueOfCell(given, cell, false);
      // Text is never a table.
      if ("value" in parsed) cells[index] = parsed.value as CellValue;
    }
    return cells;
  }

  private tell(column: string, row: number, notes: readonly ValidityNote[]): void {
    for (const note of notes) this.onNote(column, row, note);
  }

  private givens(row: TableRow): ModelGivens {
    const typed = this.options.inputFormat === "jsonl" || this.options.inputFormat === "parquet";
    const values = new Map(this.options.fill);
    const seen = new Set<string>();
    const take = (given: Given, column: string, cell: CellValue): void => {
      const { name } = given;
      if (cell === undefined) return;
      const refuse = (reason: string, value?: CellValue, hint?: string): never => {
        throw new DataRowError({ where: this.where, row: row.number, column, value, reason, hint });
      };
      if (cell === null) {
        if (values.has(name)) return;
        refuse(
          `is empty, and it is part of the model as ${name}`,
          undefined,
          `fill it with --set ${name}=VALUE, or leave the column out`,
        );
      } else {
        const parsed = valueOfCell(given, cell, typed);
        if ("reason" in parsed) refuse(parsed.reason, cell);
        else {
          if (seen.has(name)) refuse(`gives ${name} a second time`, cell);
          seen.add(name);
          values.set(name, parsed.value);
        }
      }
    };
    for (const { index, column, given } of this.plan.givens) take(given, column, row.cells[index]);
    for (const { index, column } of this.plan.groups) {
      for (const [name, cell] of groupCells(row.cells[index])) {
        const given = name === undefined ? undefined : findGiven(`${column}.${name}`);
        if (given === undefined) {
          const inner = modelFields.map((field) => field.name).filter((each) => each.startsWith(`${column}.`));
          const reason = `must be an object with fields of ${inner.map((each) => each.slice(column.length + 1)).join(", ")}`;
          const value = name === undefined ? cell : name;
          throw new DataRowError({ where: this.where, row: row.number, column, value, reason });
        }
        take(given, given.name, cell);
      }
    }
    const givens = nestGivens(values);
    if (this.options.solveFor.length > 0) givens.solveFor = this.options.solveFor;
    if (this.options.solveNear.size > 0) givens.solveNear = Object.fromEntries(this.options.solveNear);
    return givens;
  }
}

/** The fields of a group's object; an entry without a name where the cell is none. */
function groupCells(cell: CellValue): [string | undefined, CellValue][] {
  if (cell === undefined) return [];
  if (cell === null || typeof cell !== "object" || Array.isArray(cell)) return [[undefined, cell]];
  return Object.entries(cell);
}
