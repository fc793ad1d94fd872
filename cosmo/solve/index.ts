export { closeModel, type Origin } from "./closeModel";
