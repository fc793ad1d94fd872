import { DomainError } from "../../cosmo/errors";

/** Redshifts as a cell takes them: an array, a typed array, or a column of a table. */
export type RedshiftList = ArrayLike<number> | Iterable<number>;

/**
 * Checks a list of redshifts and copies it.
 *
 * Throws DomainError naming the place of the first bad one: `distanceCell: redshifts must be finite and above -1, got NaN (entry 4)`.
 *
 * @param lowest redshifts must be above this; @param where the cell helper that asks.
 */
export function redshiftList(list: unknown, where: string, lowest = -1): Float64Array {
  const rule = lowest === -1 ? "must be finite and above -1" : `must be finite and above ${lowest}`;
  const isList =
    typeof list === "object" && list !== null && ("length" in list || Symbol.iterator in (list as Iterable<unknown>));
  if (!isList) {
    throw new DomainError({
      where,
      argument: "redshifts",
      rule: "must be a list of numbers such as [0.3, 0.5, 1.1]",
      value: list,
    });
  }
  const entries = Array.from(list as ArrayLike<unknown>);
  if (entries.length === 0) {
    throw new DomainError({ where, argument: "redshifts", rule: "must not be empty", value: entries });
  }
  return Float64Array.from(entries, (entry, index) => {
    if (typeof entry !== "number" || !(entry > lowest) || !Number.isFinite(entry)) {
      const kind = typeof entry === "number" ? rule : "must be numbers";
      throw new DomainError({ where, argument: "redshifts", rule: kind, value: entry, place: `entry ${index + 1}` });
    }
    return entry;
  });
}

/** Evenly spaced numbers, ends included; on request evenly in ln(1+z). */
export function spacedRedshifts(
  from: number,
  to: number,
  count: number,
  spacing: "linear" | "onePlusRedshift",
): number[] {
  const lower = spacing === "linear" ? from : Math.log1p(from);
  const upper = spacing === "linear" ? to : Math.log1p(to);
  return Array.from({ length: count }, (_, i) => {
    const at = lower + ((upper - lower) * i) / (count - 1);
    if (i === 0) return from;
    if (i === count - 1) return to;
    return spacing === "linear" ? at : Math.expm1(at);
  });
}
