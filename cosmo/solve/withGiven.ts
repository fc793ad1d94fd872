import type { ModelGivens } from "../model";

/** The number that a model states under a flat name ("hubble", "darkEnergy.w0"); undefined where it states none. */
export function givenNumber(givens: ModelGivens, name: string): number | undefined {
  const value = name
    .split(".")
    .reduce<unknown>((inner, key) => (inner as Record<string, unknown> | undefined)?.[key], givens);
  return typeof value === "number" ? value : undefined;
}

/** A copy of the model with one number changed or added, by its flat name. */
export function withGiven(givens: ModelGivens, name: string, value: number): ModelGivens {
  const [group, inner] = name.split(".") as [string, string | undefined];
  if (inner === undefined) return { ...givens, [name]: value };
  const before = (givens as Record<string, object | undefined>)[group];
  return { ...givens, [group]: { ...before, [inner]: value } };
}

/** All numbers that a model states, by flat name. */
export function givenNumbers(givens: ModelGivens): Map<string, number> {
  const numbers = new Map<string, number>();
  for (const [key, value] of Object.entries(givens)) {
    if (typeof value === "number") numbers.set(key, value);
    if (["darkEnergy", "neutrinos"].includes(key) && typeof value === "object" && value !== null) {
      for (const [inner, number] of Object.entries(value))
        if (typeof number === "number") numbers.set(`${key}.${inner}`, number);
    }
  }
  return numbers;
}
