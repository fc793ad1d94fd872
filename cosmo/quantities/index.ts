export { modelQuantities } from "./modelQuantities";
export { parseRequest, parseRequests, type QuantityRequest } from "./parseRequests";
export { findQuantity, quantityRegister } from "./register";
