import type { DarkEnergyTable, ModelGivens } from "../../../cosmo/model";
import { type CellValue, parseNumber } from "../../data";
import type { Given } from "./givenNames";

/** Values of givens by their flat names. */
export type FlatValues = ReadonlyMap<string, GivenValue>;

/** A number, a word or formula, a list, or a table of the equation of state. */
export type GivenValue = number | string | readonly number[] | DarkEnergyTable;

/** A given's value, or the clause that says why the cell holds none. */
export type FieldValue = { readonly value: GivenValue } | { readonly reason: string };

/** The value of a given as text writes it: a number, a list such as 0.06;0, a word, or a formula. */
export function valueOfText(given: Given, text: string): FieldValue {
  const trimmed = text.trim();
  if (given.kind === "choice" || given.kind === "equation") return { value: trimmed };
  if (given.kind === "table")
    return { reason: "must be an object with lists redshifts and values, as JSON lines hold it" };
  if (given.kind === "numberOrChoice" && /^[a-z]{4,}$/i.test(trimmed)) return { value: trimmed };
  if (given.kind !== "numberList") return parseNumber(trimmed);
  const numbers: number[] = [];
  for (const piece of trimmed.split(";")) {
    const parsed = parseNumber(piece);
    if ("reason" in parsed) return { reason: `each number of the list ${parsed.reason}` };
    numbers.push(parsed.value);
  }
  return { value: numbers };
}

/** The value of a given as a typed cell holds it: in JSON text is no number. */
export function valueOfCell(given: Given, cell: Exclude<CellValue, null | undefined>, typed: boolean): FieldValue {
  if (typeof cell === "string") {
    const parsed = valueOfText(given, cell);
    const word = "value" in parsed && typeof parsed.value === "string";
    const textual = word || given.kind === "numberList" || given.kind === "table";
    return typed && !textual ? { reason: "must be a number" } : parsed;
  }
  if (given.kind === "table" && typeof cell === "object") {
    // What is in it is checked where the model is.
    return { value: cell as unknown as DarkEnergyTable };
  }
  if (given.kind === "equation" || given.kind === "table") return { reason: given.field!.rule };
  if (typeof cell === "number") return finite(cell);
  if (Array.isArray(cell) && given.kind === "numberList") {
    if (!cell.every((each) => typeof each === "number")) return { reason: "must be a list of numbers" };
    const outside = cell.map(finite).find((each) => "reason" in each);
    return outside ?? { value: cell as number[] };
  }
  if (given.kind === "numberList") return { reason: "must be a list of numbers" };
  return { reason: given.kind === "choice" ? (given.field?.rule ?? "must be a word") : "must be a number" };
}

// JSON.parse makes 1e400 infinite.
function finite(value: number): FieldValue {
  return Number.isFinite(value) ? { value } : { reason: "is beyond the range of double precision" };
}

/** Flat values as a model object: "neutrinos.massSum" goes into `neutrinos`. */
export function nestGivens(values: FlatValues): ModelGivens {
  const givens: Record<string, unknown> = {};
  for (const [name, value] of values) {
    const point = name.indexOf(".");
    if (point < 0) givens[name] = value;
    else {
      const group = name.slice(0, point);
      givens[group] = { ...(givens[group] as object | undefined), [name.slice(point + 1)]: value };
    }
  }
  return givens as ModelGivens;
}
