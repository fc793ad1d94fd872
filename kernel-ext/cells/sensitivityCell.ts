import { CosmologyError, DomainError, UnknownNameError } from "../../cosmo/errors";
import type { ModelGivens } from "../../cosmo/model";
import { parseRequests, type QuantityRequest } from "../../cosmo/quantities";
import type { QuantityValue } from "../../cosmo/quantity";
import { type Derivative, evaluateModel, type ModelNumbers } from "../../cosmo/solve";
import {
  barChart,
  type CellResult,
  type Chart,
  cellOutput,
  formatNumber,
  symbolText,
  type Table,
  table,
} from "../display";
import { checkOptions } from "./checkOptions";
import { compileModel } from "./compileModel";
import { explainShift, type ShiftExplanation } from "./explainShift";
import { type HeldCombination, heldCombination } from "./heldCombination";
import { modelTable } from "./modelTable";
import { notesOf, quantityTable, sourcesOf } from "./quantityTable";
import {
  checkedNames,
  defaultParameters,
  describeParameter,
  type SensitivityParameter,
  withMassSum,
} from "./sensitivityParameters";

/** Options of {@link sensitivityCell}. */
export interface SensitivityCellOptions {
  /** Quantities: "acousticAngle", or a list such as ["age", "luminosityDistance(1.1)"]. */
  of: string | readonly string[];
  /** Flat names of the parameters that are varied; by default hubble, the densities, curvature, w0, N_eff and the neutrino masses. */
  parameters?: readonly string[];
  /** A shift of a quantity, in its unit, that is to be explained. */
  shift?: number;
  /** The quantity that is shifted; the first one by default. */
  explain?: string;
}

/** Numbers by quantity, then by parameter. */
export type SensitivityMatrix = { [quantity: string]: { [parameter: string]: number } };

/** What the next cell gets. */
export interface SensitivityValues {
  /** The quantities' values. */
  quantities: { [quantity: string]: number };
  /**
   * d ln quantity/d ln parameter; by the parameter itself where it may be zero or negative (curvature, w0, wa), and of the quantity
   * itself where that is not positive, or a magnitude.
   */
  matrix: SensitivityMatrix;
  /** d quantity/d parameter, in their units. */
  derivatives: SensitivityMatrix;
  /** Which combination the first quantity fixes; absent where it has none. */
  combination?: HeldCombination;
  /** Which parameter would have to move to explain the shift: each alone. */
  shift?: {
    quantity: string;
    amount: number;
    parameters: { [parameter: string]: { change: number; to: number; inErrors?: number; reached?: number } };
  };
}

interface Column {
  readonly request: QuantityRequest;
  readonly value: QuantityValue;
  /** Whether its logarithm is differentiated: where it is positive and no magnitude. */
  readonly logarithmic: boolean;
}

interface Entry {
  readonly column: Column;
  readonly parameter: SensitivityParameter;
  readonly slope: Derivative;
  /** The slope as the matrix has it. */
  readonly shown: number;
}

/**
 * What moves a number, and how strongly: logarithmic derivatives by the parameters of the model, as a matrix and as bars; which
 * combination of omega_m, h and omega_b the first quantity fixes; and, for a shift, which parameter would have to move.
 *
 * d ln q/d ln p = (p/q) dq/dp; by p itself for curvature, w0 and wa, which may be zero or negative. A shift s asks p alone to move by
 * s/(dq/dp).
 *
 * @param model the model, see ModelGivens; @param options `of` (quantities), `parameters`, `shift` (in the quantity's unit), `explain`.
 * Errors: an unknown name; a quantity outside its domain; a parameter by which the model cannot be varied.
 * Method: central differences, extrapolated (Richardson 1911). Accuracy 1e-6. Uncertainties of the model's givens, where stated, set
 * the scale of each change.
 * @example sensitivityCell({ hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }, { of: "acousticAngle", shift: 0.001 })
 */
