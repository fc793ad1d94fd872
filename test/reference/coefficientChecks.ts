import { readFileSync } from "node:fs";
import { join } from "node:path";
import type * as batchColumns from "../../cosmo/batch/batchColumns";
import type * as batchRow from "../../cosmo/batch/batchRow";
import type * as closeRow from "../../cosmo/batch/closeRow";
import type * as prepareBatch from "../../cosmo/batch/prepareBatch";
import type * as constantsSets from "../../cosmo/constants/constantsSets";
import type * as fermiDirac from "../../cosmo/expansion/fermiDirac";
import type { ModelGivens, RecombinationTier } from "../../cosmo/model";
import type * as closeModel from "../../cosmo/solve/closeModel";
import type * as evaluateModel from "../../cosmo/solve/evaluateModel";
import { referenceBounds } from "./bounds";
import type { ModuleCopy } from "./changedCopies";
import { formulaBound } from "./formulaBounds";
import { formulaFunctions, type LoadModule } from "./formulaFunctions";
import { readFormulas } from "./readFormulas";
import { readReferences, referenceModels } from "./readReferences";

/** Something that a changed coefficient may make fail. */
export interface CoefficientCheck {
  readonly name: string;
  /** Places below cosmo/ of the modules that it calls: what these do not see, the check cannot notice. */
  readonly modules: readonly string[];
  /** Relative differences over their bounds, one by one, so that the first above 1 ends it. */
  readonly excesses: (copy: ModuleCopy) => Iterable<number>;
}

/** Not a number, or a throw, is a failure like a difference above its bound. */
export function fails(check: CoefficientCheck, copy: ModuleCopy): boolean {
  try {
    for (const excess of check.excesses(copy)) if (!(excess <= 1)) return true;
    return false;
  } catch {
    return true;
  }
}

const relative = (value: number, expected: number) =>
  expected === 0 ? (value === 0 ? 0 : Number.POSITIVE_INFINITY) : Math.abs(value / expected - 1);

/** One check a file of formulas/. */
const formulaChecks: readonly CoefficientCheck[] = readFormulas().map(({ name, rows }) => {
  const { module, evaluate } = formulaFunctions[name]!;
  const bound = formulaBound(name);
  return {
    name,
    modules: [module, "constants/constantsSets"],
    *excesses(copy) {
      const load = ((place: string) => copy.load(place)) as LoadModule;
      for (const row of rows) yield relative(evaluate(load, ...row.arguments), row.value) / bound;
    },
  };
});

/** Fermi-Dirac integrals against mpmath, as in test/cosmo/expansion/fermiDirac.test.ts. */
const fermiDiracCheck: CoefficientCheck = {
  name: "Fermi-Dirac integrals",
  modules: ["expansion/fermiDirac"],
  *excesses(copy) {
    const { fermiDiracEnergy, fermiDiracPressure } = copy.load("expansion/fermiDirac") as typeof fermiDirac;
    const { rows } = JSON.parse(readFileSync(join(__dirname, "neutrinos", "fermiDirac.json"), "utf8")) as {
      rows: [y: number, energy: number, looser: number, pressure: number, looser: number][];
    };
    for (const [y, energy, , pressure] of rows) {
      yield relative(fermiDiracEnergy(y), energy) / 1.5e-14;
      yield relative(fermiDiracPressure(y), pressure) / 1.5e-14;
    }
  },
};

const references = readReferences();
const givens = referenceModels();

/** Some of the rows of a model, from the first to the last. */
function spread<Row extends { readonly model: string }>(rows: readonly Row[], model: string): Row[] {
  const own = rows.filter((row) => row.model === model);
  const most = 12;
  if (own.length <= most) return own;
  return Array.from({ length: most }, (_, i) => own[Math.round((i * (own.length - 1)) / (most - 1))]!);
}

