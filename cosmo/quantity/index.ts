export { Evaluation, type Part, type Precision } from "./evaluation";
export {
  type Computed,
  checkArguments,
  evaluateQuantity,
  pastRedshiftArgument,
  type Quantity,
  type QuantityArgument,
  type QuantityValue,
  redshiftArgument,
  type ValidityNote,
} from "./quantity";