export function sensitivityCell(model: ModelGivens, options: SensitivityCellOptions): CellResult<SensitivityValues> {
  const where = "sensitivityCell";
  checkOptions(options, ["of", "parameters", "shift", "explain"], where);
  const requests = requestsOf(options?.of, where);
  const shifted = shiftedRequest(requests, options, where);
  const asked = options.parameters === undefined ? undefined : checkedNames(options.parameters, where);
  // Closed as stated first, so that errors speak of the model as it came.
  const stated = evaluateModel(compileModel(model, where), { where });
  const numbers = evaluateModel(withMassSum(stated.model), { where });
  const columns = requests.map((request): Column => {
    const value = numbers.quantity(request.name, ...request.arguments);
    // Magnitudes are logarithms already.
    return { request, value, logarithmic: value.value > 0 && value.unit !== "mag" };
  });
  const { names, notes } = asked === undefined ? defaultParameters(numbers) : { names: asked, notes: [] };
  const entries: Entry[][] = [];
  for (const name of names) {
    try {
      entries.push(rowOf(numbers, name, columns, where));
    } catch (failure) {
      if (asked !== undefined || !(failure instanceof CosmologyError)) throw failure;
      notes.push(`${name} is not varied: ${failure.message}`);
    }
  }
  if (entries.length === 0) {
    throw new DomainError({
      where,
      argument: "parameters",
      rule: "must name one that can be varied; this model has none by default",
      value: names,
    });
  }

  const values: SensitivityValues = {
    quantities: Object.fromEntries(columns.map(({ request, value }) => [request.text, value.value])),
    matrix: matrixOf(columns, entries, ({ shown }) => shown),
    derivatives: matrixOf(columns, entries, ({ slope }) => slope.value),
  };
  const tables = [
    sensitivityTable(columns, entries, numbers.model.heliumSource === "nucleosynthesis"),
    quantityTable(
      "The quantities",
      columns.map(({ value }) => value),
    ),
  ];
  const combination = heldCombination(numbers, requests[0]!);
  if (combination !== undefined) {
    values.combination = combination;
    tables.push(combinationTable(requests[0]!, combination));
  } else {
    notes.push(
      `no power law of ω_m, h and ω_b for ${requests[0]!.text}: it needs a positive quantity, and a model that states all three and solves for none`,
    );
  }
  if (shifted !== undefined) {
    const { request, amount } = shifted;
    const place = requests.indexOf(request);
    const explained = entries.map((row) =>
      explainShift(numbers, request, amount, row[0]!.parameter, row[place]!.slope),
    );
    tables.push(shiftTable(columns[place]!, amount, explained));
    values.shift = {
      quantity: request.text,
      amount,
      parameters: Object.fromEntries(
        explained.flatMap(({ parameter, change, to, inErrors, reached }) =>
          change === undefined || to === undefined
            ? []
            : [
                [
                  parameter.name,
                  {
                    change,
                    to,
                    ...(inErrors === undefined ? {} : { inErrors }),
                    ...(reached === undefined ? {} : { reached }),
                  },
                ],
              ],
        ),
      ),
    };
  }
  const quantities = columns.map(({ value }) => value);
  return cellOutput({
    title: `Sensitivity of ${requests.map(({ text }) => text).join(", ")}`,
    ...(combination?.matterFractionSlope === undefined
      ? {}
      : { summary: slopeSentence(requests[0]!, combination.matterFractionSlope) }),
    tables: [...tables, modelTable(numbers.model)],
    charts: [sensitivityChart(columns, entries)],
    notes: [...notesOf(quantities), ...notes],
    sources: sourcesOf(quantities),
    values,
  });
}

function requestsOf(of: unknown, where: string): QuantityRequest[] {
  const texts = typeof of === "string" ? [of] : of;
  if (!Array.isArray(texts) || texts.length === 0 || !texts.every((text) => typeof text === "string")) {
    throw new DomainError({
      where,
      argument: "of",
      rule: 'must be a quantity such as "acousticAngle", or a list of them',
      value: of,
    });
  }
  const requests = texts.flatMap((text) => parseRequests(text, where));
  if (requests.length === 0) {
    throw new DomainError({ where, argument: "of", rule: "must name at least one quantity", value: of });
  }
  if (requests.length > 6) {
    throw new DomainError({ where, argument: "of", rule: "must be at most 6 quantities", value: requests.length });
  }
  const twice = requests.find(({ text }, i) => requests.findIndex((other) => other.text === text) !== i);
  if (twice !== undefined) {
    throw new DomainError({ where, argument: "of", rule: "must name each quantity once", value: twice.text });
  }
  return requests;
}

