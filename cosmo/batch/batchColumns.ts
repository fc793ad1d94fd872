import { DomainError, UnknownNameError } from "../errors";
import { type DarkEnergyGivens, type ModelGivens, modelFieldByName, modelFields, validateGivens } from "../model";

/** Values of one field for all rows: a column, or one number for all; for `neutrinos.masses` a list of up to three of them. */
export type BatchColumn = Float64Array | number | readonly (Float64Array | number)[];

/** Columns by field name of the vocabulary ("hubble", "darkEnergy.w0"). Rows are counted from 0 in every column. */
export type BatchColumns = Readonly<Record<string, BatchColumn>>;

/** One number a row: from a column, or the same for all. */
export interface Slot {
  readonly column: Float64Array | undefined;
  readonly constant: number;
}

/** The value of a slot in a row. */
export function slotValue(slot: Slot, row: number): number {
  return slot.column === undefined ? slot.constant : slot.column[row];
}

/** Columns and what all rows share, joined and checked for structure; not for values, which are a row's own affair. */
export interface BoundColumns {
  /** Fields with one number a row, by flat name. */
  readonly numbers: ReadonlyMap<string, Slot>;
  /** `neutrinos.masses`, where given. */
  readonly masses: readonly Slot[] | undefined;
  /** Fields given by a word for all rows. */
  readonly words: ReadonlyMap<string, string>;
  /** Dark energy by a formula or a table, shared by all rows: for the single path, the engine does not march it. */
  readonly darkEnergy: Pick<DarkEnergyGivens, "equation" | "table">;
}

const where = "batch";

function slotOf(name: string, value: Float64Array | number): Slot {
  if (value instanceof Float64Array) return { column: value, constant: Number.NaN };
  if (typeof value === "number") return { column: undefined, constant: value };
  throw new DomainError({ where, argument: name, rule: "must be a Float64Array or a number", value });
}

/**
 * Joins columns with shared givens; a column takes the place of a shared given of the same field.
 *
 * An unknown field throws UnknownNameError with the one that was meant; a column that is too short or no column DomainError.
 */
export function bindColumns(columns: BatchColumns, shared: ModelGivens, to: number): BoundColumns {
  const numbers = new Map<string, Slot>();
  const words = new Map<string, string>();
  let masses: Slot[] | undefined;
  for (const [name, value] of validateGivens(shared, where)) {
    if (typeof value === "number") numbers.set(name, slotOf(name, value));
    else if (typeof value === "string") words.set(name, value);
    else masses = value.map((each) => slotOf(name, each));
  }
  for (const [name, value] of Object.entries(columns)) {
    const field = modelFieldByName.get(name);
    if (field === undefined) {
      throw new UnknownNameError({
        where,
        kind: "parameter",
        given: name,
        known: modelFields.map((each) => each.name),
      });
    }
    if (field.kind === "choice") {
      throw new DomainError({ where, argument: name, rule: "is one word for all rows: give it under shared", value });
    }
    if (field.kind === "numberList") {
      const list = Array.isArray(value) ? value : [value];
      if (list.length > 3) throw new DomainError({ where, argument: name, rule: field.rule, value: list.length });
      masses = list.map((each) => slotOf(name, each));
    } else {
      numbers.set(name, slotOf(name, value as Float64Array | number));
      words.delete(name);
    }
  }
  for (const [name, slot] of [...numbers, ...(masses ?? []).map((slot) => ["neutrinos.masses", slot] as const)]) {
    if (slot.column !== undefined && slot.column.length < to) {
      throw new DomainError({ where, argument: name, rule: `must have ${to} rows`, value: slot.column.length });
    }
  }
  // Formulas and tables are objects; the flat givens hold only their names.
  const { equation, table } = shared.darkEnergy ?? {};
  const darkEnergy = { ...(equation === undefined ? {} : { equation }), ...(table === undefined ? {} : { table }) };
  for (const name of Object.keys(darkEnergy)) {
    numbers.delete(`darkEnergy.${name}`);
    words.delete(`darkEnergy.${name}`);
  }
  return { numbers, masses, words, darkEnergy };
}

/** The givens of one row as a model object, for the single path. */
export function givensOfRow(bound: BoundColumns, row: number): ModelGivens {
  const givens: Record<string, unknown> =
    Object.keys(bound.darkEnergy).length > 0 ? { darkEnergy: bound.darkEnergy } : {};
  const put = (name: string, value: unknown) => {
    const [group, inner] = name.split(".");
    if (inner === undefined) givens[name] = value;
    else givens[group] = { ...(givens[group] as object | undefined), [inner]: value };
  };
  for (const [name, word] of bound.words) put(name, word);
  for (const [name, slot] of bound.numbers) put(name, slotValue(slot, row));
  if (bound.masses !== undefined) {
    put(
      "neutrinos.masses",
      bound.masses.map((slot) => slotValue(slot, row)),
    );
  }
  return givens as ModelGivens;
}
