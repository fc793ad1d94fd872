import type { PrintedNumber } from "../../cosmo/published";

/** Half a unit of the last printed digit: "147.09" is known to 0.005. */
export function halfUnit(printed: PrintedNumber): number {
  const point = printed.digits.indexOf(".");
  const places = point < 0 ? 0 : printed.digits.length - point - 1;
  return 0.5 * 10 ** -places;
}
