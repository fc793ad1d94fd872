export { comovingDistance, comovingDistanceQuantity, redshiftPair, unitHubbleDistance } from "./comovingDistance";
