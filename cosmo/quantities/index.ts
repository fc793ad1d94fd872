export { findQuantity, quantityRegister } from "./register";
