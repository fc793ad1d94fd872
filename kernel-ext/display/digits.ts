/**
 * Numbers as a table shows them: significant digits that are asked for and no more, a true minus sign, groups of three
 * in long integer parts, powers of ten where zeros would pretend to precision.
 */

/** What stands where a value is missing. */
export const missingMark = "\u2014";

const minus = "\u2212";
const groupSpace = "\u202f";
const superscripts = "\u2070\u00b9\u00b2\u00b3\u2074\u2075\u2076\u2077\u2078\u2079";

/** How a number is written. */
export interface NumberFormat {
  /**
   * Significant digits, 1 to 17, kept also when they are zeros; `"all"` gives the fewest digits that read back as the
   * same number (for givens). Without it: at most six, closing zeros left out.
   */
  digits?: number | "all";
}

/** An exponent in superscript characters: -12 becomes \u207b\u00b9\u00b2. */
export function superscript(exponent: number): string {
  const digits = [...String(Math.abs(exponent))].map((digit) => superscripts[Number(digit)]).join("");
  return exponent < 0 ? `\u207b${digits}` : digits;
}

/** Plain decimal text with a true minus and a narrow space between thousands from five digits on. */
function dress(plain: string): string {
  const negative = plain.startsWith("-");
  const [whole, fraction] = (negative ? plain.slice(1) : plain).split(".") as [string, string?];
  const grouped = whole.length < 5 ? whole : whole.replace(/\B(?=(\d{3})+$)/g, groupSpace);
  return `${negative ? minus : ""}${grouped}${fraction === undefined ? "" : `.${fraction}`}`;
}

function checkDigits(digits: number): void {
  if (!(Number.isInteger(digits) && digits >= 1 && digits <= 17)) {
    throw new RangeError(`formatNumber: digits must be a whole number from 1 to 17, got ${String(digits)}`);
  }
}

function checkNumber(caller: string, name: string, value: number): void {
  if (typeof value !== "number" || Number.isNaN(value)) {
    throw new RangeError(`${caller}: ${name} must be a number, got ${String(value)}`);
  }
}

/**
 * A number for a table.
 *
 * Written plainly from 1e-4 up to as many integer digits as there are significant digits, otherwise as a power of ten,
 * so that no zero pretends to be known: 13869 at three digits is 1.39\u00d710\u2074.
 *
 * @param value any number; infinite ones are written as \u221e; NaN throws
 * @param format how many digits, see {@link NumberFormat}
 * @returns text with Unicode minus, narrow no-break space (U+202F) between thousands
 * @throws RangeError for NaN and for digits outside 1 to 17
 * @example formatNumber(-1.2345e-7, { digits: 3 }) // "\u22121.23\u00d710\u207b\u2077"
 */
export function formatNumber(value: number, format: NumberFormat = {}): string {
  checkNumber("formatNumber", "value", value);
  const { digits } = format;
  if (typeof digits === "number") checkDigits(digits);
  if (!Number.isFinite(value)) return value < 0 ? `${minus}\u221e` : "\u221e";
  if (value === 0) return "0";
  const keepsZeros = typeof digits === "number";
  let scientific =
    digits === "all" ? value.toExponential() : value.toExponential((keepsZeros ? (digits as number) : 6) - 1);
  if (!keepsZeros) scientific = scientific.replace(/\.?0+e/, "e");
  const [mantissa, power] = scientific.split("e") as [string, string];
  const exponent = Number(power);
  const significant = mantissa.replace(/[-.]/g, "").length;
  const most = keepsZeros ? significant - 1 : digits === "all" ? 15 : 5;
  if (exponent < -4 || exponent > most) return `${dress(mantissa)}\u00d710${superscript(exponent)}`;
  return dress(plainDecimal(mantissa, exponent));
}

