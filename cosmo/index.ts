export { type ConstantsSet, type ConstantsSetName, constantsSets } from "./constants";
export {
  CosmologyError,
  DataRowError,
  DomainError,
  InconsistentParametersError,
  NoAnswerError,
  NotConvergedError,
  UnknownNameError,
} from "./errors";
export type { ModelEvaluation, ModelQuantity } from "./expansion";
export {
  type ClosedModel,
  type ClosedNeutrinos,
  type ConventionGivens,
  type DarkEnergyEquation,
  type DarkEnergyGivens,
  type DarkEnergyTable,
  type ModelField,
  type ModelGivens,
  modelFields,
  type NeutrinoGivens,
  type NeutrinoOrdering,
  type RecombinationTier,
} from "./model";
export {
  findQuantity,
  parseRequest,
  parseRequests,
  type QuantityRequest,
  quantityRegister,
} from "./quantities";
export {
  Evaluation,
  evaluateQuantity,
  type Quantity,
  type QuantityArgument,
  type QuantityValue,
  type ValidityNote,
} from "./quantity";
export { closeModel, evaluateModel, ModelNumbers, type Origin } from "./solve";
export { citation, type Source, type SourceKey, sources } from "./sources";