function shiftedRequest(requests: readonly QuantityRequest[], options: SensitivityCellOptions, where: string) {
  const { shift, explain } = options;
  if (shift === undefined) {
    if (explain === undefined) return undefined;
    throw new DomainError({ where, argument: "shift", rule: "must be given with explain", value: shift });
  }
  if (typeof shift !== "number" || !Number.isFinite(shift) || shift === 0) {
    throw new DomainError({ where, argument: "shift", rule: "must be a finite number other than 0", value: shift });
  }
  if (explain === undefined) return { request: requests[0]!, amount: shift };
  const wanted = String(explain).replace(/\s/g, "");
  const request = requests.find(({ text }) => text === wanted);
  if (request === undefined) {
    const known = requests.map(({ text }) => text);
    throw new UnknownNameError({ where, kind: 'quantity of "of"', given: String(explain), known });
  }
  return { request, amount: shift };
}

/** The derivatives of every quantity by one parameter. */
function rowOf(numbers: ModelNumbers, name: string, columns: readonly Column[], where: string): Entry[] {
  if (name === "neutrinos.massSum" && numbers.model.givens.neutrinos?.masses !== undefined) {
    throw new DomainError({
      where,
      argument: "parameters",
      rule: "can hold neutrinos.massSum only where the model does not state a list of different masses",
      value: numbers.model.givens.neutrinos.masses,
      hint: "state neutrinos.massSum with neutrinos.ordering in place of neutrinos.masses",
    });
  }
  const slopes = columns.map(({ request }) => numbers.derivative(request.name, request.arguments, name));
  const parameter = describeParameter(numbers, name);
  return columns.map((column, i) => {
    const slope = slopes[i]!;
    const scale = (parameter.perUnit ? 1 : parameter.value) / (column.logarithmic ? column.value.value : 1);
    return { column, parameter, slope, shown: slope.value * scale };
  });
}

function matrixOf(columns: readonly Column[], rows: readonly Entry[][], read: (entry: Entry) => number) {
  return Object.fromEntries(
    columns.map(({ request }, i) => [
      request.text,
      Object.fromEntries(rows.map((row) => [row[i]!.parameter.name, read(row[i]!)])),
    ]),
  );
}

const above = ({ request, logarithmic }: Column) => (logarithmic ? `d ln ${request.text}` : `d ${request.text}`);

function sensitivityTable(
  columns: readonly Column[],
  rows: readonly Entry[][],
  followsNucleosynthesis: boolean,
): Table {
  const largest = Math.max(
    ...rows.flat().map(({ slope }) => (slope.value === 0 ? 0 : slope.error / Math.abs(slope.value))),
  );
  return table({
    title: "Sensitivity: what stands above each column, by what begins each row",
    columns: [
      { key: "by", label: "by" },
      { key: "symbol", label: "symbol", symbols: true },
      { key: "value", label: "value here", digits: 6 },
      { key: "unit", label: "unit", symbols: true },
      ...columns.map((column, i) => ({
        key: `q${i}`,
        label: above(column),
        ...(column.logarithmic ? {} : { unit: column.value.unit }),
        digits: 5,
      })),
    ],
    rows: rows.map((row) => {
      const { name, symbol, unit, value, perUnit } = row[0]!.parameter;
      return {
        by: perUnit ? `d ${name} (by the parameter itself)` : `d ln ${name}`,
        symbol,
        value,
        unit,
        ...Object.fromEntries(row.map(({ shown }, i) => [`q${i}`, shown])),
      };
    }),
    notes: [
      "by the parameter itself where it may be zero or negative, by its logarithm elsewhere; the other givens held",
      ...(followsNucleosynthesis ? ["helium follows nucleosynthesis, so it moves with ω_b and N_eff"] : []),
      `numerical error at most ${formatNumber(largest, { digits: 1 })} of each derivative`,
    ],
  });
}

function slopeSentence({ text }: QuantityRequest, slope: number): string {
  const power = -slope;
  return `At fixed ω_b, constant ${text} means d ln Ω_m/d ln h = ${formatNumber(slope, { digits: 4 })}: it fixes Ω_m h^${power.toFixed(2)}.`;
}

const printedPowers =
  "printed for flat models: Ω_m h³ for θ_* (Planck 2018 VI, section 3), Ω_m h^3.4 for the horizon angle (Percival et al. 2002), both from memory";

