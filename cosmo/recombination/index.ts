export { baryonToPhotonRatio, baryonToPhotonRatioQuantity } from "./baryonToPhotonRatio";
export { type Gas, gasPart, heliumToHydrogenRatio } from "./gas";
export { historyErrorFloor } from "./historyErrorFloor";
export {
  atomSettings,
  equilibriumAt,
  type IonizationHistory,
  ionizationHistoryPart,
  kineticHistory,
} from "./ionizationHistory";
export {
  hydrogenIonizedFraction,
  hydrogenIonizedFractionQuantity,
  residualIonizedFraction,
  residualIonizedFractionQuantity,
} from "./ionizedFractions";
export { massFractionFromNucleonFraction, nucleosynthesisHelium } from "./nucleosynthesisHelium";
export { recombinationNotes } from "./recombinationNotes";
export { reionizationProfile } from "./reionizationProfile";
export { type SahaState, sahaEquilibrium } from "./saha";
export {
  matterTemperature,
  matterTemperatureQuantity,
  radiationTemperature,
  radiationTemperatureQuantity,
} from "./temperatures";
export { recombinationSources, tierMethods } from "./tierStatement";
