import { DomainError, UnknownNameError } from "../errors";
import { checkEquation, checkTable } from "./darkEnergyFunction";
import { type ModelField, modelFieldByName, modelFields } from "./fields";

/**
 * A given in flat form: the field's dotted name and what came. An equation of state stands there by its text, a table by its number
 * of entries: the objects themselves are in the givens.
 */
export type FlatGivens = ReadonlyMap<string, number | string | readonly number[]>;

const groups = new Set(
  modelFields.filter((field) => field.name.includes(".")).map((field) => field.name.split(".")[0]!),
);

/**
 * Checks a model object field by field and returns it flat; nothing is closed yet.
 *
 * Throws {@link UnknownNameError} for a field that is not in the vocabulary, with the name that was probably meant, and
 * {@link DomainError} for a value of the wrong kind or outside its rule. `undefined` counts as not given.
 *
 * @param derived names of derived quantities that may stand in for fields; any finite number is taken.
 */
export function validateGivens(
  givens: unknown,
  where: string,
  place?: string,
  derived: ReadonlySet<string> = new Set(),
): FlatGivens {
  if (typeof givens !== "object" || givens === null || Array.isArray(givens)) {
    throw new DomainError({
      where,
      argument: "model",
      rule: "must be an object such as { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }",
      value: givens,
      place,
    });
  }
  const flat = new Map<string, number | string | readonly number[]>();
  for (const [key, value] of Object.entries(givens)) {
    if (value === undefined) continue;
    if (groups.has(key)) {
      if (typeof value !== "object" || value === null || Array.isArray(value)) {
        throw new DomainError({ where, argument: key, rule: `must be an object with ${fieldsOf(key)}`, value, place });
      }
      for (const [inner, innerValue] of Object.entries(value)) {
        if (innerValue !== undefined) take(flat, `${key}.${inner}`, innerValue, where, place);
      }
    } else if (derived.has(key) && !modelFieldByName.has(key)) {
      if (typeof value !== "number" || !Number.isFinite(value)) {
        throw new DomainError({ where, argument: key, rule: "must be a finite number", value, place });
      }
      flat.set(key, value);
    } else {
      take(flat, key, value, where, place, derived);
    }
  }
  return flat;
}

function fieldsOf(group: string): string {
  const names = modelFields.filter((field) => field.name.startsWith(`${group}.`));
  return names.map((field) => field.name.slice(group.length + 1)).join(", ");
}

function take(
  flat: Map<string, number | string | readonly number[]>,
  name: string,
  value: unknown,
  where: string,
  place: string | undefined,
  derived: ReadonlySet<string> = new Set(),
): void {
  const field = modelFieldByName.get(name);
  if (field === undefined || groups.has(name)) {
    const known = [...modelFields.map((each) => each.name), ...derived];
    throw new UnknownNameError({ where, kind: "parameter", given: name, known, place });
  }
  flat.set(name, checkedValue(field, value, where, place));
}

function checkedValue(
  field: ModelField,
  value: unknown,
  where: string,
  place: string | undefined,
): number | string | readonly number[] {
  const refuse = (rule: string): never => {
    throw new DomainError({ where, argument: field.name, rule, value, place });
  };
  if (field.kind === "equation") return checkEquation(value, where, place).text;
  if (field.kind === "table") return `${checkTable(value, where, place).redshifts.length} entries`;
  if (field.kind === "numberList") {
    if (!Array.isArray(value) || value.length > 3) return refuse(field.rule);
    if (!value.every((each) => typeof each === "number" && field.accepts(each))) return refuse(field.rule);
    return [...(value as number[])];
  }
  if (typeof value === "string" && field.choices !== undefined) {
    if (field.choices.includes(value)) return value;
    if (field.kind === "numberOrChoice") return refuse(field.rule);
    throw new UnknownNameError({ where, kind: `value of ${field.name}`, given: value, known: field.choices, place });
  }
  if (field.kind === "choice") return refuse(field.rule);
  if (typeof value !== "number") return refuse("must be a number");
  if (!field.accepts(value)) return refuse(field.rule);
  return value;
}
