export { type AcousticScaleValues, acousticScaleCell } from "./acousticScaleCell";
export { type ChainCellOptions, type ChainValues, chainCell } from "./chainCell";
export { type DistanceCellOptions, type DistanceValues, distanceCell } from "./distanceCell";
export { type ExpansionCellOptions, type ExpansionValues, expansionCell } from "./expansionCell";
export { type LastScatteringValues, lastScatteringCell } from "./lastScatteringCell";
export { type PeakValues, peakCell } from "./peakCell";
export { type RecombinationCellOptions, type RecombinationValues, recombinationCell } from "./recombinationCell";
export type { RedshiftList } from "./redshiftList";
export {
  type SensitivityCellOptions,
  type SensitivityMatrix,
  type SensitivityValues,
  sensitivityCell,
} from "./sensitivityCell";
export { type SoundHorizonValues, soundHorizonCell } from "./soundHorizonCell";
export { type TimelineEntry, type TimelineValues, timelineCell } from "./timelineCell";
