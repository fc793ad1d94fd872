import type { ModelField } from "../../../cosmo/model";
import { modelFieldByName } from "../../../cosmo/model";
import { quantityRegister } from "../../../cosmo/quantities";

/** What a model can be given: a field of its own, or a derived number that stands in place of one. */
export interface Given {
  readonly name: string;
  readonly kind: ModelField["kind"];
  /** Undefined for a derived number. */
  readonly field: ModelField | undefined;
}

/** A given by its name in the vocabulary. */
export function findGiven(name: string): Given | undefined {
  const field = modelFieldByName.get(name);
  if (field !== undefined) return { name, kind: field.kind, field };
  return isDerived(name) ? { name, kind: "number", field: undefined } : undefined;
}

/** Whether a name is that of a derived number of the whole model, such as age or acousticAngle, and of no field. */
export function isDerived(name: string): boolean {
  return !modelFieldByName.has(name) && quantityRegister.get(name)?.arguments.length === 0;
}

/** The names of all givens, fields first. */
export const givenNames: readonly string[] = [
  ...modelFieldByName.keys(),
  ...[...quantityRegister.keys()].filter(isDerived),
];
