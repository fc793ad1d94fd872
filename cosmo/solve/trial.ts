import { CosmologyError } from "../errors";
import type { ModelEvaluation } from "../expansion";
import { dragEpochPart, lastScatteringPart } from "../lastScattering";
import type { ClosedModel, FlatGivens, ModelGivens } from "../model";
import { quantityRegister } from "../quantities";
import { Evaluation } from "../quantity";
import { closeDirect } from "./closeDirect";
import type { Origin } from "./origin";
import type { Equation } from "./plan";
import type { Slot } from "./slots";

/** Whether a quantity hangs on the ionization history. */
export function needsHistory(name: string): boolean {
  return quantityRegister.get(name)?.usesHistory === true;
}

/** Quantities that are nothing without the true history: held redshifts of last scattering would make them constants. */
const trueHistory = new Set([
  "lastScatteringRedshift",
  "dragRedshift",
  "visibilityPeakRedshift",
  "visibilityMedianRedshift",
  "visibilityWidth",
  "dampingWavenumber",
  "dampingAngle",
]);

/** Where last scattering and the drag epoch are held while a search is only finding its way. */
const heldRedshifts = { lastScattering: 1090, drag: 1060 };

/** A model with some parameters open, and the numbers it should come out with. */
export class Trial {
  /** Whether any equation needs the history even to find its way. */
  readonly needsTrueHistory: boolean;
  private refusal: string | undefined;

  constructor(
    private readonly fields: FlatGivens,
    readonly unknowns: readonly Slot[],
    readonly equations: readonly Equation[],
    private readonly givens: ModelGivens,
    private readonly origin: Origin,
  ) {
    this.needsTrueHistory = equations.some((equation) => trueHistory.has(equation.name));
  }

  /** The names and values of all number givens that the model hangs on: fields and equations. */
  numberGivens(): { name: string; value: number }[] {
    const fields = [...this.fields].filter((entry): entry is [string, number] => typeof entry[1] === "number");
    return [...fields.map(([name, value]) => ({ name, value })), ...this.equations];
  }

  /** The same trial with one given moved. */
  moved(name: string, value: number): Trial {
    const fields = this.fields.has(name) ? new Map([...this.fields, [name, value] as const]) : this.fields;
    const equations = this.equations.map((equation) => (equation.name === name ? { name, value } : equation));
    return new Trial(fields, this.unknowns, equations, this.givens, this.origin);
  }

  /** The closed model at a point of the search. */
  model(parameters: Float64Array): ClosedModel {
    const flat = new Map(this.fields);
    this.unknowns.forEach((slot, i) => {
      flat.set(slot.parameter, slot.logarithmic ? Math.exp(parameters[i]!) : parameters[i]!);
    });
    return closeDirect(flat, this.givens, this.origin);
  }

  /** An evaluation at a point: full, or light with last scattering held. */
  evaluation(parameters: Float64Array, kind: "light" | "full"): ModelEvaluation {
    const evaluation = new Evaluation(this.model(parameters));
    if (kind === "light") {
      evaluation.preset(lastScatteringPart, Math.log1p(heldRedshifts.lastScattering));
      evaluation.preset(dragEpochPart, Math.log1p(heldRedshifts.drag));
    }
    return evaluation;
  }

  /** Relative misses of the equations at a point; false where the model or a quantity does not exist. */
  residuals(parameters: Float64Array, out: Float64Array, kind: "light" | "full"): boolean {
    for (let i = 0; i < parameters.length; i++) {
      const slot = this.unknowns[i]!;
      const value = slot.logarithmic ? Math.exp(parameters[i]!) : parameters[i]!;
      if (!(value >= slot.range[0] && value <= slot.range[1])) return false;
    }
    try {
      const evaluation = this.evaluation(parameters, kind);
      this.equations.forEach((equation, i) => {
        const value = quantityRegister.get(equation.name)!.compute(evaluation, []).value;
        out[i] = miss(value, equation.value);
      });
      return out.every(Number.isFinite);
    } catch (failure) {
      if (!(failure instanceof CosmologyError)) throw failure;
      this.refusal = failure.message;
      return false;
    }
  }

  /** What stopped the search at the usual values, for the error. */
  atStart(): string {
    return this.refusal === undefined ? "" : ` (last refusal on the way: ${this.refusal})`;
  }
}

/** How far a value misses what was given: the logarithm of their ratio, or the difference where that has none. */
export function miss(value: number, given: number): number {
  if (value > 0 && given > 0) return Math.log(value / given);
  return (value - given) / Math.max(1, Math.abs(given));
}
