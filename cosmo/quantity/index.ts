export { Evaluation, type Part, type Precision } from "./evaluation";
export {
  type Computed,
  checkArguments,
  computeQuantity,
  computeWithNotes,
  evaluateQuantity,
  pastRedshiftArgument,
  type Quantity,
  type QuantityArgument,
  type QuantityValue,
  redshiftArgument,
  type Uncertainty,
} from "./quantity";
export type { ValidityNote } from "./validityNote";
