export type { FindMinimumOptions, MinimumResult } from "./findMinimum";
export { findMinimum } from "./findMinimum";
export type { FindRootOptions } from "./findRoot";
export { findRoot } from "./findRoot";
export type { QuadratureRule } from "./gaussLegendre";
export { gaussLegendre } from "./gaussLegendre";
export type { IntegrateOptions } from "./integrate";
export { integrate } from "./integrate";
export type { NumericalResult } from "./numericalResult";
