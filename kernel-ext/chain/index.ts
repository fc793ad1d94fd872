export { histogram, type PlaneDensity, planeDensity, shownRange } from "./binnedDensity";
export { effectiveSampleSize } from "./effectiveSampleSize";
export { burnInRows, checkWeights, markedRows } from "./keepRows";
export { type ChainInput, type LoadedChain, loadChain } from "./loadChain";
export { type ColumnSummary, summarizeColumn } from "./summarizeColumn";
export { correlationMatrix, type WeightedMoments, weightedMoments } from "./weightedMoments";
export { weightedQuantiles } from "./weightedQuantiles";