function combinationTable(request: QuantityRequest, { exponents, unitVector, matterFractionSlope }: HeldCombination) {
  const names = [
    ["matterDensity", "ω_m"],
    ["reducedHubble", "h"],
    ["baryonDensity", "ω_b"],
  ] as const;
  const law = names.map(([name, symbol]) => `${symbol}^${exponents[name].toFixed(3)}`).join(" ");
  return table({
    title: `The combination that ${request.text} fixes`,
    columns: [
      { key: "name", label: "of" },
      { key: "symbol", label: "symbol", symbols: true },
      { key: "exponent", label: "exponent", digits: 5 },
      { key: "unit", label: "unit vector", digits: 5 },
    ],
    rows: names.map(([name, symbol]) => ({ name, symbol, exponent: exponents[name], unit: unitVector[name] })),
    notes: [
      `near this model ${request.text} goes as ${law}, everything else held`,
      ...(matterFractionSlope === undefined ? [] : [slopeSentence(request, matterFractionSlope)]),
      ...(request.name === "acousticAngle" ? [printedPowers] : []),
    ],
  });
}

function shiftTable({ request, value }: Column, amount: number, explained: readonly ShiftExplanation[]): Table {
  const unit = value.unit === "" ? "" : ` ${value.unit}`;
  const errors = explained.some(({ inErrors }) => inErrors !== undefined);
  const idle = explained.filter(({ change }) => change === undefined).map(({ parameter }) => parameter.name);
  const impossible = explained.filter(({ change, reached }) => change !== undefined && reached === undefined);
  return table({
    title: `What would shift ${request.text} (${symbolText(value.symbol)}) by ${formatNumber(amount, { digits: "all" })}${unit}, each parameter alone`,
    columns: [
      { key: "parameter", label: "parameter" },
      { key: "symbol", label: "symbol", symbols: true },
      { key: "from", label: "from", digits: 6 },
      { key: "change", label: "change", digits: 4 },
      { key: "to", label: "to", digits: 6 },
      { key: "unit", label: "unit", symbols: true },
      ...(errors ? [{ key: "inErrors", label: "change over its stated error", digits: 3 }] : []),
      { key: "reached", label: "share of the shift there", digits: 4 },
    ],
    rows: explained.map(({ parameter, change, to, inErrors, reached }) => ({
      parameter: parameter.name,
      symbol: parameter.symbol,
      from: parameter.value,
      change,
      to,
      unit: parameter.unit,
      inErrors,
      reached,
    })),
    notes: [
      "changes are linear; the share is what the model at the changed parameter really shows of the shift (1 where linear is enough)",
      ...(idle.length === 0 ? [] : [`${idle.join(", ")}: no change of it moves ${request.text}`]),
      ...(impossible.length === 0
        ? []
        : [`${impossible.map(({ parameter }) => parameter.name).join(", ")}: there is no such model`]),
    ],
  });
}

function sensitivityChart(columns: readonly Column[], rows: readonly Entry[][]): Chart {
  const logarithmic = columns.flatMap((column, i) => (column.logarithmic ? [i] : []));
  const others = columns.flatMap((column, i) => (column.logarithmic ? [] : [[i]]));
  const panels = [logarithmic, ...others]
    .filter((indices) => indices.length > 0)
    .flatMap((indices) =>
      [false, true].map((perUnit) => {
        const { logarithmic: ln, request, value } = columns[indices[0]!]!;
        const top = ln ? `d ln ${indices.length === 1 ? request.text : "quantity"}` : `d ${request.text}`;
        return {
          axis: { label: `${top} / d ${perUnit ? "" : "ln "}parameter`, ...(ln ? {} : { unit: value.unit }) },
          rows: rows
            .filter((row) => row[0]!.parameter.perUnit === perUnit)
            .map((row) => ({
              label: `${row[0]!.parameter.name} ${row[0]!.parameter.symbol}`.trim(),
              bars: indices.map((i) => ({ group: row[i]!.column.request.text, value: row[i]!.shown })),
            })),
        };
      }),
    )
    .filter((panel) => panel.rows.length > 0);
  const strongest = columns.map(({ request }, i) => {
    const row = rows.reduce((best, each) => (Math.abs(each[i]!.shown) > Math.abs(best[i]!.shown) ? each : best));
    return `${request.text} most by ${row[i]!.parameter.name}`;
  });
  return barChart({
    title: "Sensitivity",
    description: `Derivatives of ${columns.map(({ request }) => request.text).join(", ")} by each parameter, the others held, each panel on a scale of its own; ${strongest.join(", ")}.`,
    panels,
  });
}
