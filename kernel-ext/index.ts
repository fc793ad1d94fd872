/** What the package offers; a cell of the kernel knows all of it without an import. */
export type { ModelGivens } from "../cosmo/model";
export type { QuantityValue } from "../cosmo/quantity";
export { evaluateModel, type ModelNumbers } from "../cosmo/solve";
export {
  type AcousticScaleValues,
  acousticScaleCell,
  type DistanceCellOptions,
  type DistanceValues,
  distanceCell,
  type ExpansionCellOptions,
  type ExpansionValues,
  expansionCell,
  type LastScatteringValues,
  lastScatteringCell,
  type RecombinationCellOptions,
  type RecombinationValues,
  type RedshiftList,
  recombinationCell,
  type SoundHorizonValues,
  soundHorizonCell,
} from "./cells";
export {
  type CellOutputOptions,
  CellResult,
  type Chart,
  cellOutput,
  type Displayable,
  displaySymbol,
  formatNumber,
  formatWithError,
  intervalChart,
  lineChart,
  type MimeBundle,
  type Progress,
  type ProgressOptions,
  progress,
  type Table,
  type TableOptions,
  table,
  type VegaLiteSpec,
} from "./display";
