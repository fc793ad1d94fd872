import { DomainError, NotConvergedError } from "../errors";

/** What `buildCumulativeIntegral` may be asked for. */
export interface CumulativeIntegralOptions {
  /** Absolute error allowed to each piece; 1e-15 unless given. Below the round-off of the piece, that counts. */
  tolerance?: number;
  /** Points inside the range where the integrand or a derivative jumps. */
  breakpoints?: readonly number[];
}

const DEGREE = 16;
const SIZE = DEGREE + 1;
const MAXIMUM_PIECES = 4000;
/** A piece this small, relative to the range, is taken as it is: what a jump inside it can do is below 1e-13 of the jump. */
const SMALLEST = 1e-13;

const angles = Array.from({ length: SIZE }, (_, j) => ((j + 0.5) * Math.PI) / SIZE);
const nodes = angles.map(Math.cos);
const cosines = Array.from({ length: SIZE }, (_, k) => angles.map((angle) => Math.cos(k * angle)));

/** The integral of a function from the lower end of a range to any point of it; made by `buildCumulativeIntegral`. */
export class CumulativeIntegral {
  constructor(
    /** Ends of the pieces, ascending: one more than there are pieces. */
    private readonly ends: Float64Array,
    /** The integral's Chebyshev coefficients, SIZE + 1 a piece, the constant counted from the lower end of the range. */
    private readonly coefficients: Float64Array,
    /** Estimate of the absolute error of `evaluate`, anywhere. */
    readonly error: number,
    /** Calls of the function. */
    readonly evaluations: number,
  ) {}

  get lower(): number {
    return this.ends[0]!;
  }

  get upper(): number {
    return this.ends[this.ends.length - 1]!;
  }

  /**
   * Where the integrand was found to be rough, a kink or a jump: the middle of the smallest piece in each group of neighboring
   * pieces below 1e-4 of the range.
   */
  roughPlaces(): number[] {
    const places: number[] = [];
    let smallest = Number.POSITIVE_INFINITY;
    for (let i = 1; i < this.ends.length; i++) {
      const width = this.ends[i]! - this.ends[i - 1]!;
      if (width > 1e-4 * (this.upper - this.lower)) {
        smallest = Number.POSITIVE_INFINITY;
      } else if (width < smallest) {
        if (smallest < Number.POSITIVE_INFINITY) places.pop();
        smallest = width;
        places.push((this.ends[i]! + this.ends[i - 1]!) / 2);
      }
    }
    return places;
  }

  /** int_lower^x f; x outside the range throws DomainError. */
  evaluate(x: number): number {
    if (!(x >= this.lower && x <= this.upper)) {
      const rule = `must lie between ${this.lower} and ${this.upper}`;
      throw new DomainError({ where: "CumulativeIntegral", argument: "x", rule, value: x });
    }
    let low = 0;
    let high = this.ends.length - 1;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (this.ends[middle]! <= x) low = middle;
      else high = middle;
    }
    const left = this.ends[low]!;
    const twice = (4 * (x - left)) / (this.ends[low + 1]! - left) - 2;
    const at = low * (SIZE + 1);
    let one = 0;
    let two = 0;
    for (let k = at + SIZE; k > at; k--) {
      const next = twice * one - two + this.coefficients[k]!;
      two = one;
      one = next;
    }
    return 0.5 * twice * one - two + this.coefficients[at]!;
  }
}

/**
 * Integrates a function from the lower end of a range to every point of it, adaptively.
 *
 * F(x) = int_lower^x f(t) dt.
 *
 * @param f integrand, called inside the range only; a value that is not finite throws NotConvergedError with the x
 * @param lower lower end, finite; @param upper upper end, finite, above `lower`; others throw DomainError
 * @returns the integral as Chebyshev polynomials piece by piece, with its error estimate
 *
 * Method: Chebyshev interpolation of degree 16 in each piece, integrated term by term; a piece whose last coefficients exceed the
 * tolerance is halved, down to 1e-13 of the range, where a jump of f is passed over. More than 4000 pieces: NotConvergedError.
 * Accuracy: near round-off for smooth f, and for f with jumps. Source: Clenshaw & Curtis 1960, Numer. Math. 2, 197.
 *
 * @example buildCumulativeIntegral(Math.cos, 0, 6).evaluate(1) // 0.8414709848078965
 */
