import type { ClosedModel } from "../model";
import type { Quantity, QuantityArgument, ValidityNote } from "../quantity";
import type { SourceKey } from "../sources";

/** One side of a fit's domain. */
export interface FitLimit {
  /** The symbol of what is limited: "ω_b". */
  readonly symbol: string;
  readonly low: number;
  readonly high: number;
  readonly read: (model: ClosedModel, values: readonly number[]) => number;
}

/** A published fitting formula: who, how good, and where. */
export interface PublishedFit {
  readonly source: SourceKey;
  /** Authors and year, equation where known. */
  readonly label: string;
  /** What is known of its accuracy, as a clause: "stated to about 1%". */
  readonly statement: string;
  readonly limits: readonly FitLimit[];
}

/** What a number from a fit must say: that it is one, how good it is, and where the model leaves its domain. */
export function fitNotes(
  fit: PublishedFit,
  model: ClosedModel,
  values: readonly number[] = [],
): readonly ValidityNote[] {
  const notes: ValidityNote[] = [{ level: "note", text: `fit of ${fit.label}, ${fit.statement}` }];
  for (const { symbol, low, high, read } of fit.limits) {
    const value = read(model, values);
    if (value >= low && value <= high) continue;
    const range = low === high ? `${low} alone` : `${low} to ${high}`;
    notes.push({
      level: "warning",
      text: `fit of ${fit.label} outside its domain: ${symbol} = ${Number(value.toPrecision(5))}, made for ${range}`,
    });
  }
  return notes;
}

/** What a quantity computed by a fit still has to say of itself. */
export interface FitQuantityFields {
  /** The name of the full computation, a dot, and the key of the source: "dragRedshift.eisensteinHu1998". */
  readonly name: string;
  readonly symbol: string;
  readonly unit: string;
  readonly arguments?: readonly QuantityArgument[];
  readonly description: string;
  readonly equation: string;
  readonly fit: PublishedFit;
  readonly compute: (model: ClosedModel, values: readonly number[]) => number;
}

/**
 * A fit as a quantity, to stand beside the full computation in one table. Its numerical error is rounding; how far the fit itself
 * is from the full computation is said in its notes.
 */
export function fitQuantity(fields: FitQuantityFields): Quantity<ClosedModel> {
  const { fit, compute, name, symbol, unit, description, equation } = fields;
  return {
    name,
    symbol,
    unit,
    arguments: fields.arguments ?? [],
    description,
    equation,
    method: `published fitting formula of ${fit.label}, ${fit.statement}`,
    accuracy: 1e-13,
    sources: [fit.source],
    notes: ({ model }, values) => fitNotes(fit, model, values),
    compute: ({ model }, values) => {
      const value = compute(model, values);
      return { value, error: 1e-14 * Math.abs(value) };
    },
  };
}

/** Limits on omega_b and omega_m. */
export function densityLimits(
  baryons: readonly [number, number],
  matter: readonly [number, number],
): readonly FitLimit[] {
  return [
    { symbol: "ω_b", low: baryons[0], high: baryons[1], read: (model) => model.baryonDensity },
    { symbol: "ω_m", low: matter[0], high: matter[1], read: (model) => model.matterDensity },
  ];
}

/** Fits of an expansion with a cosmological constant. */
export const cosmologicalConstantLimits: readonly FitLimit[] = [
  { symbol: "w_0", low: -1, high: -1, read: (model) => model.darkEnergy.w0 },
  { symbol: "w_a", low: 0, high: 0, read: (model) => model.darkEnergy.wa },
];
