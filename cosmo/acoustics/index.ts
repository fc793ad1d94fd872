export { acousticAngle, acousticAngleQuantity, lastScatteringDistancePart } from "./acousticAngle";
export { acousticMultipole, acousticMultipoleQuantity } from "./acousticMultipole";
export { dampingAngle, dampingAngleQuantity } from "./dampingAngle";
export { dampingWavenumber, dampingWavenumberQuantity } from "./dampingWavenumber";
export {
  dragSoundHorizon,
  dragSoundHorizonQuantity,
  dragSoundHorizonTimesReducedHubbleQuantity,
} from "./dragSoundHorizon";
export { earlyDarkEnergy } from "./earlyDarkEnergy";
export {
  equalityHorizonAngle,
  equalityHorizonAngleQuantity,
  equalitySoundAngle,
  equalitySoundAngleQuantity,
} from "./equalityAngles";
export { lastScatteringSoundHorizon, lastScatteringSoundHorizonQuantity } from "./lastScatteringSoundHorizon";
export { peakHeightRatio, peakHeightRatioQuantity } from "./peakHeightRatio";
export { peakMultipole, peakMultipoleQuantity, peakSpacing, peakSpacingQuantity } from "./peakMultipole";
export { shiftParameter, shiftParameterQuantity } from "./shiftParameter";
export { soundHorizon, soundHorizonQuantity } from "./soundHorizon";
export { soundSpeed, soundSpeedQuantity } from "./soundSpeed";
