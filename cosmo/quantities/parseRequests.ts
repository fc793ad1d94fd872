import { DomainError } from "../errors";
import { checkArguments } from "../quantity";
import { findQuantity } from "./register";

/** One quantity that was asked for as text. */
export interface QuantityRequest {
  readonly name: string;
  readonly arguments: readonly number[];
  /** The request as a column's name: "luminosityDistance(1.1)". */
  readonly text: string;
}

/**
 * Quantities asked for as text: names of the register, arguments in parentheses, separated by commas.
 *
 * Commas and semicolons inside parentheses separate arguments. Every name, number and domain is checked here, before anything
 * is computed. Empty text gives an empty list; an unknown name throws UnknownNameError with the one that was meant, anything
 * else DomainError.
 *
 * @param text what was asked; @param where who asked, for the texts of errors.
 * @example parseRequests("age, transverseDistance(0.5, 1.2)")[1] // { name: "transverseDistance", arguments: [0.5, 1.2], ... }
 */
export function parseRequests(text: string, where = "quantities"): QuantityRequest[] {
  if (typeof text !== "string") {
    throw new DomainError({ where, argument: "request", rule: "must be text", value: text });
  }
  if (text.trim() === "") return [];
  return splitOutside(text, where).map((item) => parseRequest(item, where));
}

/**
 * One quantity asked for as text, checked; see {@link parseRequests}.
 *
 * @example parseRequest("luminosityDistance(1.1)").arguments // [1.1]
 */
export function parseRequest(text: string, where = "quantities"): QuantityRequest {
  const trimmed = text.trim();
  const match = /^([^()]*?)\s*(?:\(([^()]*)\))?$/.exec(trimmed);
  const name = match?.[1] ?? "";
  if (match === null || name === "") {
    const rule = 'must look like age, luminosityDistance(1.1) or comovingDistance(0.5, 1), separated by ","';
    throw new DomainError({ where, argument: "request", rule, value: trimmed });
  }
  const definition = findQuantity(name, where);
  const inside = match[2]?.trim() ?? "";
  const pieces = inside === "" ? [] : inside.split(/[,;]/).map((piece) => piece.trim());
  const values = pieces.map((piece) => {
    const value = Number(piece);
    if (piece === "" || !Number.isFinite(value)) {
      throw new DomainError({ where, argument: `argument of ${name}`, rule: "must be a number", value: piece });
    }
    return value;
  });
  checkArguments(definition, values);
  return { name, arguments: values, text: pieces.length === 0 ? name : `${name}(${pieces.join(",")})` };
}

/** Splits at commas and semicolons outside parentheses. */
function splitOutside(text: string, where: string): string[] {
  const items: string[] = [];
  let depth = 0;
  let start = 0;
  for (let i = 0; i < text.length; i++) {
    const character = text[i];
    if (character === "(") depth++;
    if (character === ")") depth--;
    if (depth < 0 || depth > 1) break;
    if ((character === "," || character === ";") && depth === 0) {
      items.push(text.slice(start, i));
      start = i + 1;
    }
  }
  if (depth !== 0) {
    throw new DomainError({ where, argument: "request", rule: "must close every parenthesis once", value: text });
  }
  items.push(text.slice(start));
  return items;
}
