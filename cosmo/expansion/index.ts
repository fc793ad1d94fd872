export { darkEnergyGrowth } from "./darkEnergyGrowth";
export {
  Expansion,
  expansionPart,
  type ModelEvaluation,
  type ModelPart,
  type ModelQuantity,
  turningRedshiftPart,
} from "./expansion";
export { fermiDiracEnergy, fermiDiracPressure } from "./fermiDirac";
export { hubbleRate, hubbleRateQuantity } from "./hubbleRate";
export {
  massiveNeutrinoDensity,
  masslessSpeciesDensity,
  massToTemperature,
  neutrinoTemperature,
} from "./neutrinoDensity";
export { requireBigBang, requireRedshift } from "./requirePast";