/** Moves the decimal point of a mantissa, as text, so that no digit is rounded a second time. */
function plainDecimal(mantissa: string, exponent: number): string {
  const negative = mantissa.startsWith("-") ? "-" : "";
  const all = mantissa.replace(/[-.]/g, "");
  if (exponent < 0) return `${negative}0.${"0".repeat(-exponent - 1)}${all}`;
  if (all.length <= exponent + 1) return negative + all.padEnd(exponent + 1, "0");
  return `${negative}${all.slice(0, exponent + 1)}.${all.slice(exponent + 1)}`;
}

/**
 * A value with its standard error, rounded to two significant digits of the error.
 *
 * @param value finite
 * @param error finite, not negative; 0 means exact, and then only the value is written
 * @returns `1089.92 \u00b1 0.25`, or `(1.234 \u00b1 0.012)\u00d710\u207b\u2075` where the plain form would need many zeros
 * @throws RangeError when value or error is not finite, or the error is negative
 * @example formatWithError(1089.9234, 0.2531) // "1089.92 \u00b1 0.25"
 */
export function formatWithError(value: number, error: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`formatWithError: value must be finite, got ${String(value)}`);
  if (!(error >= 0 && error < Number.POSITIVE_INFINITY)) {
    throw new RangeError(`formatWithError: error must be finite and not negative, got ${String(error)}`);
  }
  if (error === 0) return formatNumber(value, { digits: "all" });
  const errorExponent = Number(error.toExponential(1).split("e")[1]);
  const valueExponent = value === 0 ? errorExponent : Number(value.toExponential(15).split("e")[1]);
  const top = Math.max(errorExponent, valueExponent);
  if (top < -4 || errorExponent > 4 || top > 15) {
    const decimals = Math.max(0, Math.min(100, top - errorExponent + 1));
    return `(${scaled(value, top, decimals)} \u00b1 ${scaled(error, top, decimals)})\u00d710${superscript(top)}`;
  }
  const decimals = 1 - errorExponent;
  return `${rounded(value, decimals)} \u00b1 ${rounded(error, decimals)}`;
}

/** value / 10^power with so many decimals, the division done on the decimal text. */
function scaled(value: number, power: number, decimals: number): string {
  const [mantissa, exponent] = value.toExponential(16).split("e") as [string, string];
  return dress(withoutMinusZero(Number(`${mantissa}e${Number(exponent) - power}`).toFixed(decimals)));
}

/** Rounded to so many decimals; a negative count rounds to tens, hundreds and so on. */
function rounded(value: number, decimals: number): string {
  if (decimals >= 0) return dress(withoutMinusZero(value.toFixed(Math.min(100, decimals))));
  const unit = 10 ** -decimals;
  return dress(withoutMinusZero((Math.round(value / unit) * unit).toFixed(0)));
}

function withoutMinusZero(plain: string): string {
  return /^-[0.]*$/.test(plain) ? plain.slice(1) : plain;
}

/** A number as text, cut at its decimal point for alignment. */
export interface AlignedNumber {
  text: string;
  /** How many characters are missing on the left to reach the widest integer part of the column. */
  before: number;
  /** How many are missing on the right to reach the widest remainder, the point counted. */
  after: number;
}

/**
 * Lines up the decimal points of a column of formatted numbers.
 *
 * The first decimal point counts; text without one is treated as ending before its point.
 *
 * @param column formatted numbers; the missing mark lines up with the last integer digit
 * @returns for each text how much it must be filled up before and after, in characters
 */
export function alignOnPoint(column: readonly string[]): AlignedNumber[] {
  const parts = column.map((text) => {
    const point = text.search(/\.|\u00d7| \u00b1/);
    const whole = point < 0 ? text.length : point;
    return { text, whole, rest: text.length - whole };
  });
  const whole = Math.max(0, ...parts.map((part) => part.whole));
  const rest = Math.max(0, ...parts.map((part) => part.rest));
  return parts.map((part) => ({ text: part.text, before: whole - part.whole, after: rest - part.rest }));
}
