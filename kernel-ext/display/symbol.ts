/**
 * Symbols and units as the trade writes them in plain text (`theta_*`, `Omega_m h^2`, `r_s`), set for reading: Greek
 * letters, and in HTML true subscripts and superscripts.
 */
import { superscript } from "./digits";
import { escapeHtml, visibleText } from "./escape";

const greek: Readonly<Record<string, string>> = {
  alpha: "\u03b1",
  beta: "\u03b2",
  gamma: "\u03b3",
  delta: "\u03b4",
  epsilon: "\u03b5",
  eta: "\u03b7",
  theta: "\u03b8",
  kappa: "\u03ba",
  lambda: "\u03bb",
  mu: "\u03bc",
  nu: "\u03bd",
  pi: "\u03c0",
  rho: "\u03c1",
  sigma: "\u03c3",
  tau: "\u03c4",
  phi: "\u03c6",
  chi: "\u03c7",
  omega: "\u03c9",
  Gamma: "\u0393",
  Delta: "\u0394",
  Theta: "\u0398",
  Lambda: "\u039b",
  Sigma: "\u03a3",
  Phi: "\u03a6",
  Omega: "\u03a9",
};

/**
 * A symbol or unit as one line of text: Greek letter names become letters, `^` with an integer a superscript;
 * subscripts stay as they are written, for there is no Unicode character for most of them.
 *
 * @example symbolText("100 theta_*") // "100 \u03b8_*"
 */
export function symbolText(symbol: string): string {
  return visibleText(symbol)
    .replace(/(?<![A-Za-z])[A-Za-z]+(?![A-Za-z])/g, (word) =>
      Object.hasOwn(greek, word) ? (greek[word] as string) : word,
    )
    .replace(/\^\{?(-?\d+)\}?/g, (_, exponent: string) => superscript(Number(exponent)));
}

/**
 * The same as HTML, with `_x`, `_{...}` as subscript and `^x`, `^{...}` as superscript; everything else is escaped.
 *
 * @example symbolHtml("theta_*") // "\u03b8<sub>*</sub>"
 */
export function symbolHtml(symbol: string): string {
  return escapeHtml(symbolText(symbol)).replace(
    /([_^])(?:\{([^{}]*)\}|(\*|[\p{L}\p{N},]+))/gu,
    (_, kind: string, group: string | undefined, run: string | undefined) => {
      const tag = kind === "_" ? "sub" : "sup";
      return `<${tag}>${group ?? run ?? ""}</${tag}>`;
    },
  );
}

/** A label with symbol and unit on one line: `sound horizon r_s [Mpc]`. */
export function quantityText(label: string, symbol?: string, unit?: string): string {
  const parts = [visibleText(label)];
  if (symbol !== undefined && symbol !== "") parts.push(symbolText(symbol));
  if (unit !== undefined && unit !== "") parts.push(`[${symbolText(unit)}]`);
  return parts.filter((part) => part !== "").join(" ");
}
