import { redshiftArgument } from "../quantity";
import { expansionPart, type ModelEvaluation, type ModelQuantity } from "./expansion";
import { requireRedshift } from "./requirePast";

/**
 * Equation of state of the dark energy at a redshift: w = w0 + wa (1 - a), or what the model's formula or table says.
 *
 * @param z redshift above -1. Exact. Source: Chevallier & Polarski 2001; Linder 2003, eq. 6.
 * @example equationOfStateAt(evaluation, 1) // w0 + wa/2
 */
export function equationOfStateAt(evaluation: ModelEvaluation, z: number): number {
  requireRedshift(evaluation, z, "equationOfStateAt");
  return evaluation.once(expansionPart).equationOfState(1 / (1 + z));
}

export const equationOfStateAtQuantity: ModelQuantity = {
  name: "equationOfStateAt",
  symbol: "w",
  unit: "",
  arguments: [redshiftArgument],
  description: "Equation of state of the dark energy at a redshift",
  equation: String.raw`w(z) = w_0 + w_a \frac{z}{1+z}`,
  method: "closed form",
  accuracy: 1e-15,
  methodFor: ({ darkEnergy }) =>
    darkEnergy.equation !== undefined
      ? `the model's formula, ${darkEnergy.equation.text}`
      : darkEnergy.table && "cubic pieces in the scale factor through the model's table",
  sources: ({ darkEnergy }) =>
    darkEnergy.equation === undefined && darkEnergy.table === undefined ? ["chevallierPolarski2001", "linder2003"] : [],
  compute: (evaluation, [z]) => ({ value: equationOfStateAt(evaluation, z!), error: 0 }),
};
