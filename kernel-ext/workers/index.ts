export { type BatchAccuracy, chunkRows, type WorkerRequest } from "./batchJob";
export { rowGivens } from "./givensOfRow";
export { engineServes } from "./jobRun";
export { type BatchRun, BatchStoppedError, type RunOptions, runBatch } from "./runBatch";
export { sharedDoubles } from "./sharedMemory";
export { WorkerFailedError, workerPool } from "./workerPool";
