import { DomainError, NoAnswerError } from "../errors";
import { findMinimum, findRoot } from "../numerics";
import type { Computed, QuantityArgument } from "../quantity";

/** Which answer is meant where there are two: nearer or farther than the extremum that separates them. */
export type Branch = "near" | "far";

/** A number as a function of s = ln(1+z), known at nodes and computable between them. */
export interface RedshiftCurve {
  /** The quantity that asks. */
  readonly where: string;
  /** What the curve is, in words: "angular-diameter distance". */
  readonly subject: string;
  readonly unit: string;
  /** ln(1+z), ascending, and the curve there: both ends are enough where the curve only rises or only falls. */
  readonly nodes: Float64Array;
  readonly values: Float64Array;
  /** The curve at any s between the first and the last node. */
  readonly at: (s: number) => number;
}

/** A stretch of a curve on which it only rises or only falls. */
interface Stretch {
  readonly from: number;
  readonly to: number;
  readonly fromValue: number;
  readonly toValue: number;
}

/**
 * Redshift at which a curve takes a value.
 *
 * @param value what is asked for; @param branch `near` is the stretch from the first node to the first extremum, `far` the one after it.
 * Without a branch there must be one answer. No answer, or two without a branch: NoAnswerError, with the answers.
 * Method: the nodes show the stretches; extrema by golden section and parabolas; the answer by Brent's method. Accuracy: that of
 * the curve over its slope in ln(1+z), so it is lost at an extremum.
 */
export function solveRedshift(curve: RedshiftCurve, value: number, branch?: Branch): Computed {
  const { where, subject, unit } = curve;
  const stretches = stretchesOf(curve);
  const text = `${value}${unit === "" ? "" : ` ${unit}`}`;
  if (branch !== undefined) {
    const stretch = stretches[branch === "near" ? 0 : 1];
    if (stretch === undefined) {
      throw new NoAnswerError({
        where,
        reason: `the ${subject} has no extremum in this model, so there is no far branch`,
      });
    }
    if (!within(stretch, value)) throw outOfReach(curve, text, [stretch], ` on the ${branch} branch`);
    return answerIn(curve, stretch, value);
  }
  const holding = stretches.filter((stretch) => within(stretch, value));
  if (holding.length === 0) throw outOfReach(curve, text, stretches, "");
  const answers = holding.map((stretch) => answerIn(curve, stretch, value));
  const [first, second] = answers as [Computed, Computed | undefined];
  // An extremum, or a node that two stretches share, is one answer.
  if (
    second === undefined ||
    answers.every((answer) => Math.abs(answer.value - first.value) < 1e-12 * (1 + first.value))
  )
    return first;
  throw new NoAnswerError({
    where,
    reason: `the ${subject} is ${text} at ${answers.length} redshifts: ${answers.map((answer) => answer.value.toPrecision(6)).join(" and ")}`,
    hint: `ask for ${where}.near or ${where}.far`,
  });
}

function within({ fromValue, toValue }: Stretch, value: number): boolean {
  return value >= Math.min(fromValue, toValue) && value <= Math.max(fromValue, toValue);
}

function outOfReach(curve: RedshiftCurve, text: string, stretches: readonly Stretch[], where: string): NoAnswerError {
  const all = stretches.flatMap((stretch) => [stretch.fromValue, stretch.toValue]);
  const unit = curve.unit === "" ? "" : ` ${curve.unit}`;
  return new NoAnswerError({
    where: curve.where,
    reason: `the ${curve.subject} is never ${text}${where} in this model: it lies between ${Math.min(...all).toPrecision(8)} and ${Math.max(...all).toPrecision(8)}${unit}`,
  });
}

function stretchesOf({ nodes, values, at }: RedshiftCurve): Stretch[] {
  const stretches: Stretch[] = [];
  let from = nodes[0]!;
  let fromValue = values[0]!;
  for (let i = 1; i < nodes.length - 1; i++) {
    const rising = values[i]! > values[i - 1]!;
    if (rising === values[i + 1]! > values[i]!) continue;
    const sign = rising ? -1 : 1;
    const extremum = findMinimum((s) => sign * at(s), nodes[i - 1]!, nodes[i + 1]!);
    stretches.push({ from, to: extremum.value, fromValue, toValue: sign * extremum.minimum });
    from = extremum.value;
    fromValue = sign * extremum.minimum;
  }
  const last = nodes.length - 1;
  stretches.push({ from, to: nodes[last]!, fromValue, toValue: values[last]! });
  return stretches;
}

/** The answer in a stretch that holds it: the nodes narrow it to one gap, Brent's method does the rest. */
function answerIn({ nodes, values, at }: RedshiftCurve, stretch: Stretch, value: number): Computed {
  const rising = stretch.toValue > stretch.fromValue;
  let low = stretch.from;
  let high = stretch.to;
  for (let i = 0; i < nodes.length; i++) {
    const node = nodes[i]!;
    if (node <= stretch.from || node >= stretch.to) continue;
    if (values[i]! > value === rising) {
      high = node;
      break;
    }
    low = node;
  }
  const miss = (x: number) => at(x) - value;
  const lowMiss = miss(low);
  const highMiss = miss(high);
  // A value within rounding of an end: the end is the answer.
  if (lowMiss === 0 || lowMiss > 0 === highMiss > 0) {
    const end = Math.abs(lowMiss) <= Math.abs(highMiss) ? low : high;
    return { value: Math.expm1(end), error: 4 * Number.EPSILON * (1 + Math.expm1(end)) };
  }
  const root = findRoot(miss, low, high);
  const left = Math.max(stretch.from, root.value - 1e-3);
  const right = Math.min(stretch.to, root.value + 1e-3);
  const slope = Math.abs((at(right) - at(left)) / (right - left));
  const error = root.error + (20 * Number.EPSILON * Math.abs(value)) / slope;
  return { value: Math.expm1(root.value), error: Math.exp(root.value) * error };
}

/** A value that is asked back: a time, a distance, a temperature. */
export function askedValue(name: string, symbol: string, unit: string): QuantityArgument {
  return {
    name,
    symbol,
    unit,
    rule: "must be finite and not negative",
    accepts: (value) => value >= 0 && Number.isFinite(value),
  };
}

/** Refuses a value outside its argument's domain. */
export function requireAsked(argument: QuantityArgument, value: number, where: string): void {
  if (!argument.accepts(value)) {
    throw new DomainError({ where, argument: argument.name, rule: argument.rule, value });
  }
}
