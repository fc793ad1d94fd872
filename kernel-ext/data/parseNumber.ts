/** A number, or the clause that says why the text is none. */
export type ParsedNumber = { readonly value: number } | { readonly reason: string };

const plainNumber = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;
const zeroMantissa = /^[+-]?[0.]+(?:[eE]|$)/;

/**
 * Reads a number strictly: decimal digits with a point and an exponent, blanks around it allowed, nothing else.
 *
 * Refused, with the reason: empty text, "NaN" and infinities, "12abc", "1,5", "0x10", "1_000", and what no double can hold
 * ("1e400"; "1e-400", which would become 0).
 *
 * @example parseNumber("2.5e-3") // { value: 0.0025 }
 * @example parseNumber("1e400") // { reason: "is beyond the range of double precision" }
 */
export function parseNumber(text: string): ParsedNumber {
  const trimmed = text.trim();
  if (trimmed === "") return { reason: "must be a number, and it is empty" };
  if (!plainNumber.test(trimmed)) {
    const notFinite = /^[+-]?(?:nan|inf|infinity)$/i.test(trimmed);
    return { reason: notFinite ? "must be a finite number" : "must be a number such as 67.4 or 2.2e-2" };
  }
  const value = Number(trimmed);
  if (!Number.isFinite(value) || (value === 0 && !zeroMantissa.test(trimmed))) {
    return { reason: "is beyond the range of double precision" };
  }
  return { value };
}
