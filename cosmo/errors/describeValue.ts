/**
 * The value that came, as it stands in an error text: short, on one line, strings quoted.
 *
 * @example describeValue("67") // '"67"'
 */
export function describeValue(value: unknown): string {
  if (typeof value === "string") {
    const shown = value.length > 60 ? `${value.slice(0, 57)}...` : value;
    return JSON.stringify(shown);
  }
  if (typeof value === "number" || typeof value === "boolean" || value === null || value === undefined) {
    return Object.is(value, -0) ? "-0" : String(value);
  }
  if (typeof value === "bigint") return `${value}n`;
  if (typeof value === "function") return "a function";
  if (typeof value === "symbol") return "a symbol";
  if (Array.isArray(value) || ArrayBuffer.isView(value)) {
    const list = Array.from(value as ArrayLike<unknown>);
    const shown = list.slice(0, 4).map(describeValue).join(", ");
    return list.length > 4 ? `[${shown}, ... ${list.length} values]` : `[${shown}]`;
  }
  const keys = Object.keys(value);
  return `an object with ${keys.length === 0 ? "no fields" : `fields ${keys.slice(0, 6).join(", ")}`}`;
}
