export { type Gas, gasPart, heliumToHydrogenRatio } from "./gas";
export { type IonizationHistory, ionizationHistoryPart } from "./ionizationHistory";
export { massFractionFromNucleonFraction, nucleosynthesisHelium } from "./nucleosynthesisHelium";
export { type SahaState, sahaEquilibrium } from "./saha";
