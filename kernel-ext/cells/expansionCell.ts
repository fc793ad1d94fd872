import { turningRedshiftPart } from "../../cosmo/expansion";
import type { ModelGivens } from "../../cosmo/model";
import type { QuantityValue } from "../../cosmo/quantity";
import { evaluateModel, type ModelNumbers } from "../../cosmo/solve";
import { type CellResult, cellOutput, lineChart, table } from "../display";
import { checkOptions } from "./checkOptions";
import { compileModel } from "./compileModel";
import { modelTable } from "./modelTable";
import { quantityOrNote } from "./quantityOrNote";
import { notesOf, quantityTable, sourcesOf } from "./quantityTable";
import { type RedshiftList, redshiftList, spacedRedshifts } from "./redshiftList";

/** Options of {@link expansionCell}. */
export interface ExpansionCellOptions {
  /** Redshifts of the arrays in `values` and of the second table; by default 300 from 0 to 1e5, even in ln(1+z). */
  redshifts?: RedshiftList;
}

/** Components that sum to one at every redshift: neutrinos are the massive ones, whatever their speed. */
const components = [
  { key: "matter", symbol: "Ω_cb" },
  { key: "radiation", symbol: "Ω_r" },
  { key: "neutrinos", symbol: "Ω_ν" },
  { key: "darkEnergy", symbol: "Ω_DE" },
  { key: "curvature", symbol: "Ω_k" },
] as const;

type Component = (typeof components)[number]["key"];

/** What the next cell gets. Numbers that a model does not have are left out. */
export interface ExpansionValues {
  redshift: Float64Array;
  /** H(z), km/s/Mpc. */
  hubbleRate: Float64Array;
  /** Fractions of the critical density at each redshift; they sum to one. Matter is baryons and cold matter. */
  fractions: { [component in Component]: Float64Array };
  equalityRedshift?: number;
  /** k_eq, 1/Mpc. */
  equalityWavenumber?: number;
  accelerationRedshift?: number;
  /** Gyr. */
  age?: number;
}

const names: Record<Component, string> = {
  matter: "baryons and cold matter",
  radiation: "photons and massless neutrinos",
  neutrinos: "massive neutrinos",
  darkEnergy: "dark energy",
  curvature: "curvature",
};

/** Where the chart ends, and where the table stands unless redshifts were asked for. */
const farthest = 1e5;
const tableRedshifts = [0, 0.3, 0.5, 1, 2, 5, 10, 100, 1100, 3400, 1e4, 1e5];

const today = [
  "hubble",
  "matterFraction",
  "baryonFraction",
  "coldMatterFraction",
  "neutrinoFraction",
  "radiationFraction",
  "darkEnergyFraction",
  "curvature",
  "matterDensity",
  "radiationDensity",
  "darkEnergyDensity",
] as const;

/** Epochs of the expansion that not every model has. */
const epochs = ["equalityRedshift", "equalityWavenumber", "accelerationRedshift", "age"] as const;

/**
 * The expansion: what the universe consisted of at every redshift, and how fast it expanded.
 *
 * Omega_X(z) = rho_X(z)/rho_c(z); H(z) = H0 E(z). Equality and the turn to acceleration are marked in the chart.
 *
 * @param model the model, see ModelGivens; @param options `redshifts` (above -1).
 * Errors: a redshift that the model does not have, named with its place in the list. A model that never accelerates, or has no age,
 * is told in a note.
 * @returns `values.redshift`, `values.hubbleRate`, `values.fractions.<component>`, z_eq, k_eq, z_acc, age.
 * Accuracy 1e-12. Source: Hogg 1999.
 * @example expansionCell({ hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }).values.accelerationRedshift // 0.63
 */
