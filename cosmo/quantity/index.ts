export { Evaluation, type Part, type Precision } from "./evaluation";
export {
  type Computed,
  checkArguments,
  evaluateQuantity,
  pastRedshiftArgument,
  type Quantity,
  type QuantityArgument,
  type QuantityValue,
  quantityNotes,
  redshiftArgument,
} from "./quantity";
export type { ValidityNote } from "./validityNote";
