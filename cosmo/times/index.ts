export { ageAt, ageAtQuantity, ageQuantity, unitHubbleTime } from "./age";