export function expansionCell(model: ModelGivens, options: ExpansionCellOptions = {}): CellResult<ExpansionValues> {
  const where = "expansionCell";
  checkOptions(options, ["redshifts"], where);
  const numbers = evaluateModel(compileModel(model, where), { where });
  const turning = numbers.evaluation.once(turningRedshiftPart);
  const end = turning === undefined ? farthest : Math.min(farthest, Number((0.98 * turning).toPrecision(6)));
  const grid = Float64Array.from(spacedRedshifts(0, end, 300, "onePlusRedshift"));
  const asked = options.redshifts === undefined ? undefined : redshiftList(options.redshifts, where);

  const missing: string[] = [];
  const epochValues = epochs
    .map((name) => quantityOrNote(numbers, name, [], missing))
    .filter((each): each is QuantityValue => each !== undefined);
  const everything = [
    ...today.map((name) => numbers.quantity(name)),
    numbers.quantity("criticalDensity", 0),
    numbers.quantity("decelerationAt", 0),
    ...epochValues,
  ];
  const epoch = (name: string) => epochValues.find((each) => each.name === name)?.value;
  const acceleration = epoch("accelerationRedshift");
  if (acceleration !== undefined && acceleration < 0) {
    missing.push(`this model begins to accelerate in the future, at z = ${acceleration.toPrecision(5)}`);
  }

  const drawn = historyAt(numbers, grid);
  const shown = components.filter(({ key }) => drawn.fractions[key].some((value) => value !== 0));
  for (const { key } of components) {
    if (!shown.some((each) => each.key === key)) missing.push(`${names[key]}: none in this model, so not drawn`);
  }
  if (turning !== undefined) missing.push(`this closed model was never smaller than at z = ${turning.toPrecision(6)}`);
  if (numbers.model.conventions.closure === "radiationOnTop") {
    missing.push(
      "closure radiationOnTop: today's fractions divide by H_0^2 and exceed one by the radiation; the curves divide by H(z)^2 and sum to one",
    );
  }
  const marks = [
    { at: epoch("equalityRedshift"), label: "equality z_eq" },
    { at: acceleration, label: "acceleration z_acc" },
  ].flatMap(({ at, label }) =>
    at !== undefined && at >= 0 && at <= end ? [{ axis: "x" as const, at: Number(at.toPrecision(6)), label }] : [],
  );

  const rowsAt = asked ?? Float64Array.from(tableRedshifts.filter((z) => z <= end));
  const listed = historyAt(numbers, rowsAt, asked !== undefined);
  const over = table({
    title: "Expansion over redshift",
    columns: [
      { key: "redshift", label: "", symbol: "z", digits: "all" },
      { key: "hubbleRate", label: "", symbol: "H", unit: "km/s/Mpc", digits: 8 },
      ...shown.map(({ key, symbol }) => ({ key, label: "", symbol, digits: 6 })),
    ],
    rows: Array.from(rowsAt, (redshift, row) => ({
      redshift,
      hubbleRate: listed.hubbleRate[row]!,
      ...Object.fromEntries(shown.map(({ key }) => [key, listed.fractions[key][row]!])),
    })),
    notes: [shown.map(({ key, symbol }) => `${symbol}: ${names[key]}`).join("; ")],
  });
  const first = marks.map(({ at, label }) => `${label} = ${at.toPrecision(5)}`);
  const chart = lineChart({
    title: "Density fractions and expansion rate",
    description: `Fractions of the critical density for ${shown.map(({ key }) => names[key]).join(", ")}, and H below, from z = 0 to ${Number(end.toPrecision(3))}${first.length === 0 ? "" : `; marked: ${first.join(", ")}`}.`,
    x: { label: "redshift", symbol: "z", scale: "onePlusRedshift" },
    y: { label: "fraction of the critical density" },
    series: shown.map(({ key }) => ({ label: names[key], x: grid, y: drawn.fractions[key] })),
    rules: marks,
    below: {
      height: 170,
      y: { label: "expansion rate", symbol: "H", unit: "km/s/Mpc", scale: "log" },
      series: [{ label: "H(z)", x: grid, y: drawn.hubbleRate }],
    },
  });
  return cellOutput({
    title: "Expansion",
    tables: [
      quantityTable("Densities today, equality, acceleration, age", everything),
      over,
      modelTable(numbers.model),
    ],
    charts: [chart],
    notes: [...notesOf(everything), ...missing],
    sources: sourcesOf(everything),
    values: {
      redshift: asked ?? grid,
      ...(asked === undefined ? drawn : listed),
      ...Object.fromEntries(epochValues.map((each) => [each.name, each.value])),
    },
  });
}

/** H and the fractions at redshifts; `placed` names the entry at which one is refused. */
function historyAt(numbers: ModelNumbers, redshifts: Float64Array, placed = false) {
  const column = (compute: (z: number) => number) =>
    redshifts.map((z, row) => {
      try {
        return compute(z);
      } catch (failure) {
        if (placed && failure instanceof Error) failure.message += ` (entry ${row + 1} of redshifts)`;
        throw failure;
      }
    });
  const hubbleRate = column((z) => numbers.value("hubbleRate", z));
  return {
    hubbleRate,
    fractions: {
      matter: column((z) => numbers.value("baryonFractionAt", z) + numbers.value("coldMatterFractionAt", z)),
      radiation: column((z) => numbers.value("radiationFractionAt", z)),
      neutrinos: column((z) => numbers.value("neutrinoFractionAt", z)),
      darkEnergy: column((z) => numbers.value("darkEnergyFractionAt", z)),
      curvature: column((z) => numbers.value("curvatureFractionAt", z)),
    },
  };
}
