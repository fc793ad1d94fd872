export { CosmologyError } from "./cosmologyError";
export { DataRowError, type DataRowFields } from "./dataRowError";
export { describeValue } from "./describeValue";
export { DomainError, type DomainErrorFields } from "./domainError";
export { InconsistentParametersError, type InconsistentParametersFields } from "./inconsistentParametersError";
export { nearestName } from "./nearestName";
export { NoAnswerError, type NoAnswerFields } from "./noAnswerError";
export { NotConvergedError, type NotConvergedFields } from "./notConvergedError";
export { UnknownNameError, type UnknownNameFields } from "./unknownNameError";