export function buildCumulativeIntegral(
  f: (x: number) => number,
  lower: number,
  upper: number,
  options: CumulativeIntegralOptions = {},
): CumulativeIntegral {
  const where = "buildCumulativeIntegral";
  const { tolerance = 1e-15, breakpoints = [] } = options;
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
  const inside = [...new Set(breakpoints)].filter((x) => x > lower && x < upper).sort((a, b) => a - b);
  const edges = [lower, ...inside, upper];
  // Waiting pieces, the leftmost on top.
  const waiting = edges
    .slice(1)
    .map((right, i) => [edges[i]!, right] as const)
    .reverse();
  const ends = [lower];
  const coefficients: number[] = [];
  let total = 0;
  let error = 0;
  let evaluations = 0;
  for (let piece = waiting.pop(); piece !== undefined; piece = waiting.pop()) {
    const [left, right] = piece;
    const half = (right - left) / 2;
    const series = interpolate(f, left, half);
    evaluations += SIZE;
    const largest = Math.max(...series.map(Math.abs));
    const tail = Math.max(Math.abs(series[DEGREE]!), Math.abs(series[DEGREE - 1]!)) * half;
    const roundOff = 4 * Number.EPSILON * largest * half;
    const middle = left + half;
    const splittable = 2 * half > SMALLEST * (upper - lower) && middle > left && middle < right;
    if (tail > Math.max(tolerance, roundOff) && splittable) {
      if (ends.length + waiting.length >= MAXIMUM_PIECES) {
        throw new NotConvergedError({
          where,
          reason: `the function is too rough near x = ${left}: ${MAXIMUM_PIECES} pieces do not resolve it`,
          evaluations,
        });
      }
      waiting.push([middle, right], [left, middle]);
      continue;
    }
    error += Math.min(tail, 2 * half * largest) + roundOff;
    const integral = integrateSeries(series, half);
    // The integral vanishes at the left end of its piece; T_k(-1) = (-1)^k.
    let atLeft = 0;
    let atRight = 0;
    for (let k = 1; k <= SIZE; k++) {
      atLeft += k % 2 === 0 ? integral[k]! : -integral[k]!;
      atRight += integral[k]!;
    }
    integral[0] = total - atLeft;
    total += atRight - atLeft;
    coefficients.push(...integral);
    ends.push(right);
  }
  return new CumulativeIntegral(Float64Array.from(ends), Float64Array.from(coefficients), error, evaluations);
}

/** Chebyshev coefficients of f on [left, left + 2 half]. */
function interpolate(f: (x: number) => number, left: number, half: number): number[] {
  const values = nodes.map((node) => {
    const x = left + half * (1 + node);
    const y = f(x);
    if (!Number.isFinite(y)) {
      const reason = `the function is ${y} at x = ${x}`;
      throw new NotConvergedError({ where: "buildCumulativeIntegral", reason, value: x });
    }
    return y;
  });
  return cosines.map((row, k) => {
    const sum = row.reduce((partial, cosine, j) => partial + cosine * values[j]!, 0);
    return ((k === 0 ? 1 : 2) / SIZE) * sum;
  });
}

/** Coefficients of the integral: b_k = half (a_(k-1) - a_(k+1))/(2k), with a_0 counted twice; b_0 is left to the caller. */
function integrateSeries(series: readonly number[], half: number): number[] {
  const integral = [0];
  for (let k = 1; k <= SIZE; k++) {
    const before = k === 1 ? 2 * series[0]! : series[k - 1]!;
    const after = k + 1 <= DEGREE ? series[k + 1]! : 0;
    integral.push((half * (before - after)) / (2 * k));
  }
  return integral;
}
