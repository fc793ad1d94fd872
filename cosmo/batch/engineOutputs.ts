import { arcsecond, lightSpeed } from "../constants";
import { unitHubbleDistance, unitHubbleTime } from "../expansion";
import { unitDensity } from "../model";
import type { QuantityRequest } from "../quantities";
import type { BatchRow } from "./batchRow";
import { transverseFrom } from "./horizons";
import type { EngineNeeds, RowEngine } from "./rowEngine";

/** What an output needs of the engine, and how it is read off once the row is computed. */
export interface EngineOutput {
  readonly needs: { readonly history?: true; readonly damping?: true; readonly age?: true };
  readonly read: (engine: RowEngine) => number;
}

/** An output of redshifts: read at their places on the ladder. */
type LadderRead = (engine: RowEngine, z: number, place: number, before: number, from: number) => number;

/** Beyond this redshift distances and times take the single path. */
const highestRedshift = 3000;

const ofModel = (read: (row: BatchRow) => number): EngineOutput => ({ needs: {}, read: ({ row }) => read(row) });
const ofHistory = (read: (engine: RowEngine) => number): EngineOutput => ({ needs: { history: true }, read });
const ofDamping = (read: (engine: RowEngine) => number): EngineOutput => ({
  needs: { history: true, damping: true },
  read,
});

const square = (row: BatchRow) => row.reducedHubble * row.reducedHubble;

/** Outputs without arguments. */
const plain: Readonly<Record<string, EngineOutput>> = {
  hubble: ofModel((row) => row.hubble),
  reducedHubble: ofModel((row) => row.reducedHubble),
  baryonDensity: ofModel((row) => row.baryonDensity),
  coldMatterDensity: ofModel((row) => row.coldMatterDensity),
  matterDensity: ofModel((row) => row.matterDensity),
  neutrinoDensity: ofModel((row) => row.neutrinoDensity),
  darkEnergyDensity: ofModel((row) => row.darkEnergyDensity),
  photonDensity: ofModel((row) => row.photonDensity),
  radiationDensity: ofModel((row) => row.radiationDensity),
  baryonFraction: ofModel((row) => row.baryonDensity / square(row)),
  coldMatterFraction: ofModel((row) => row.coldMatterDensity / square(row)),
  matterFraction: ofModel((row) => row.matterDensity / square(row)),
  neutrinoFraction: ofModel((row) => row.neutrinoDensity / square(row)),
  darkEnergyFraction: ofModel((row) => row.darkEnergyFraction),
  photonFraction: ofModel((row) => row.photonDensity / square(row)),
  radiationFraction: ofModel((row) => row.radiationDensity / square(row)),
  curvature: ofModel((row) => row.curvature),
  matterFractionTimesCubedHubble: ofModel((row) => row.matterDensity * row.reducedHubble),
  "darkEnergy.w0": ofModel((row) => row.w0),
  "darkEnergy.wa": ofModel((row) => row.wa),
  "neutrinos.effectiveNumber": ofModel((row) => row.effectiveNumber),
  "neutrinos.massSum": ofModel((row) => row.massSum),
  photonTemperature: ofModel((row) => row.photonTemperature),
  helium: ofModel((row) => row.helium),

  age: { needs: { age: true }, read: ({ horizons }) => horizons.age },
  equalityRedshift: { needs: {}, read: (engine) => 1 / engine.equalityScaleFactor() - 1 },
  equalityWavenumber: {
    needs: {},
    read: (engine) => {
      const a = engine.equalityScaleFactor();
      return (100 * Math.sqrt(engine.squaredTerm(a))) / (a * (lightSpeed / 1000));
    },
  },
  lastScatteringRedshift: ofHistory((engine) => engine.lastScatteringRedshift),
  lastScatteringSoundHorizon: ofHistory(({ horizons }) => horizons.lastScatteringSound),
  acousticAngle: ofHistory(({ horizons }) => (100 * horizons.lastScatteringSound) / horizons.lastScatteringDistance),
  acousticMultipole: ofHistory(
    ({ horizons }) => (Math.PI * horizons.lastScatteringDistance) / horizons.lastScatteringSound,
  ),
  shiftParameter: ofHistory(
    ({ horizons, row }) => (Math.sqrt(row.matterDensity) * horizons.lastScatteringDistance) / unitHubbleDistance,
  ),
  dragRedshift: ofHistory((engine) => engine.dragRedshift),
  dragSoundHorizon: ofHistory(({ horizons }) => horizons.dragSound),
  dragSoundHorizonTimesReducedHubble: ofHistory(({ horizons, row }) => horizons.dragSound * row.reducedHubble),
  equalityHorizonAngle: ofHistory((engine) => {
    const { row, horizons } = engine;
    return (100 * horizons.conformalTimeAt(row, engine.equalityScaleFactor())) / horizons.lastScatteringDistance;
  }),
  equalitySoundAngle: ofHistory((engine) => {
    const { row, horizons } = engine;
    return (100 * horizons.soundHorizonAt(row, engine.equalityScaleFactor())) / horizons.lastScatteringDistance;
  }),
  dampingWavenumber: ofDamping((engine) => engine.dampingWavenumber),
  dampingAngle: ofDamping(
    (engine) => (100 * Math.PI) / (engine.dampingWavenumber * engine.horizons.lastScatteringDistance),
  ),
};

