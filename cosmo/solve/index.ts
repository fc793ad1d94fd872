export { closeModel } from "./closeModel";
export type { Derivative } from "./displacedModels";
export { evaluateModel, ModelNumbers } from "./evaluateModel";
export type { Origin } from "./origin";
