import type { QuantityRequest } from "../../cosmo/quantities";
import { formatNumber, symbolText, type Table, table } from "../display";
import type { ShiftExplanation } from "./explainShift";
import type { HeldCombination } from "./heldCombination";
import type { SensitivityColumn, SensitivityEntry } from "./sensitivityMatrix";

const above = ({ request, logarithmic }: SensitivityColumn) =>
  logarithmic ? `d ln ${request.text}` : `d ${request.text}`;

/** The matrix: a row a parameter, a column a quantity. */
export function sensitivityTable(
  columns: readonly SensitivityColumn[],
  rows: readonly SensitivityEntry[][],
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

/** What a constant quantity means for Omega_m and h, as a sentence. */
export function slopeSentence({ text }: QuantityRequest, slope: number): string {
  const power = -slope;
  return `At fixed ω_b, constant ${text} means d ln Ω_m/d ln h = ${formatNumber(slope, { digits: 4 })}: it fixes Ω_m h^${power.toFixed(2)}.`;
}

const printedPowers =
  "printed for flat models: Ω_m h³ for θ_* (Planck 2018 VI, section 3), Ω_m h^3.4 for the horizon angle (Percival et al. 2002), both from memory";

/** Which power law of omega_m, h and omega_b a quantity fixes. */
export function combinationTable(
  request: QuantityRequest,
  { exponents, unitVector, matterFractionSlope }: HeldCombination,
) {
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

/** Which parameter would have to move, and by how much, to shift a quantity. */
export function shiftTable(
  { request, value }: SensitivityColumn,
  amount: number,
  explained: readonly ShiftExplanation[],
): Table {
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
