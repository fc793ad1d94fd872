import { DomainError } from "../errors";
import type { ClosedDarkEnergy, DarkEnergyEquation, DarkEnergyGivens } from "../model";
import { earliestFollowed, noFiniteState, stateFunction } from "./stateHistory";

/** Places in ln(1+z) at which w is looked at before anything is computed. */
const probes = 200;

/**
 * Dark energy by a formula or a table, checked: w finite all the way back to z = 1e8, and below 1/3 there.
 *
 * @param givens `equation` or `table`, one of them, in the form that validateGivens accepts. A w that is not finite, or at early
 * times not below 1/3: DomainError with the redshift.
 */
export function closeDarkEnergyFunction(
  givens: DarkEnergyGivens,
  where: string,
  place: string | undefined,
): ClosedDarkEnergy {
  const { equation, table } = givens;
  const closed: ClosedDarkEnergy = {
    w0: Number.NaN,
    wa: 0,
    ...(equation === undefined ? {} : { equation: equation as DarkEnergyEquation }),
    ...(table === undefined ? {} : { table }),
  };
  const field = equation === undefined ? "darkEnergy.table" : "darkEnergy.equation";
  const w = stateFunction(closed)!;
  let firstAbove: number | undefined;
  let value = Number.NaN;
  for (let i = 0; i <= probes; i++) {
    const z = Math.expm1((earliestFollowed * i) / probes);
    value = w(1 / (1 + z));
    if (!Number.isFinite(value)) throw noFiniteState(where, field, z, value, place);
    if (value < 1 / 3) firstAbove = undefined;
    else firstAbove ??= z;
  }
  if (firstAbove !== undefined) {
    throw new DomainError({
      where,
      argument: field,
      rule: `must stay below 1/3 at early times, or dark energy outgrows radiation in the past; from about z = ${Number(firstAbove.toPrecision(2))} on it does not, at z = 1e8 w is`,
      value,
      place,
    });
  }
  return { ...closed, w0: w(1) };
}
