import { CosmologyError, UnknownNameError } from "../errors";
import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { type ModelGivens, modelFieldByName } from "../model";
import { computeQuantity, Evaluation } from "../quantity";
import { closeModel } from "./closeModel";
import type { Origin } from "./origin";
import { slots } from "./slots";
import { givenNumber, withGiven } from "./withGiven";

/** A derivative with an estimate of its own error. */
export interface Derivative {
  readonly value: number;
  /** Absolute. */
  readonly error: number;
}

/**
 * Steps relative to the given: large enough that the noise of the histories (1e-11) does not show, small enough that what two
 * steps leave after extrapolation (the fourth power) does not either.
 */
const relativeStep = 0.01;

/** Steps for givens whose value says nothing of their scale: curvature, wa, and whatever is zero. */
const absoluteSteps: Readonly<Record<string, number>> = {
  curvature: 0.002,
  "darkEnergy.w0": 0.01,
  "darkEnergy.wa": 0.02,
  "neutrinos.massSum": 0.01,
};

/** Models beside one, for the derivatives of its numbers: each is evaluated once, whatever is asked of it. */
export class DisplacedModels {
  private readonly neighbors = new Map<string, Neighbors>();

  constructor(
    private readonly givens: ModelGivens,
    private readonly center: ModelEvaluation,
    private readonly origin: Origin,
  ) {}

  /**
   * d(quantity)/d(given), the other givens held.
   *
   * Method: central differences at two steps, extrapolated (Richardson 1911); one-sided of fourth order where one side has no
   * models. Accuracy 1e-6 relative to quantity over given.
   *
   * @param parameter flat name of a given that the model states as a number, or of a parameter with a numeric default.
   */
  derivative(quantity: ModelQuantity, values: readonly number[], parameter: string): Derivative {
    const beside = this.beside(parameter);
    const at = (evaluation: ModelEvaluation) => computeQuantity(quantity, evaluation, values);
    const [a, b, c, d] = beside.evaluations.map(at) as [number, number, number, number];
    const { step } = beside;
    if (beside.sides === "both") {
      // a, b, c, d at -2, -1, 1, 2 steps.
      const near = (c - b) / (2 * step);
      const far = (d - a) / (4 * step);
      const value = (4 * near - far) / 3;
      return { value, error: Math.abs(value - near) * 0.05 + noise(a, d, step) };
    }
    // At 1, 2, 3, 4 steps to one side.
    const sign = beside.sides === "above" ? 1 : -1;
    const here = at(this.center);
    const value = (sign * (-25 * here + 48 * a - 36 * b + 16 * c - 3 * d)) / (12 * step);
    const lower = (sign * (-11 * here + 18 * a - 9 * b + 2 * c)) / (6 * step);
    return { value, error: Math.abs(value - lower) * 0.2 + noise(here, d, step) };
  }

  private beside(parameter: string): Neighbors {
    const known = this.neighbors.get(parameter);
    if (known !== undefined) return known;
    const value = this.valueOf(parameter);
    const step = absoluteSteps[parameter] ?? (value === 0 ? 0.01 : relativeStep * Math.abs(value));
    const evaluateAt = (offsets: readonly number[]) =>
      offsets.map((offset) => this.evaluation(parameter, value + offset * step));
    let found: Neighbors | undefined;
    const refusals: CosmologyError[] = [];
    for (const [sides, offsets] of layouts) {
      try {
        found = { sides, step, evaluations: evaluateAt(offsets) };
        break;
      } catch (failure) {
        if (!(failure instanceof CosmologyError)) throw failure;
        refusals.push(failure);
      }
    }
    if (found === undefined) throw refusals[0]!;
    this.neighbors.set(parameter, found);
    return found;
  }

  private evaluation(parameter: string, value: number): ModelEvaluation {
    return new Evaluation(closeModel(withGiven(this.givens, parameter, value), this.origin));
  }

  private valueOf(parameter: string): number {
    const given = givenNumber(this.givens, parameter);
    if (given !== undefined) return given;
    // A parameter at its default: read from the closed model.
    const model = this.center.model as unknown as Record<string, unknown>;
    const value = parameter
      .split(".")
      .reduce<unknown>((inner, key) => (inner as Record<string, unknown>)?.[key], model);
    const slot = slots.find((each) => each.parameter === parameter);
    if (slot !== undefined && modelFieldByName.has(parameter) && typeof value === "number") return value;
    throw new UnknownNameError({
      where: this.origin.where ?? "derivative",
      kind: "parameter to differentiate by",
      given: parameter,
      known: slots.map((each) => each.parameter),
    });
  }
}

interface Neighbors {
  readonly sides: "both" | "above" | "below";
  readonly step: number;
  readonly evaluations: readonly ModelEvaluation[];
}

const layouts: readonly [Neighbors["sides"], readonly number[]][] = [
  ["both", [-2, -1, 1, 2]],
  ["above", [1, 2, 3, 4]],
  ["below", [-1, -2, -3, -4]],
];

/** What the histories' own noise can move a difference quotient. */
function noise(a: number, b: number, step: number): number {
  return (1e-11 * Math.max(Math.abs(a), Math.abs(b))) / step;
}