/** Files of values/ for one model and tier; up to a dozen of rows a file. */
function modelCheck(model: string, tier?: RecombinationTier): CoefficientCheck {
  const files = references.filter((file) => file.tier === tier);
  return {
    name: tier === undefined ? model : `${model}, ${tier}`,
    modules: ["solve/evaluateModel"],
    *excesses(copy) {
      const load = copy.load("solve/evaluateModel") as typeof evaluateModel;
      const base = givens.get(model)!;
      const numbers = load.evaluateModel(tier === undefined ? base : { ...base, recombination: tier });
      for (const file of files) {
        const [bound] = referenceBounds[file.name]!;
        for (const row of spread(file.rows, model)) {
          yield relative(numbers.value(file.quantity, ...row.arguments), row.value) / bound;
        }
      }
    },
  };
}

/** h in the place of H0 = 100 h, by the definition of h. */
const reducedHubbleCheck: CoefficientCheck = {
  name: "reducedHubble",
  modules: ["batch/prepareBatch", "solve/evaluateModel"],
  *excesses(copy) {
    const { hubble, ...rest } = givens.get("plain")!;
    const reduced = { ...rest, reducedHubble: (hubble as number) / 100 };
    const single = copy.load("solve/evaluateModel") as typeof evaluateModel;
    yield relative(single.evaluateModel(reduced).value("hubble"), hubble as number) / 1e-15;
    yield relative(batchValues(copy, reduced, ["hubble"]).hubble!, hubble as number) / 1e-15;
    yield relative(batchValues(copy, reduced, ["reducedHubble"]).reducedHubble!, (hubble as number) / 100) / 1e-15;
  },
};

/** A shell's volume is the difference of two volumes of values/. */
const shellCheck: CoefficientCheck = {
  name: "comovingVolume of a shell",
  modules: ["solve/evaluateModel"],
  *excesses(copy) {
    const { evaluateModel: evaluate } = copy.load("solve/evaluateModel") as typeof evaluateModel;
    const numbers = evaluate(givens.get("plain")!);
    const rows = spread(references.find((file) => file.name === "comovingVolume")!.rows, "plain");
    const [inner, outer] = [rows[Math.floor(rows.length / 3)]!, rows[rows.length - 1]!];
    const shell = numbers.value("comovingVolume", inner.arguments[0]!, outer.arguments[0]!);
    yield relative(shell, outer.value - inner.value) / 1e-12;
  },
};

/** What the batch engine itself, not the single path, computes of a model. */
function batchValues(copy: ModuleCopy, model: ModelGivens, outputs: readonly string[]): Record<string, number> {
  const batch = copy.load("batch/prepareBatch") as typeof prepareBatch;
  const { closeModel: close } = copy.load("solve/closeModel") as typeof closeModel;
  const plan = batch.prepareBatch({ outputs, shared: model, closeModel: close });
  if (plan.singlePathOutputs.length > 0) throw new Error(`not the engine's: ${plan.singlePathOutputs.join(", ")}`);
  const out = Object.fromEntries(plan.outputs.map((name) => [name, new Float64Array(1)]));
  const counts = plan.run({}, { from: 0, to: 1 }, out);
  if (counts.engine !== 1) throw new Error("the row did not take the engine");
  return Object.fromEntries(plan.outputs.map((name) => [name, out[name]![0]!]));
}

/** Outputs of the batch engine against values/: closed ones, those of redshifts, those of the history. */
function batchCheck(
  name: string,
  bound: number,
  quantities: readonly string[],
  tier?: RecombinationTier,
): CoefficientCheck {
  const model = tier === undefined ? "plain" : "planckFifthColumn";
  // Files of several redshifts: one where everything matters, one near today.
  const asked = references
    .filter((file) => file.tier === tier && quantities.includes(file.quantity) && !file.name.endsWith(".between"))
    .flatMap(({ quantity, rows }) => {
      const own = rows.filter(
        (row) => row.model === model && (row.arguments[0] ?? 1) > 0 && (row.arguments[0] ?? 1) <= 3000,
      );
      const ends = own.length > 1 ? [own[0]!, own[own.length - 1]!] : own;
      return ends.map((row) => ({
        output: row.arguments.length > 0 ? `${quantity}(${row.arguments.join(",")})` : quantity,
        value: row.value,
      }));
    });
  return {
    name,
    modules: ["batch/prepareBatch"],
    *excesses(copy) {
      const base = givens.get(model)!;
      const values = batchValues(
        copy,
        tier === undefined ? base : { ...base, recombination: tier },
        asked.map((each) => each.output),
      );
      for (const { output, value } of asked) yield relative(values[output]!, value) / bound;
    },
  };
}

