import { DomainError, UnknownNameError } from "../../cosmo/errors";
import type { ModelGivens, RecombinationTier } from "../../cosmo/model";
import type { QuantityValue } from "../../cosmo/quantity";
import { tierMethods } from "../../cosmo/recombination";
import { evaluateModel } from "../../cosmo/solve";
import { type CellResult, cellOutput, type LineSeries, lineChart, table } from "../display";
import { checkOptions } from "./checkOptions";
import { compileModel } from "./compileModel";
import { modelTable } from "./modelTable";
import { notesOf, sourcesOf } from "./quantityTable";
import { type RedshiftList, redshiftList, spacedRedshifts } from "./redshiftList";

/** Options of {@link recombinationCell}. */
export interface RecombinationCellOptions {
  /** The tiers to compare; all three by default. */
  tiers?: readonly RecombinationTier[];
  /** Redshifts of the arrays in `values`, 0 or more; by default 400 from 10 to 8000, even in ln(1+z). */
  redshifts?: RedshiftList;
}

/** What the next cell gets. */
export interface RecombinationValues {
  redshift: Float64Array;
  /** x_e of recombination alone, an array a tier. */
  residualIonizedFraction: { [tier in RecombinationTier]?: Float64Array };
  /** z_* of each tier. */
  lastScatteringRedshift: { [tier in RecombinationTier]?: number };
}

const allTiers: readonly RecombinationTier[] = ["saha", "peebles", "calibrated"];

/** Redshifts at which the table stands; where the tiers part. */
const tableRedshifts = [3000, 2000, 1600, 1400, 1200, 1100, 1000, 800, 500, 100];

/** Below this the logarithmic axis ends: Saha's fraction would fall without limit. */
const chartFloor = 1e-5;

/**
 * How the gas became neutral: free electrons a hydrogen nucleus, x_e, in up to three tiers on one logarithmic axis.
 *
 * @param model the model, see ModelGivens; its own `recombination` is not used here. @param options `tiers`, `redshifts` (0 or more).
 * Errors: a model without baryons or without radiation; an unknown tier.
 * @returns `values.redshift`, `values.residualIonizedFraction.<tier>`, `values.lastScatteringRedshift.<tier>`.
 * Accuracy 1e-8 in x_e. Sources: Peebles 1968; Seager, Sasselov & Scott 1999; the calibrated tier rests on this project's fit.
 * @example recombinationCell({ hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }, { tiers: ["saha", "peebles"] })
 */
export function recombinationCell(
  model: ModelGivens,
  options: RecombinationCellOptions = {},
): CellResult<RecombinationValues> {
  const where = "recombinationCell";
  checkOptions(options, ["tiers", "redshifts"], where);
  const tiers: readonly RecombinationTier[] = options.tiers ?? allTiers;
  if (typeof tiers !== "object" || tiers.length === 0) {
    throw new DomainError({ where, argument: "tiers", rule: "must be a list of tiers", value: tiers });
  }
  for (const tier of tiers) {
    if (!allTiers.includes(tier)) {
      throw new UnknownNameError({ where, kind: "tier", given: String(tier), known: allTiers });
    }
  }
  const redshifts =
    options.redshifts === undefined
      ? Float64Array.from(spacedRedshifts(10, 8000, 400, "onePlusRedshift"))
      : redshiftList(options.redshifts, where, -Number.MIN_VALUE);
  const compiled = compileModel(model, where);
  const runs = tiers.map((tier) => ({ tier, numbers: evaluateModel({ ...compiled, recombination: tier }, { where }) }));

  const values: RecombinationValues = { redshift: redshifts, residualIonizedFraction: {}, lastScatteringRedshift: {} };
  const series: LineSeries[] = [];
  const everything: QuantityValue[] = [];
  for (const { tier, numbers } of runs) {
    const fractions = Float64Array.from(redshifts, (z) => numbers.value("residualIonizedFraction", z));
    values.residualIonizedFraction[tier] = fractions;
    const lastScattering = numbers.quantity("lastScatteringRedshift");
    values.lastScatteringRedshift[tier] = lastScattering.value;
    everything.push(lastScattering);
    const kept = Array.from(redshifts.keys()).filter((i) => fractions[i]! >= chartFloor);
    if (kept.length > 0) {
      series.push({ label: tier, x: kept.map((i) => redshifts[i]!), y: kept.map((i) => fractions[i]!) });
    }
  }

  const rows = tableRedshifts.map((z) => {
    const row: Record<string, number> = { redshift: z };
    for (const { tier, numbers } of runs) {
      const fraction = numbers.quantity("residualIonizedFraction", z);
      row[tier] = fraction.value;
      everything.push(fraction);
    }
    return row;
  });
  const fractions = table({
    title: "Free electrons a hydrogen nucleus, x_e (recombination alone)",
    columns: [
      { key: "redshift", label: "", symbol: "z", digits: "all" },
      ...tiers.map((tier) => ({ key: tier, label: tier, digits: 7 })),
    ],
    rows,
    notes: tiers.map((tier) => `${tier}: ${tierMethods[tier]}`),
  });
  const lastScattering = table({
    title: "Last scattering by tier",
    columns: [
      { key: "tier", label: "tier" },
      { key: "redshift", label: "", symbol: "z_*", digits: 8 },
      { key: "error", label: "numerical error", digits: 1 },
    ],
    rows: tiers.map((tier, i) => {
      const value = runs[i]!.numbers.quantity("lastScatteringRedshift");
      return { tier, redshift: value.value, error: value.error };
    }),
  });
  const rules = tiers.includes("calibrated")
    ? [{ axis: "x" as const, at: values.lastScatteringRedshift.calibrated!, label: "z_* (calibrated)" }]
    : [];
  const charts =
    series.length === 0
      ? []
      : [
          lineChart({
            title: "Ionized fraction through recombination",
            description: `x_e over 1+z on logarithmic axes for ${series.map((each) => each.label).join(", ")}; values below ${chartFloor} are left out.`,
            x: { label: "redshift", symbol: "z", scale: "onePlusRedshift" },
            y: { label: "free electrons a hydrogen nucleus", symbol: "x_e", scale: "log", domain: [chartFloor, 2] },
            series,
            rules,
          }),
        ];
  return cellOutput({
    title: "Recombination",
    tables: [fractions, lastScattering, modelTable(runs[0]!.numbers.model, tiers)],
    charts,
    notes: notesOf(everything),
    sources: sourcesOf(everything),
    values,
  });
}
