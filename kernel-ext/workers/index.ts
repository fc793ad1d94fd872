export { type BatchAccuracy, chunkRows, type WorkerRequest } from "./batchJob";
export { rowGivens } from "./givensOfRow";
export { type BatchRun, BatchStoppedError, type RunOptions, runBatch } from "./runBatch";
export { sharedDoubles } from "./sharedMemory";
export { WorkerFailedError, workerPool } from "./workerPool";
