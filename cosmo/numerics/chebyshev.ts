import { DomainError, NotConvergedError } from "../errors";

/** How finely `buildChebyshev` divides and fits. */
export interface ChebyshevOptions {
  /** Number of pieces of equal width, at least 1. */
  pieces: number;
  /** Degree of the polynomial in each piece, at least 2. */
  degree: number;
}

/**
 * Interpolates a function by Chebyshev polynomials, piece by piece.
 *
 * f(x) = sum_k a_k T_k(u), u = 2 (x - left) / width - 1 in each piece
 *
 * @param f - smooth function; it is called (degree + 1) times a piece, never at the ends of a piece, and a value that is
 *   not finite throws NotConvergedError with the x
 * @param lower - lower end, finite
 * @param upper - upper end, finite, above `lower`; other ends and bad options throw DomainError
 * @param options - number of pieces and degree
 * @returns the interpolant, with its error estimate; it accepts x in [lower, upper] only
 *
 * Method: interpolation at the roots of T_(degree+1); evaluation by Clenshaw's recurrence. The error is estimated from the
 * last coefficients, with the decay that they show; the pieces do not join exactly but within it.
 * Accuracy: near round-off (a few 1e-16 of the largest value) where the function is analytic and the degree suffices.
 * Source: Clenshaw 1955, Math. Tables Aids Comput. 9, 118; Trefethen 2013, Approximation Theory and Approximation
 * Practice, chapters 3 and 8.
 *
 * @example
 * const sine = buildChebyshev(Math.sin, 0, 6, { pieces: 4, degree: 14 });
 * sine.evaluate(1); // 0.8414709848078965
 */
export function buildChebyshev(
  f: (x: number) => number,
  lower: number,
  upper: number,
  options: ChebyshevOptions,
): PiecewiseChebyshev {
  const where = "buildChebyshev";
  const { pieces, degree } = options;
  if (!Number.isFinite(lower))
    throw new DomainError({ where, argument: "lower", rule: "must be finite", value: lower });
  if (!(Number.isFinite(upper) && upper > lower)) {
    throw new DomainError({
      where,
      argument: "upper",
      rule: `must be finite and above lower (${lower})`,
      value: upper,
    });
  }
  if (!(Number.isInteger(pieces) && pieces >= 1)) {
    throw new DomainError({ where, argument: "pieces", rule: "must be a positive integer", value: pieces });
  }
  if (!(Number.isInteger(degree) && degree >= 2)) {
    throw new DomainError({ where, argument: "degree", rule: "must be an integer of at least 2", value: degree });
  }
  const size = degree + 1;
  const coefficients = new Float64Array(pieces * size);
  const cosines = new Float64Array(size * size);
  for (let k = 0; k < size; k++) {
    for (let j = 0; j < size; j++) cosines[k * size + j] = Math.cos((Math.PI * k * (j + 0.5)) / size);
  }
  const values = new Float64Array(size);
  const width = (upper - lower) / pieces;
  let error = 0;
  for (let piece = 0; piece < pieces; piece++) {
    const middle = lower + (piece + 0.5) * width;
    let largest = 0;
    for (let j = 0; j < size; j++) {
      const x = middle + 0.5 * width * cosines[size + j];
      values[j] = f(x);
      if (!Number.isFinite(values[j])) {
        throw new NotConvergedError({ where, reason: `the function is ${values[j]} at x = ${x}`, value: x });
      }
      largest = Math.max(largest, Math.abs(values[j]));
    }
    const at = piece * size;
    for (let k = 0; k < size; k++) {
      let sum = 0;
      for (let j = 0; j < size; j++) sum += values[j] * cosines[k * size + j];
      coefficients[at + k] = ((k === 0 ? 1 : 2) / size) * sum;
    }
    error = Math.max(error, truncation(coefficients, at, degree) + (degree + 8) * Number.EPSILON * largest);
  }
  return new PiecewiseChebyshev(lower, upper, pieces, degree, coefficients, error);
}

/**
 * Error of the series cut at `degree`: a geometric tail that goes on as the last four coefficients fall. They are taken
 * two by two, since those of an even or odd function vanish in turn.
 */
function truncation(coefficients: Float64Array, at: number, degree: number): number {
  const size = (k: number) => (k < 0 ? Number.POSITIVE_INFINITY : Math.abs(coefficients[at + k]));
  const last = Math.max(size(degree), size(degree - 1));
  const before = Math.max(size(degree - 2), size(degree - 3));
  const ratio = Math.min(0.9, before > 0 ? last / before : 0);
  // Two coefficients fall by one ratio, and what is cut off is also folded back.
  return (4 * last * Math.max(ratio, 0.002)) / (1 - ratio);
}

/** A function as Chebyshev polynomials on pieces of equal width; made by `buildChebyshev`. */
export class PiecewiseChebyshev {
  /** Lower end of the domain. */
  readonly lower: number;
  /** Upper end of the domain. */
  readonly upper: number;
  /** Estimate of the absolute error of `evaluate`, the largest over the pieces. */
  readonly error: number;
  private readonly pieces: number;
  private readonly degree: number;
  private readonly coefficients: Float64Array;
  private readonly slopes: Float64Array;
  private readonly inverseWidth: number;

  constructor(lower: number, upper: number, pieces: number, degree: number, coefficients: Float64Array, error: number) {
    this.lower = lower;
    this.upper = upper;
    this.pieces = pieces;
    this.degree = degree;
    this.coefficients = coefficients;
    this.error = error;
    this.inverseWidth = pieces / (upper - lower);
    // d/du sum a_k T_k = sum b_k T_k with b_(k-1) = b_(k+1) + 2 k a_k, b_0 halved; du/dx = 2 / width.
    const size = degree + 1;
    this.slopes = new Float64Array(pieces * size);
    for (let at = 0; at < pieces * size; at += size) {
      for (let k = degree; k >= 1; k--) {
        const above = k + 1 <= degree ? this.slopes[at + k + 1] : 0;
        this.slopes[at + k - 1] = above + 4 * k * this.inverseWidth * coefficients[at + k];
      }
      this.slopes[at] *= 0.5;
    }
  }

  /** The function at x; x outside [lower, upper] throws DomainError. */
  evaluate(x: number): number {
    return this.sum(this.coefficients, x);
  }

  /** Its derivative at x; round-off grows with the square of the degree over the width of a piece. */
  derivative(x: number): number {
    return this.sum(this.slopes, x);
  }

  private sum(coefficients: Float64Array, x: number): number {
    if (!(x >= this.lower && x <= this.upper)) {
      throw new DomainError({
        where: "PiecewiseChebyshev",
        argument: "x",
        rule: `must lie between ${this.lower} and ${this.upper}`,
        value: x,
      });
    }
    const { degree } = this;
    const place = (x - this.lower) * this.inverseWidth;
    let piece = Math.floor(place);
    if (piece >= this.pieces) piece = this.pieces - 1;
    const twice = 4 * (place - piece) - 2;
    const at = piece * (degree + 1);
    let one = 0;
    let two = 0;
    for (let k = at + degree; k > at; k--) {
      const next = twice * one - two + coefficients[k];
      two = one;
      one = next;
    }
    return 0.5 * twice * one - two + coefficients[at];
  }
}
