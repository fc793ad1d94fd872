export type { ClosedDarkEnergy, ClosedModel, ClosedNeutrinos, ModelSolution } from "./closedModel";
export { checkEquation, checkTable, type DarkEnergyEquation, type DarkEnergyTable } from "./darkEnergyFunction";
export { type ModelField, modelFieldByName, modelFields } from "./fields";
export type {
  ConventionGivens,
  DarkEnergyGivens,
  DerivedGivens,
  ModelGivens,
  NeutrinoGivens,
  NeutrinoOrdering,
  RecombinationTier,
  UncertaintyGivens,
} from "./givens";
export { neutrinoMassesFromSum } from "./neutrinoMasses";
export { hundredKmPerSecondPerMpc, photonDensity, unitDensity } from "./photonDensity";
export { type FlatGivens, validateGivens } from "./validateGivens";
