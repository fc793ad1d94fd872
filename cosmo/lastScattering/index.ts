export { baryonLoading, baryonLoadingQuantity, baryonLoadingToday } from "./baryonLoading";
export { dragDepth, dragDepthQuantity } from "./dragDepth";
export { dragEpochPart, dragRedshift, dragRedshiftQuantity } from "./dragRedshift";
export {
  type FitInForce,
  fitsInForce,
  givesDragSoundHorizon,
  methodWithFits,
  type ReplaceableStep,
} from "./fitsInForce";
export { type HistoryQuantityFields, historyQuantity, throughLastScattering } from "./historyQuantity";
export { lastScatteringPart, lastScatteringRedshift, lastScatteringRedshiftQuantity } from "./lastScatteringRedshift";
export { opticalDepth, opticalDepthQuantity } from "./opticalDepth";
export { OpticalDepthHistory, opticalDepthPart } from "./opticalDepthHistory";
export {
  ionizedFraction,
  ionizedFractionQuantity,
  reionizationDepthQuantity,
  reionizationRedshiftPart,
  reionizationRedshiftQuantity,
} from "./reionization";
export {
  visibility,
  visibilityHalfHeights,
  visibilityMedianRedshift,
  visibilityMedianRedshiftQuantity,
  visibilityPeakRedshift,
  visibilityPeakRedshiftQuantity,
  visibilityQuantity,
  visibilityWidth,
  visibilityWidthQuantity,
} from "./visibility";
