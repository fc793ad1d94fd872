import { CosmologyError, NoAnswerError } from "../errors";
import type { ModelEvaluation, ModelQuantity } from "../expansion";
import type { ModelGivens } from "../model";
import { mirroredDigits } from "../numerics";
import { computeQuantity, Evaluation } from "../quantity";
import { closeModel } from "./closeModel";
import type { Origin } from "./origin";
import type { UncertainInputs } from "./uncertainInputs";
import { givenNumber, withGiven } from "./withGiven";

/** Bases of the quasi-random sequence, a pair for every two givens. */
const bases = [2, 3, 5, 7, 11, 13, 17, 19, 23, 29, 31, 37, 41, 43, 47, 53];

/** Share of the sampled models that may have no number before the answer is refused. */
const failureLimit = 0.02;

/** Models drawn from the errors of the givens, quasi-random and always the same; each is evaluated once. */
export class SampledModels {
  private evaluations: ModelEvaluation[] | undefined;
  private failed = 0;

  constructor(
    private readonly givens: ModelGivens,
    private readonly inputs: UncertainInputs,
    private readonly origin: Origin,
  ) {}

  /**
   * The 16% and 84% points of a quantity over the drawn models.
   *
   * Method: Halton's sequence (Halton 1960) through Box & Muller's transform (1958); asymmetric errors as two half normals.
   */
  interval(quantity: ModelQuantity, values: readonly number[]): { lower: number; upper: number } {
    const numbers: number[] = [];
    let failed = 0;
    for (const evaluation of this.drawn()) {
      try {
        numbers.push(computeQuantity(quantity, evaluation, values));
      } catch (failure) {
        if (!(failure instanceof CosmologyError)) throw failure;
        failed++;
      }
    }
    if (failed + this.failed > failureLimit * this.inputs.samples) {
      throw new NoAnswerError({
        where: quantity.name,
        reason: `${failed + this.failed} of ${this.inputs.samples} models within the stated errors have no such number`,
        hint: "use method linear, or smaller errors",
      });
    }
    numbers.sort((a, b) => a - b);
    return { lower: percentile(numbers, 0.158655), upper: percentile(numbers, 0.841345) };
  }

  private drawn(): ModelEvaluation[] {
    if (this.evaluations !== undefined) return this.evaluations;
    const evaluations: ModelEvaluation[] = [];
    for (let k = 1; k <= this.inputs.samples; k++) {
      try {
        evaluations.push(new Evaluation(closeModel(this.displaced(k), this.origin)));
      } catch (failure) {
        if (!(failure instanceof CosmologyError)) throw failure;
        this.failed++;
      }
    }
    this.evaluations = evaluations;
    return evaluations;
  }

  private displaced(k: number): ModelGivens {
    const { independent, correlated, factor } = this.inputs;
    const normals = normalPoint(k, independent.length + correlated.length);
    let givens = this.givens;
    independent.forEach(({ name, upper, lower }, i) => {
      const deviate = normals[i]!;
      givens = withGiven(givens, name, givenNumber(this.givens, name)! + deviate * (deviate > 0 ? upper : lower));
    });
    correlated.forEach((name, i) => {
      const shift = factor[i]!.reduce((sum, entry, j) => sum + entry * normals[independent.length + j]!, 0);
      givens = withGiven(givens, name, givenNumber(this.givens, name)! + shift);
    });
    return givens;
  }
}

/** The k-th quasi-random point of independent normal deviates. */
function normalPoint(k: number, dimensions: number): number[] {
  const deviates: number[] = [];
  for (let i = 0; i < dimensions; i += 2) {
    const radius = Math.sqrt(-2 * Math.log(mirroredDigits(k, bases[i % bases.length]!)));
    const angle = 2 * Math.PI * mirroredDigits(k, bases[(i + 1) % bases.length]!);
    deviates.push(radius * Math.cos(angle), radius * Math.sin(angle));
  }
  return deviates.slice(0, dimensions);
}

/** Linear interpolation between sorted values. */
function percentile(sorted: readonly number[], share: number): number {
  const place = share * (sorted.length - 1);
  const below = Math.floor(place);
  const above = Math.min(below + 1, sorted.length - 1);
  return sorted[below]! + (place - below) * (sorted[above]! - sorted[below]!);
}