const lightBetween = (engine: RowEngine, place: number, before: number) =>
  unitHubbleDistance * (engine.ladder.light[place] - engine.ladder.light[before]);
const timeBetween = (engine: RowEngine, place: number, before: number) =>
  engine.ladder.time[place] - engine.ladder.time[before];
const transverseBetween = (engine: RowEngine, place: number, before: number) =>
  transverseFrom(engine.row, lightBetween(engine, place, before));
/** H in km/s/Mpc, and c over it in Mpc. */
const rateAt = (engine: RowEngine, z: number, place: number) =>
  100 * Math.sqrt(engine.ladder.squaredTerm[place]) * (1 + z) * (1 + z);
const hubbleDistanceAt = (engine: RowEngine, z: number, place: number) => lightSpeed / 1000 / rateAt(engine, z, place);

/** Outputs of (z). */
const atRedshift: Readonly<Record<string, LadderRead>> = {
  hubbleRate: rateAt,
  hubbleDistance: hubbleDistanceAt,
  criticalDensity: (engine, z, place) => unitDensity(engine.constants) * (rateAt(engine, z, place) / 100) ** 2,
  volumeDistance: (engine, z, place, before) =>
    z === 0 ? 0 : Math.cbrt(transverseBetween(engine, place, before) ** 2 * z * hubbleDistanceAt(engine, z, place)),
  distanceModulus: (engine, z, place, before) =>
    5 * Math.log10((1 + z) * transverseBetween(engine, place, before)) + 25,
  comovingVolumeElement: (engine, z, place, before) =>
    (4 * Math.PI * hubbleDistanceAt(engine, z, place) * transverseBetween(engine, place, before) ** 2) / 1e9,
  properScale: (engine, z, place, before) => (1000 * arcsecond * transverseBetween(engine, place, before)) / (1 + z),
  alcockPaczynskiRatio: (engine, z, place, before) =>
    transverseBetween(engine, place, before) / hubbleDistanceAt(engine, z, place),
};

/** Outputs of (z) or (z1, z2). */
const betweenRedshifts: Readonly<Record<string, LadderRead>> = {
  comovingDistance: (engine, _z, place, before) => lightBetween(engine, place, before),
  transverseDistance: (engine, _z, place, before) => transverseBetween(engine, place, before),
  angularDiameterDistance: (engine, z, place, before) => transverseBetween(engine, place, before) / (1 + z),
  luminosityDistance: (engine, z, place, before, from) =>
    (transverseBetween(engine, place, before) * (1 + z)) / (1 + from) ** 2,
  lookbackTime: (engine, _z, place, before) => unitHubbleTime * timeBetween(engine, place, before),
  lightTravelDistance: (engine, _z, place, before) => unitHubbleDistance * timeBetween(engine, place, before),
};

/** How an output is had from the engine, or undefined where only the single path knows it. */
export function engineOutput(
  request: QuantityRequest,
): { output: EngineOutput; redshifts: readonly number[] } | undefined {
  const { name, arguments: values } = request;
  if (values.length === 0) {
    const output = plain[name];
    return output === undefined ? undefined : { output, redshifts: [] };
  }
  const read = values.length === 1 ? (atRedshift[name] ?? betweenRedshifts[name]) : betweenRedshifts[name];
  const before = values.length === 2 ? values[0] : 0;
  const z = values[values.length - 1];
  if (read === undefined || before < 0 || z < before || z > highestRedshift) return undefined;
  let place = -1;
  let placeBefore = -1;
  return {
    output: {
      needs: {},
      read: (engine) => {
        if (place < 0) {
          place = engine.ladder.placeOf(z);
          placeBefore = engine.ladder.placeOf(before);
        }
        return read(engine, z, place, placeBefore, before);
      },
    },
    redshifts: [before, z],
  };
}

/** What a set of outputs needs together. */
export function needsOf(outputs: readonly { output: EngineOutput; redshifts: readonly number[] }[]): EngineNeeds {
  const redshifts = outputs.flatMap((each) => each.redshifts);
  return {
    history: outputs.some(({ output }) => output.needs.history === true),
    damping: outputs.some(({ output }) => output.needs.damping === true),
    age: outputs.some(({ output }) => output.needs.age === true),
    redshifts: redshifts.length === 0 ? undefined : redshifts,
  };
}
