export { accelerationRedshift, accelerationRedshiftQuantity } from "./accelerationRedshift";
export { backgroundIntegral } from "./backgroundIntegral";
export { closeDarkEnergyFunction } from "./closeDarkEnergy";
export { criticalDensity, criticalDensityQuantity } from "./criticalDensity";
export { darkEnergyGrowth } from "./darkEnergyGrowth";
export { decelerationAt, decelerationAtQuantity } from "./decelerationAt";
export { earlyDarkEnergySharePart } from "./earlyDarkEnergyShare";
export { equalityRedshift, equalityRedshiftQuantity } from "./equalityRedshift";
export { equalityWavenumber, equalityWavenumberQuantity } from "./equalityWavenumber";
export { equationOfStateAt, equationOfStateAtQuantity } from "./equationOfStateAt";
export {
  Expansion,
  expansionPart,
  type ModelEvaluation,
  type ModelPart,
  type ModelQuantity,
  stateHistoryPart,
  turningRedshiftPart,
} from "./expansion";
export { fermiDiracEnergy, fermiDiracPressure } from "./fermiDirac";
export {
  baryonFractionAt,
  baryonFractionAtQuantity,
  coldMatterFractionAt,
  coldMatterFractionAtQuantity,
  curvatureFractionAt,
  curvatureFractionAtQuantity,
  darkEnergyFractionAt,
  darkEnergyFractionAtQuantity,
  matterFractionAt,
  matterFractionAtQuantity,
  neutrinoFractionAt,
  neutrinoFractionAtQuantity,
  photonFractionAt,
  photonFractionAtQuantity,
  radiationFractionAt,
  radiationFractionAtQuantity,
} from "./fractionsAt";
export { hubbleRate, hubbleRateQuantity } from "./hubbleRate";
export { unitHubbleDistance, unitHubbleTime } from "./hubbleUnits";
export {
  massiveNeutrinoDensity,
  masslessSpeciesDensity,
  massToTemperature,
  neutrinoTemperature,
} from "./neutrinoDensity";
export { redshiftAtHubbleRate, redshiftAtHubbleRateQuantities } from "./redshiftAtHubbleRate";
export { redshiftAtTemperature, redshiftAtTemperatureQuantity } from "./redshiftAtTemperature";
export { redshiftNodesPart } from "./redshiftNodes";
export { requireBigBang, requireFiniteStart, requireRedshift } from "./requirePast";
export { askedValue, type Branch, type RedshiftCurve, requireAsked, solveRedshift } from "./solveRedshift";
export { StateHistory, stateFunction } from "./stateHistory";
export { turnaroundRedshiftPart } from "./turnaround";
