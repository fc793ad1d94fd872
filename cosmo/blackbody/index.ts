export {
  blackbodyChromaticity,
  blackbodyChromaticityXQuantity,
  blackbodyChromaticityYQuantity,
  type Chromaticity,
} from "./blackbodyChromaticity";
export type { BlackbodyModel, BlackbodyQuantity } from "./blackbodyModel";
export { photonNumberDensity, photonNumberDensityQuantity } from "./photonNumberDensity";
export { backgroundBrightnessQuantity, planckLaw } from "./planckLaw";
export { wienFrequency, wienFrequencyQuantity } from "./wienFrequency";
export { wienWavelength, wienWavelengthQuantity } from "./wienWavelength";
