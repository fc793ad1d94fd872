import type { ModelField, ModelGivens } from "../../../cosmo/model";
import { type CellValue, parseNumber } from "../../data";

/** Values of fields by their flat names. */
export type FlatValues = ReadonlyMap<string, number | string | readonly number[]>;

/** A field's value, or the clause that says why the cell holds none. */
export type FieldValue = { readonly value: number | string | readonly number[] } | { readonly reason: string };

/** The value of a field as text writes it: a number, a list such as 0.06;0, or a word. */
export function valueOfText(field: ModelField, text: string): FieldValue {
  const trimmed = text.trim();
  if (field.kind === "choice") return { value: trimmed };
  if (field.kind === "numberOrChoice" && /^[a-z]{4,}$/i.test(trimmed)) return { value: trimmed };
  if (field.kind !== "numberList") return parseNumber(trimmed);
  const numbers: number[] = [];
  for (const piece of trimmed.split(";")) {
    const parsed = parseNumber(piece);
    if ("reason" in parsed) return { reason: `each number of the list ${parsed.reason}` };
    numbers.push(parsed.value);
  }
  return { value: numbers };
}

/** The value of a field as a typed cell holds it: in JSON text is no number. */
export function valueOfCell(field: ModelField, cell: Exclude<CellValue, null | undefined>, typed: boolean): FieldValue {
  if (typeof cell === "string") {
    if (typed && field.kind === "number") return { reason: "must be a number" };
    return valueOfText(field, cell);
  }
  if (typeof cell === "number") return finite(cell);
  if (Array.isArray(cell) && field.kind === "numberList") {
    if (!cell.every((each) => typeof each === "number")) return { reason: "must be a list of numbers" };
    const outside = cell.map(finite).find((each) => "reason" in each);
    return outside ?? { value: cell as number[] };
  }
  if (field.kind === "numberList") return { reason: "must be a list of numbers" };
  return { reason: field.kind === "choice" ? field.rule : "must be a number" };
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
