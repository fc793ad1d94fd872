import { DomainError } from "../errors";

/** (z) stands for (0, z). */
export function redshiftPair(values: readonly number[]): [number, number] {
  return values.length === 2 ? [values[0]!, values[1]!] : [0, values[0]!];
}

/** Refuses a pair in which what is looked at, z2, is not behind the observer, z1. */
export function requireOrder(from: number, to: number, where: string): void {
  if (!(to >= from)) {
    throw new DomainError({
      where,
      argument: "redshift z2",
      rule: `must be at or above z1 = ${from}, the observer's redshift`,
      value: to,
    });
  }
}

/** Refuses a redshift below 0 where something is looked at from today. */
export function requireNotNegative(z: number, where: string): void {
  if (!(z >= 0))
    throw new DomainError({ where, argument: "redshift", rule: "must be finite and not negative", value: z });
}
