export type { BatchColumn, BatchColumns } from "./batchColumns";
export { engineServes } from "./engineServes";
export {
  type BatchCounts,
  type BatchPlan,
  type BatchProblem,
  type BatchProblems,
  type BatchRequest,
  prepareBatch,
} from "./prepareBatch";
export { rowStatus, rowStatusNames } from "./rowStatus";
export { validatedRange } from "./validatedRange";
