import { prepareBatch } from "../../cosmo/batch";
import { findQuantity } from "../../cosmo/quantities";
import { Evaluation } from "../../cosmo/quantity";
import { closeModel } from "../../cosmo/solve";

/** The full suite: what a chain wants of every row. */
export const suite = [
  "lastScatteringRedshift",
  "dragRedshift",
  "lastScatteringSoundHorizon",
  "dragSoundHorizon",
  "acousticAngle",
  "dampingWavenumber",
  "age",
] as const;

/** Models per second of one core, and how far the two paths differ. */
export interface BatchRate {
  readonly engine: number;
  readonly singlePath: number;
  /** Engine over single path. */
  readonly ratio: number;
  /** Largest relative difference over the suite and the models that the single path computed. */
  readonly worstDifference: number;
}

/** Columns as a chain has them: six parameters wander, or with curvature, w0, wa, N_eff and three masses as well. */
export function chainColumns(rows: number, wide: boolean): Record<string, Float64Array | Float64Array[]> {
  let state = 20260101;
  const random = () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
  const column = (low: number, high: number) =>
    Float64Array.from({ length: rows }, () => low + (high - low) * random());
  const columns: Record<string, Float64Array | Float64Array[]> = {
    hubble: column(64, 71),
    baryonDensity: column(0.0215, 0.0235),
    coldMatterDensity: column(0.11, 0.13),
  };
  if (!wide) return columns;
  return {
    ...columns,
    curvature: column(-0.1, 0.1),
    "darkEnergy.w0": column(-1.2, -0.8),
    "darkEnergy.wa": column(-0.4, 0.3),
    "neutrinos.effectiveNumber": column(2, 4),
    "neutrinos.masses": [column(0.4, 0.6), column(0.2, 0.4), column(0, 0.2)],
  };
}

/** CPU seconds of the fastest of some passes: other load on the machine counts as little as it can. */
function fastest(passes: number, work: () => void): number {
  let best = Number.POSITIVE_INFINITY;
  for (let k = 0; k < passes; k++) {
    const start = process.cpuUsage();
    work();
    const { user, system } = process.cpuUsage(start);
    best = Math.min(best, (user + system) / 1e6);
  }
  return best;
}

/**
 * Measures the batch engine and the single path in one run.
 *
 * @param rows models of a pass of the engine, 20,000 by default; @param singleRows models for the single path, 20 by default;
 * @param wide whether curvature, dark energy and neutrinos wander too.
 */
export function measureBatchRate(rows = 20_000, singleRows = 20, wide = false): BatchRate {
  const columns = chainColumns(rows, wide);
  const plan = prepareBatch({ outputs: suite, closeModel });
  const out = Object.fromEntries(plan.outputs.map((name) => [name, new Float64Array(rows)]));
  // The first thousands of models run slowly until the compiler has warmed up: the passes see to that.
  const engine = fastest(6, () => {
    const counts = plan.run(columns, { from: 0, to: rows }, out);
    if (counts.engine !== rows) throw new Error(`${rows - counts.engine} rows did not take the engine`);
  });
  let worstDifference = 0;
  let row = 0;
  const single = fastest(2, () => {
    for (row = 0; row < singleRows; row++) {
      const at = (name: string) => (columns[name] as Float64Array)[row]!;
      const masses = columns["neutrinos.masses"] as Float64Array[] | undefined;
      const evaluation = new Evaluation(
        closeModel({
          hubble: at("hubble"),
          baryonDensity: at("baryonDensity"),
          coldMatterDensity: at("coldMatterDensity"),
          ...(masses === undefined
            ? {}
            : {
                curvature: at("curvature"),
                darkEnergy: { w0: at("darkEnergy.w0"), wa: at("darkEnergy.wa") },
                neutrinos: {
                  effectiveNumber: at("neutrinos.effectiveNumber"),
                  masses: masses.map((column) => column[row]!),
                },
              }),
        }),
      );
      for (const name of suite) {
        const { value } = findQuantity(name, "batchRate").compute(evaluation, []);
        worstDifference = Math.max(worstDifference, Math.abs(out[name]![row]! / value - 1));
      }
    }
  });
  return {
    engine: rows / engine,
    singlePath: singleRows / single,
    ratio: (rows * single) / (engine * singleRows),
    worstDifference,
  };
}
