export { ageCarrollQuantity, carrollAge } from "./ageCarroll";
export {
  aubourgDragSoundHorizon,
  aubourgDragSoundHorizonWithNeutrinos,
  aubourgFit,
  aubourgOf,
  dragSoundHorizonAubourgQuantity,
  dragSoundHorizonAubourgWithNeutrinosQuantity,
} from "./dragSoundHorizonAubourg";
export {
  briedenDragSoundHorizon,
  briedenFit,
  briedenOf,
  dragSoundHorizonBriedenQuantity,
} from "./dragSoundHorizonBrieden";
export {
  eisensteinHuDragRedshift,
  eisensteinHuEqualityRedshift,
  eisensteinHuEqualityWavenumber,
  eisensteinHuFit,
  eisensteinHuShortSoundHorizon,
  eisensteinHuSilkWavenumber,
  eisensteinHuSoundHorizon,
} from "./eisensteinHu";
export {
  dragRedshiftEisensteinHuQuantity,
  dragSoundHorizonEisensteinHuQuantity,
  dragSoundHorizonEisensteinHuShortQuantity,
  eisensteinHuDragRedshiftOf,
  eisensteinHuSoundHorizonOf,
  equalityRedshiftEisensteinHuQuantity,
  equalityWavenumberEisensteinHuQuantity,
  silkWavenumberEisensteinHuQuantity,
} from "./eisensteinHuQuantities";
export {
  huSugiyamaFit,
  huSugiyamaLastScatteringRedshift,
  huSugiyamaOf,
  lastScatteringRedshiftHuSugiyamaQuantity,
} from "./lastScatteringRedshiftHuSugiyama";
export { luminosityDistancePenQuantity, penLuminosityDistance } from "./luminosityDistancePen";
export { komatsuNeutrinoEnergy, neutrinoDensityKomatsuQuantity } from "./neutrinoDensityKomatsu";
export {
  jonesWyseOpticalDepth,
  jonesWyseVisibility,
  opticalDepthJonesWyseQuantity,
  visibilityJonesWyseQuantity,
} from "./opticalDepthJonesWyse";
export {
  firstPeakPhase,
  radiationToMatterAt,
  secondPeakHeightRatio,
  thirdPeakHeightRatio,
} from "./peakHeights";
export { type PeakSetting, peakPhase } from "./peakPhase";
export { type FitLimit, fitNotes, type PublishedFit } from "./publishedFit";
