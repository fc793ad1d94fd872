import type { ClosedModel } from "../../cosmo/model";
import { formatNumber, type Table, type TableRow, table } from "../display";

/**
 * The closed model: parameters, and the conventions that published numbers differ by. Printed with every result.
 *
 * @param tiers the recombination tiers that the cell ran, where it ran several.
 */
export function modelTable(model: ClosedModel, tiers: readonly string[] = [model.recombination]): Table {
  const masses = model.neutrinos.masses.length === 0 ? "0" : model.neutrinos.masses.map(exact).join(", ");
  const rows: TableRow[] = [
    { field: "hubble", symbol: "H_0", value: exact(model.hubble), unit: "km/s/Mpc" },
    { field: "baryonDensity", symbol: "omega_b", value: exact(model.baryonDensity), unit: "" },
    { field: "coldMatterDensity", symbol: "omega_c", value: exact(model.coldMatterDensity), unit: "" },
    { field: "matterFraction", symbol: "Omega_m", value: exact(model.matterFraction), unit: "" },
    { field: "darkEnergyFraction", symbol: "Omega_DE", value: exact(model.darkEnergyFraction), unit: "" },
    { field: "curvature", symbol: "Omega_k", value: exact(model.curvature), unit: "" },
    ...equationOfState(model),
    { field: "neutrinos.effectiveNumber", symbol: "N_eff", value: exact(model.neutrinos.effectiveNumber), unit: "" },
    { field: "neutrinos.masses", symbol: "m_nu", value: masses, unit: "eV" },
    { field: "photonTemperature", symbol: "T_cmb", value: exact(model.photonTemperature), unit: "K" },
    { field: `helium (${model.heliumSource})`, symbol: "Y_p", value: exact(model.helium), unit: "" },
  ];
  return table({
    title: "Model",
    columns: [
      { key: "field", label: "parameter" },
      { key: "symbol", label: "symbol", symbols: true },
      { key: "value", label: "value", align: "right" },
      { key: "unit", label: "unit", symbols: true },
    ],
    rows,
    notes: [...solutionNotes(model), `conventions: ${conventionList(model)}, recombination ${tiers.join(", ")}`],
  });
}

/** Every convention with its choice, in the order in which fields are listed. */
function conventionList({ conventions }: ClosedModel): string {
  const { constants, closure, equalityMatter, lastScattering, drag, soundHorizon } = conventions;
  const choices = { constants, closure, equalityMatter, lastScattering, drag, soundHorizon };
  return Object.entries(choices)
    .map(([name, choice]) => `${name} ${choice}`)
    .join(", ");
}

/** w0 and wa, or the formula or table that stands in their place. */
function equationOfState({ darkEnergy: { w0, wa, equation, table: points } }: ClosedModel): TableRow[] {
  if (equation !== undefined) return [{ field: "darkEnergy.equation", symbol: "w", value: equation.text, unit: "" }];
  if (points !== undefined) {
    const [first, last] = [points.redshifts[0]!, points.redshifts.at(-1)!];
    const value = `${points.redshifts.length} points, z ${exact(first)} to ${exact(last)}`;
    return [{ field: "darkEnergy.table", symbol: "w", value, unit: "" }];
  }
  return [
    { field: "darkEnergy.w0", symbol: "w_0", value: exact(w0), unit: "" },
    { field: "darkEnergy.wa", symbol: "w_a", value: exact(wa), unit: "" },
  ];
}

/** Givens at the digits they were given with, derived ones at eight. */
function exact(value: number): string {
  const shortest = formatNumber(value, { digits: "all" });
  return shortest.length <= 11 ? shortest : formatNumber(value, { digits: 8 });
}

/** What was solved for, from what, and which givens agreed beyond need. */
function solutionNotes({ solution }: ClosedModel): string[] {
  if (solution === undefined) return [];
  const notes: string[] = [];
  if (solution.solvedFor.length > 0) {
    notes.push(`${solution.solvedFor.join(" and ")} solved from ${solution.determinedBy.join(" and ")}`);
  }
  if (solution.agreeing.length > 0) {
    notes.push(`given beyond need and in agreement within rounding: ${solution.agreeing.join(", ")}`);
  }
  return notes;
}
