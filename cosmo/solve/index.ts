export { closeModel, type Origin } from "./closeModel";
export { evaluateModel, ModelNumbers } from "./evaluateModel";
