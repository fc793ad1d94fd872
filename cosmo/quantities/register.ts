import {
  acousticAngleQuantity,
  acousticMultipoleQuantity,
  dampingAngleQuantity,
  dampingWavenumberQuantity,
  dragSoundHorizonQuantity,
  dragSoundHorizonTimesReducedHubbleQuantity,
  equalityHorizonAngleQuantity,
  equalitySoundAngleQuantity,
  lastScatteringSoundHorizonQuantity,
  shiftParameterQuantity,
  soundHorizonQuantity,
  soundSpeedQuantity,
} from "../acoustics";
import {
  alcockPaczynskiRatioQuantity,
  angularDiameterDistanceQuantity,
  comovingDistanceQuantity,
  comovingVolumeElementQuantity,
  comovingVolumeQuantity,
  distanceModulusQuantity,
  hubbleDistanceQuantity,
  luminosityDistanceQuantity,
  properScaleQuantity,
  transverseDistanceQuantity,
  volumeDistanceQuantity,
} from "../distances";
import { UnknownNameError } from "../errors";
import {
  accelerationRedshiftQuantity,
  baryonFractionAtQuantity,
  coldMatterFractionAtQuantity,
  criticalDensityQuantity,
  curvatureFractionAtQuantity,
  darkEnergyFractionAtQuantity,
  decelerationAtQuantity,
  equalityRedshiftQuantity,
  equalityWavenumberQuantity,
  equationOfStateAtQuantity,
  hubbleRateQuantity,
  type ModelQuantity,
  matterFractionAtQuantity,
  neutrinoFractionAtQuantity,
  photonFractionAtQuantity,
  radiationFractionAtQuantity,
} from "../expansion";
import {
  baryonLoadingQuantity,
  dragDepthQuantity,
  dragRedshiftQuantity,
  ionizedFractionQuantity,
  lastScatteringRedshiftQuantity,
  opticalDepthQuantity,
  reionizationDepthQuantity,
  reionizationRedshiftQuantity,
  visibilityMedianRedshiftQuantity,
  visibilityPeakRedshiftQuantity,
  visibilityQuantity,
  visibilityWidthQuantity,
} from "../lastScattering";
import {
  hydrogenIonizedFractionQuantity,
  matterTemperatureQuantity,
  radiationTemperatureQuantity,
  residualIonizedFractionQuantity,
} from "../recombination";
import {
  ageAtQuantity,
  ageQuantity,
  conformalTimeQuantity,
  eventHorizonQuantity,
  lightTravelDistanceQuantity,
  lookbackTimeQuantity,
  particleHorizonQuantity,
} from "../times";
import { modelQuantities } from "./modelQuantities";

/** Every quantity the program knows, in the order in which tables list them: one line a quantity. */
const quantities: readonly ModelQuantity[] = [
  ...modelQuantities,
  ageQuantity,
  lookbackTimeQuantity,
  ageAtQuantity,
  lightTravelDistanceQuantity,
  conformalTimeQuantity,
  particleHorizonQuantity,
  eventHorizonQuantity,
  hubbleRateQuantity,
  hubbleDistanceQuantity,
  criticalDensityQuantity,
  matterFractionAtQuantity,
  baryonFractionAtQuantity,
  coldMatterFractionAtQuantity,
  neutrinoFractionAtQuantity,
  radiationFractionAtQuantity,
  photonFractionAtQuantity,
  darkEnergyFractionAtQuantity,
  curvatureFractionAtQuantity,
  equationOfStateAtQuantity,
  decelerationAtQuantity,
  comovingDistanceQuantity,
  transverseDistanceQuantity,
  angularDiameterDistanceQuantity,
  luminosityDistanceQuantity,
  volumeDistanceQuantity,
  distanceModulusQuantity,
  comovingVolumeQuantity,
  comovingVolumeElementQuantity,
  properScaleQuantity,
  alcockPaczynskiRatioQuantity,
  equalityRedshiftQuantity,
  equalityWavenumberQuantity,
  accelerationRedshiftQuantity,
  radiationTemperatureQuantity,
  matterTemperatureQuantity,
  ionizedFractionQuantity,
  residualIonizedFractionQuantity,
  hydrogenIonizedFractionQuantity,
  reionizationRedshiftQuantity,
  reionizationDepthQuantity,
  opticalDepthQuantity,
  dragDepthQuantity,
  visibilityQuantity,
  baryonLoadingQuantity,
  soundSpeedQuantity,
  soundHorizonQuantity,
  lastScatteringRedshiftQuantity,
  lastScatteringSoundHorizonQuantity,
  visibilityPeakRedshiftQuantity,
  visibilityWidthQuantity,
  visibilityMedianRedshiftQuantity,
  acousticAngleQuantity,
  acousticMultipoleQuantity,
  shiftParameterQuantity,
  dragRedshiftQuantity,
  dragSoundHorizonQuantity,
  dragSoundHorizonTimesReducedHubbleQuantity,
  dampingWavenumberQuantity,
  dampingAngleQuantity,
  equalityHorizonAngleQuantity,
  equalitySoundAngleQuantity,
];

/** The register: quantities by name. */
export const quantityRegister: ReadonlyMap<string, ModelQuantity> = new Map(
  quantities.map((quantity) => [quantity.name, quantity]),
);

/** A quantity by name; an unknown one is refused with the name that was probably meant. */
export function findQuantity(name: string, where: string): ModelQuantity {
  const found = quantityRegister.get(name);
  if (found === undefined) {
    throw new UnknownNameError({ where, kind: "quantity", given: name, known: [...quantityRegister.keys()] });
  }
  return found;
}
