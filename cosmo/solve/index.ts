export { closeModel } from "./closeModel";
export { evaluateModel, ModelNumbers } from "./evaluateModel";
export type { Origin } from "./origin";
