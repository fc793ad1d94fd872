export type { ClosedModel, ClosedNeutrinos, ModelSolution } from "./closedModel";
export { type ModelField, modelFieldByName, modelFields } from "./fields";
export type {
  ConventionGivens,
  DarkEnergyGivens,
  DerivedGivens,
  ModelGivens,
  NeutrinoGivens,
  NeutrinoOrdering,
  RecombinationTier,
} from "./givens";
export { neutrinoMassesFromSum } from "./neutrinoMasses";
export { hundredKmPerSecondPerMpc, photonDensity, unitDensity } from "./photonDensity";
export { type FlatGivens, validateGivens } from "./validateGivens";