const closedOutputs = ["neutrinoDensity", "helium", "equalityRedshift", "darkEnergyFraction"];
const redshiftOutputs = [
  "equalityWavenumber",
  "hubbleRate",
  "hubbleDistance",
  "criticalDensity",
  "comovingDistance",
  "transverseDistance",
  "angularDiameterDistance",
  "luminosityDistance",
  "volumeDistance",
  "distanceModulus",
  "comovingVolumeElement",
  "properScale",
  "alcockPaczynskiRatio",
  "lookbackTime",
  "lightTravelDistance",
];
const historyOutputs = [
  "lastScatteringRedshift",
  "lastScatteringSoundHorizon",
  "acousticAngle",
  "acousticMultipole",
  "shiftParameter",
  "dragRedshift",
  "dragSoundHorizon",
  "dragSoundHorizonTimesReducedHubble",
  "equalityHorizonAngle",
  "equalitySoundAngle",
  "dampingWavenumber",
  "dampingAngle",
];

/** The engine's row as it is closed, against R(z) of values/. */
const batchLoadingCheck: CoefficientCheck = {
  name: "batch engine, baryon loading",
  modules: ["batch/closeRow"],
  *excesses(copy) {
    const { RowCloser } = copy.load("batch/closeRow") as typeof closeRow;
    const { BatchRow } = copy.load("batch/batchRow") as typeof batchRow;
    const { bindColumns } = copy.load("batch/batchColumns") as typeof batchColumns;
    const { constantsSets: sets } = copy.load("constants/constantsSets") as typeof constantsSets;
    const row = new BatchRow();
    const closer = new RowCloser(bindColumns({}, givens.get("plain")!, 1), sets.codata2022);
    yield closer.close(0, row) ? 0 : Number.POSITIVE_INFINITY;
    for (const { arguments: values, value } of spread(
      references.find((file) => file.name === "baryonLoading")!.rows,
      "plain",
    )) {
      yield relative(row.loading / (1 + values[0]!), value) / referenceBounds.baryonLoading![0];
    }
  },
};

const withHistory = "ofReferenceModel.";

/** All checks, the cheapest first: in this order they are asked until one fails. */
export const coefficientChecks: readonly CoefficientCheck[] = [
  ...formulaChecks.filter((check) => !check.modules.includes("solve/evaluateModel")),
  fermiDiracCheck,
  ...formulaChecks.filter(
    (check) => check.modules.includes("solve/evaluateModel") && !check.name.startsWith(withHistory),
  ),
  reducedHubbleCheck,
  shellCheck,
  batchLoadingCheck,
  batchCheck("batch engine, closed", 1e-12, closedOutputs),
  // Ten times what test/cosmo/batch/accuracy.test.ts measured: 1e-10.
  batchCheck("batch engine, redshifts", 1e-9, redshiftOutputs),
  modelCheck("plain"),
  modelCheck("m09"),
  modelCheck("m28"),
  modelCheck("plain", "saha"),
  modelCheck("plain", "peebles"),
  // Measured for this model: 4.7e-8. The engine's promise is 1e-6.
  batchCheck("batch engine, history", 3e-7, historyOutputs, "calibrated"),
  modelCheck("planckFifthColumn", "calibrated"),
  ...formulaChecks.filter((check) => check.name.startsWith(withHistory)),
];
