export { age, ageQuantity } from "./age";
export { ageAt, ageAtQuantity } from "./ageAt";
export { conformalTime, conformalTimeQuantity } from "./conformalTime";
export { eventHorizon, eventHorizonQuantity } from "./eventHorizon";
export { lightTravelDistance, lightTravelDistanceQuantity } from "./lightTravelDistance";
export { lookbackTime, lookbackTimeQuantity } from "./lookbackTime";
export { particleHorizon, particleHorizonQuantity } from "./particleHorizon";
export { redshiftAtAge, redshiftAtAgeQuantity } from "./redshiftAtAge";
export {
  redshiftAtLightTravelDistance,
  redshiftAtLightTravelDistanceQuantity,
  redshiftAtLookbackTime,
  redshiftAtLookbackTimeQuantity,
} from "./redshiftAtLookbackTime";
