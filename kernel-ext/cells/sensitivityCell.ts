import { CosmologyError, DomainError, UnknownNameError } from "../../cosmo/errors";
import type { ModelGivens } from "../../cosmo/model";
import { parseRequests, type QuantityRequest } from "../../cosmo/quantities";
import { evaluateModel, type ModelNumbers } from "../../cosmo/solve";
import { type CellResult, cellOutput } from "../display";
import { checkOptions } from "./checkOptions";
import { compileModel } from "./compileModel";
import { explainShift } from "./explainShift";
import { type HeldCombination, heldCombination } from "./heldCombination";
import { modelTable } from "./modelTable";
import { notesOf, quantityTable, sourcesOf } from "./quantityTable";
import { sensitivityChart } from "./sensitivityChart";
import type { SensitivityColumn, SensitivityEntry } from "./sensitivityMatrix";
import { checkedNames, defaultParameters, describeParameter, withMassSum } from "./sensitivityParameters";
import { combinationTable, sensitivityTable, shiftTable, slopeSentence } from "./sensitivityTables";

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
  const columns = requests.map((request): SensitivityColumn => {
    const value = numbers.quantity(request.name, ...request.arguments);
    // Magnitudes are logarithms already.
    return { request, value, logarithmic: value.value > 0 && value.unit !== "mag" };
  });
  const { names, notes } = asked === undefined ? defaultParameters(numbers) : { names: asked, notes: [] };
  const entries: SensitivityEntry[][] = [];
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
function rowOf(
  numbers: ModelNumbers,
  name: string,
  columns: readonly SensitivityColumn[],
  where: string,
): SensitivityEntry[] {
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

function matrixOf(
  columns: readonly SensitivityColumn[],
  rows: readonly SensitivityEntry[][],
  read: (entry: SensitivityEntry) => number,
) {
  return Object.fromEntries(
    columns.map(({ request }, i) => [
      request.text,
      Object.fromEntries(rows.map((row) => [row[i]!.parameter.name, read(row[i]!)])),
    ]),
  );
}
