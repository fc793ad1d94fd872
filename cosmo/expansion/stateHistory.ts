import { DomainError, NotConvergedError } from "../errors";
import type { ClosedDarkEnergy } from "../model";
import { buildCumulativeIntegral, type CumulativeIntegral, tableCurve } from "../numerics";
import type { Precision } from "../quantity";

/** ln(1+z) to which w is followed into the past, z = 1e8: earlier it is held. */
export const earliestFollowed = Math.log1p(1e8);

/** ln a to which w is followed into the future, a = 1000: later it is held. */
export const latestFollowed = Math.log(1000);

/** w as a function of a for a formula or a table; undefined for w0 and wa. */
export function stateFunction(
  darkEnergy: ClosedDarkEnergy,
  precision: Precision = "full",
): ((a: number) => number) | undefined {
  const { equation, table } = darkEnergy;
  if (equation !== undefined) {
    return equation.variable === "a" ? equation.evaluate : (a) => equation.evaluate(1 / a - 1);
  }
  if (table === undefined) return undefined;
  const scales = table.redshifts.map((z) => 1 / (1 + z)).reverse();
  const values = [...table.values].reverse();
  const curve = tableCurve(scales, values, "cubic");
  if (precision === "full") return curve;
  // The coarse evaluation adds to w what a table of half the points would change it by, everywhere upward: a bound that nothing
  // cancels in. Up to four points, what straight pieces would change.
  const last = scales.length - 1;
  const halved = (list: readonly number[]) => list.filter((_, i) => i === last || (i % 2 === 0 && i !== last - 1));
  const poorer =
    scales.length > 4 ? tableCurve(halved(scales), halved(values), "cubic") : tableCurve(scales, values, "linear");
  return (a) => curve(a) + Math.abs(curve(a) - poorer(a));
}

/**
 * Dark energy whose w follows a formula or a table: its density over today's, and w.
 *
 * f(a) = exp[3 int_a^1 (1 + w) d ln a]. w is followed from z = 1e8 to a = 1000 and held beyond.
 *
 * Method: cumulative Chebyshev integrals in ln a, adaptive, the future's only when it is asked for. Accuracy 1e-13 in ln f.
 * A formula without a finite value where it is asked: DomainError.
 */
export class StateHistory {
  private readonly w: (a: number) => number;
  private readonly past: CumulativeIntegral;
  private readonly early: number;
  private future: { readonly integral: CumulativeIntegral; readonly late: number } | undefined;
  private readonly knots: readonly number[];
  /** ln(1+z) where w has a kink or a jump: a table's redshifts, or what the integration of a formula met. */
  readonly kinks: readonly number[];
  private readonly field: string;

  constructor(darkEnergy: ClosedDarkEnergy, w: (a: number) => number) {
    this.field = darkEnergy.equation === undefined ? "darkEnergy.table" : "darkEnergy.equation";
    this.w = w;
    this.knots = darkEnergy.table?.redshifts.map((z) => Math.log1p(z)) ?? [];
    this.past = this.cumulate((t) => 1 + this.checked(Math.exp(-t)), earliestFollowed, this.knots);
    this.early = this.checked(Math.exp(-earliestFollowed));
    this.kinks = this.knots.length > 0 ? this.knots : this.past.roughPlaces();
  }

  /** w at scale factor a. */
  state(a: number): number {
    if (a > 1 && Math.log(a) > latestFollowed) return this.ahead().late;
    return a < Math.exp(-earliestFollowed) ? this.early : this.checked(a);
  }

  /** Relative error of f(a): three times that of the integral. */
  get relativeError(): number {
    return 3 * Math.max(this.past.error, this.future?.integral.error ?? 0);
  }

  /** w as a goes to 0. */
  get earlyState(): number {
    return this.early;
  }

  /** w as a goes to infinity. */
  get lateState(): number {
    return this.ahead().late;
  }

  /** f(a) a^4. */
  growthTerm(a: number): number {
    const s = Math.log(a);
    return Math.exp(4 * s + 3 * this.exponent(s));
  }

  /** int_s^0 (1 + w) ds', s = ln a. */
  private exponent(s: number): number {
    if (s <= 0) {
      if (-s <= earliestFollowed) return this.past.evaluate(-s);
      return this.past.evaluate(earliestFollowed) + (1 + this.early) * (-s - earliestFollowed);
    }
    const { integral, late } = this.ahead();
    if (s <= latestFollowed) return -integral.evaluate(s);
    return -integral.evaluate(latestFollowed) - (1 + late) * (s - latestFollowed);
  }

  private ahead(): { readonly integral: CumulativeIntegral; readonly late: number } {
    this.future ??= {
      integral: this.cumulate(
        (s) => 1 + this.checked(Math.exp(s)),
        latestFollowed,
        this.knots.map((knot) => -knot),
      ),
      late: this.checked(Math.exp(latestFollowed)),
    };
    return this.future;
  }

  private cumulate(f: (x: number) => number, end: number, breakpoints: readonly number[]): CumulativeIntegral {
    try {
      return buildCumulativeIntegral(f, 0, end, { breakpoints });
    } catch (failure) {
      if (!(failure instanceof NotConvergedError)) throw failure;
      throw new NotConvergedError({
        where: this.field,
        reason: `w changes too roughly to be integrated: ${failure.reason}`,
      });
    }
  }

  private checked(a: number): number {
    const value = this.w(a);
    if (!Number.isFinite(value)) throw noFiniteState(this.field, this.field, 1 / a - 1, value, undefined);
    return value;
  }
}

/** The refusal of a w without a finite value. */
export function noFiniteState(
  where: string,
  field: string,
  z: number,
  value: number,
  place: string | undefined,
): DomainError {
  const rule = `must give a finite number at every redshift that is asked for; at z = ${Number(z.toPrecision(6))} it does not`;
  return new DomainError({ where, argument: field, rule, value, place });
}
