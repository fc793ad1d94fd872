import { readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { prepareBatch, rowStatus } from "../../../cosmo/batch";
import type { ModelGivens } from "../../../cosmo/model";
import { findQuantity, parseRequest } from "../../../cosmo/quantities";
import { Evaluation } from "../../../cosmo/quantity";
import { closeModel } from "../../../cosmo/solve";
import { boxModels, cornerModels } from "./boxModels";

/**
 * Every output of the engine with the largest relative difference from the single path that was measured, over the 48 reference models
 * in both tiers and 1,000 random ones. The bound is ten times that, and never above the promised 1e-6.
 */
const measured: Readonly<Record<string, number>> = {
  hubble: 0,
  reducedHubble: 0,
  baryonDensity: 0,
  coldMatterDensity: 0,
  matterDensity: 1e-15,
  neutrinoDensity: 1e-15,
  darkEnergyDensity: 1e-15,
  photonDensity: 0,
  radiationDensity: 1e-15,
  baryonFraction: 1e-15,
  coldMatterFraction: 1e-15,
  matterFraction: 1e-15,
  neutrinoFraction: 1e-15,
  darkEnergyFraction: 1e-15,
  photonFraction: 1e-15,
  radiationFraction: 1e-15,
  curvature: 0,
  matterFractionTimesCubedHubble: 1e-15,
  "darkEnergy.w0": 0,
  "darkEnergy.wa": 0,
  "neutrinos.effectiveNumber": 0,
  "neutrinos.massSum": 1e-15,
  photonTemperature: 0,
  helium: 1e-15,
  age: 1.7e-8,
  equalityRedshift: 1e-15,
  equalityWavenumber: 1.2e-10,
  lastScatteringRedshift: 4.1e-8,
  lastScatteringSoundHorizon: 2.7e-8,
  acousticAngle: 2.8e-8,
  acousticMultipole: 2.8e-8,
  shiftParameter: 1.4e-9,
  dragRedshift: 1.2e-8,
  dragSoundHorizon: 8.2e-9,
  dragSoundHorizonTimesReducedHubble: 8.2e-9,
  equalityHorizonAngle: 1.5e-9,
  equalitySoundAngle: 1.5e-9,
  dampingWavenumber: 4.3e-7,
  dampingAngle: 4.3e-7,
  "hubbleRate(0.7)": 7e-11,
  "hubbleDistance(2)": 7e-11,
  "criticalDensity(3)": 7e-11,
  "comovingDistance(1100)": 7e-11,
  "comovingDistance(0.2,0.9)": 7e-11,
  "transverseDistance(0.5)": 7e-11,
  "transverseDistance(0.3,2)": 7e-11,
  "angularDiameterDistance(1.6)": 7e-11,
  "luminosityDistance(1.1)": 7e-11,
  "luminosityDistance(0.4,1.5)": 7e-11,
  "volumeDistance(2.3)": 7e-11,
  "distanceModulus(0.03)": 7e-11,
  "comovingVolumeElement(1)": 7e-11,
  "properScale(0.8)": 7e-11,
  "alcockPaczynskiRatio(1.5)": 7e-11,
  "lookbackTime(1.1)": 7e-11,
  "lookbackTime(0.5,3)": 7e-11,
  "lightTravelDistance(6)": 7e-11,
};

const promised = 1e-6;

/** Compares models one by one and returns the largest relative difference of every output. */
function worstDifferences(models: readonly ModelGivens[]): { worst: Map<string, number>; engineRows: number } {
  const outputs = Object.keys(measured);
  const worst = new Map<string, number>(outputs.map((name) => [name, 0]));
  let engineRows = 0;
  for (const givens of models) {
    const { hubble, baryonDensity, coldMatterDensity, ...shared } = givens;
    const plan = prepareBatch({ outputs, shared, closeModel });
    const out = Object.fromEntries(plan.outputs.map((name) => [name, new Float64Array(1)]));
    const status = new Uint8Array(1);
    const columns = { hubble: hubble!, baryonDensity: baryonDensity!, coldMatterDensity: coldMatterDensity! };
    plan.run(columns, { from: 0, to: 1 }, out, undefined, status);
    // Rows that took the single path would agree for no merit of the engine.
    if (status[0] !== rowStatus.engine) continue;
    engineRows++;
    const evaluation = new Evaluation(closeModel(givens));
    for (const name of plan.outputs) {
      const request = parseRequest(name);
      const { value } = findQuantity(request.name, "test").compute(evaluation, request.arguments);
      const difference = value === 0 ? Math.abs(out[name]![0]!) : Math.abs(out[name]![0]! / value - 1);
      worst.set(name, Math.max(worst.get(name)!, Number.isNaN(difference) ? Number.POSITIVE_INFINITY : difference));
    }
  }
  return { worst, engineRows };
}

function requireBounds(worst: ReadonlyMap<string, number>): void {
  const table = [...worst].map(([name, difference]) => `${name.padEnd(38)} ${difference.toExponential(2)}`).join("\n");
  const bound = (name: string) => Math.min(promised, 10 * Math.max(measured[name]!, 2e-15));
  const beyond = [...worst].filter(([name, difference]) => !(difference <= bound(name)));
  expect(beyond, table).toEqual([]);
}

describe("the batch engine against the single path", () => {
  it("agrees on every output of every reference model, in both tiers", () => {
    const file = join(__dirname, "../../reference/models.json");
    const models = (JSON.parse(readFileSync(file, "utf8")) as { givens: ModelGivens }[]).flatMap(({ givens }) => [
      givens,
      { ...givens, recombination: "peebles" as const },
    ]);
    const { worst, engineRows } = worstDifferences(models);
    expect(engineRows).toBe(models.length);
    requireBounds(worst);
  }, 300_000);

  it("agrees on every output of 1,000 random models over the promised range", () => {
    const models = boxModels(1000, 20260101);
    const { worst, engineRows } = worstDifferences(models);
    // The others lie near a turning point or have no plain closure: measured 1000.
    expect(engineRows).toBeGreaterThan(980);
    requireBounds(worst);
  }, 1_200_000);

  it("keeps the promise in the corners of the validated range", () => {
    const models = cornerModels(200, 99);
    const { worst, engineRows } = worstDifferences(models);
    // Many corners lie near a turning point and take the single path: measured 173 by the engine.
    expect(engineRows).toBeGreaterThan(150);
    // Measured at most 7.0e-7: k_D of thin gas rich in helium.
    const beyond = [...worst].filter(([, difference]) => !(difference <= promised));
    expect(beyond).toEqual([]);
  }, 600_000);
});
