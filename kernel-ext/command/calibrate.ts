import { writeFileSync } from "node:fs";
import { join } from "node:path";
import { dampingWavenumber } from "../../cosmo/acoustics";
import { dragRedshift, lastScatteringRedshift } from "../../cosmo/lastScattering";
import type { ModelGivens } from "../../cosmo/model";
import { calibrationColumn, planck2018Table2 } from "../../cosmo/published";
import { Evaluation } from "../../cosmo/quantity";
import { atomSettings, ionizationHistoryPart, kineticHistory } from "../../cosmo/recombination";
import { closeModel } from "../../cosmo/solve";

/**
 * Fits the three coefficients of the calibrated tier's Lyman-alpha correction to three printed numbers of one published
 * column and writes the file that the code reads: `npm run calibrate`.
 *
 * Newton's method with a difference Jacobian on (z_*, z_drag, k_D) - printed = 0; three equations for three unknowns, so the
 * column is met exactly and is no test of the tier.
 */

/** The inputs of the column; conventions as the table states them. */
function columnModel(): ModelGivens {
  const numbers = planck2018Table2.find((column) => column.name === calibrationColumn)!.numbers;
  return {
    hubble: Number(numbers["hubble"]!.digits),
    baryonDensity: Number(numbers["baryonDensity"]!.digits),
    coldMatterDensity: Number(numbers["coldMatterDensity"]!.digits),
    neutrinos: { effectiveNumber: 3.046, masses: [0.06] },
    helium: "nucleosynthesis",
    conventions: { constants: "codata2018", closure: "radiationOnTop" },
  };
}

const fitted = ["lastScatteringRedshift", "dragRedshift", "dampingWavenumber"] as const;

function printedTargets(): number[] {
  const numbers = planck2018Table2.find((column) => column.name === calibrationColumn)!.numbers;
  return fitted.map((name) => Number(numbers[name]!.digits));
}

function computed(givens: ModelGivens, coefficients: readonly number[]): number[] {
  const evaluation = new Evaluation(closeModel(givens));
  evaluation.preset(
    ionizationHistoryPart,
    kineticHistory(evaluation, "calibrated", atomSettings("calibrated", coefficients)),
  );
  return [lastScatteringRedshift(evaluation), dragRedshift(evaluation), dampingWavenumber(evaluation)];
}

function solveThree(matrix: readonly number[][], right: readonly number[]): number[] {
  const determinant = (m: readonly number[][]) =>
    m[0]![0]! * (m[1]![1]! * m[2]![2]! - m[1]![2]! * m[2]![1]!) -
    m[0]![1]! * (m[1]![0]! * m[2]![2]! - m[1]![2]! * m[2]![0]!) +
    m[0]![2]! * (m[1]![0]! * m[2]![1]! - m[1]![1]! * m[2]![0]!);
  const whole = determinant(matrix);
  return [0, 1, 2].map(
    (column) => determinant(matrix.map((row, i) => row.map((each, j) => (j === column ? right[i]! : each)))) / whole,
  );
}

/** The coefficients that meet the printed numbers, and how well. */
export function fitCorrection(): { coefficients: number[]; residuals: number[]; iterations: number } {
  const givens = columnModel();
  const targets = printedTargets();
  let coefficients = [0, 0, 0];
  for (let iteration = 1; iteration <= 30; iteration++) {
    const here = computed(givens, coefficients);
    const residuals = here.map((value, i) => value / targets[i]! - 1);
    if (Math.max(...residuals.map(Math.abs)) < 1e-10) return { coefficients, residuals, iterations: iteration };
    const steps = [1e-4, 1e-3, 1e-2];
    const columns = steps.map((step, j) => {
      const moved = coefficients.map((each, i) => (i === j ? each + step : each));
      return computed(givens, moved).map((value, i) => (value / targets[i]! - 1 - residuals[i]!) / step);
    });
    const jacobian = [0, 1, 2].map((i) => columns.map((column) => column[i]!));
    const change = solveThree(jacobian, residuals);
    coefficients = coefficients.map((each, i) => each - change[i]!);
  }
  throw new Error("the fit of the Lyman-alpha correction did not converge in 30 iterations");
}

function main(): void {
  const { coefficients, residuals, iterations } = fitCorrection();
  const file = join(__dirname, "..", "..", "..", "cosmo", "recombination", "calibrationCoefficients.json");
  const content = {
    about:
      "Coefficients (c0, c1, c2) of the calibrated tier's Lyman-alpha correction. Written by `npm run calibrate`; do not edit.",
    source: `Planck 2018 VI (arXiv:1807.06209), table 2, column ${calibrationColumn}`,
    model: columnModel(),
    fittedTo: Object.fromEntries(fitted.map((name, i) => [name, printedTargets()[i]!])),
    relativeResiduals: Object.fromEntries(fitted.map((name, i) => [name, Number(residuals[i]!.toExponential(2))])),
    // Twelve digits; the last ones follow the noise of the histories and mean nothing physical.
    coefficients: coefficients.map((each) => Number(each.toPrecision(12))),
  };
  // Lists of numbers stand on one line, as the formatter of the house has them.
  const text = JSON.stringify(content, null, 2).replace(/\[[^\][{}"]*\]/g, (list) =>
    list.replace(/\s+/g, " ").replace("[ ", "[").replace(" ]", "]"),
  );
  writeFileSync(file, `${text}\n`);
  process.stdout.write(`coefficients ${content.coefficients.join(", ")} after ${iterations} iterations -> ${file}\n`);
}

if (require.main === module) main();
