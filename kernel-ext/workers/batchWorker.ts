/** A worker thread: takes its part of one job after the other. */
import { parentPort } from "node:worker_threads";
import type { BatchProblem } from "../../cosmo/batch";
import type { BatchJob } from "./batchJob";
import { JobRun } from "./jobRun";

/** From a worker to the main thread. An error that a worker throws ends it, and the thread's own events tell. */
export type FromWorker =
  | { readonly type: "ready" }
  | { readonly type: "problems"; readonly job: number; readonly problems: readonly BatchProblem[] }
  | { readonly type: "done"; readonly job: number };

if (parentPort) {
  const port = parentPort;
  const post = (message: FromWorker): void => port.postMessage(message);
  port.on("message", (job: BatchJob) => {
    let problems: BatchProblem[] = [];
    const send = (): void => {
      if (problems.length > 0) post({ type: "problems", job: job.id, problems });
      problems = [];
    };
    const run = new JobRun(job, (problem) => problems.push(problem));
    while (run.step()) if (problems.length >= 256) send();
    send();
    post({ type: "done", job: job.id });
  });
  post({ type: "ready" });
}
