import { existsSync } from "node:fs";
import { join } from "node:path";
import { Worker } from "node:worker_threads";
import type { BatchProblem } from "../../cosmo/batch";
import { later } from "../kernel/ownTimers";
import { type BatchJob, control } from "./batchJob";
import type { FromWorker } from "./batchWorker";

/** How long a worker may take to heed a stop before it is ended by force: a row that takes the full computation may be under way. */
const stopPatience = 500;

/** A worker thread has ended before its work was done. */
export class WorkerFailedError extends Error {
  override readonly name = "WorkerFailedError";
}

/** What a job in the pool tells. */
export interface JobListener {
  problems(list: readonly BatchProblem[]): void;
  /** All workers have done their part. */
  done(): void;
  failed(error: Error): void;
}

interface RunningJob {
  readonly job: BatchJob;
  readonly listener: JobListener;
  /** Workers that have not yet done their part. */
  readonly open: Set<Worker>;
}

/** The compiled worker: beside this file, or in the build when the sources run (in tests). */
function workerFile(): string {
  const beside = join(__dirname, "batchWorker.js");
  return existsSync(beside) ? beside : join(__dirname, "..", "..", "dist", "kernel-ext", "workers", "batchWorker.js");
}

/**
 * Worker threads that live as long as the process and are kept warm from one job to the next. They hold the process open only
 * while a job runs.
 */
export class WorkerPool {
  private readonly workers: Worker[] = [];
  private readonly jobs = new Map<number, RunningJob>();

  /** Gives a job to so many workers, starting them if need be. */
  start(job: BatchJob, count: number, listener: JobListener): void {
    while (this.workers.length < count) this.add();
    const chosen = this.workers.slice(0, count);
    this.jobs.set(job.id, { job, listener, open: new Set(chosen) });
    for (const worker of chosen) {
      worker.ref();
      worker.postMessage(job);
    }
  }

  /** Stops a job: what is under way ends after its slice, or by force; nothing more is told of it. */
  stop(id: number): void {
    const running = this.jobs.get(id);
    if (running === undefined) return;
    Atomics.store(running.job.control, control.stop, 1);
    this.jobs.set(id, { ...running, listener: silent });
    later(() => {
      for (const worker of [...running.open]) this.replace(worker);
    }, stopPatience).unref();
  }

  /**
   * Ends a worker that does not heed a stop. What waits behind the stopped job goes to a new one: the old one has taken no row of it.
   */
  private replace(worker: Worker): void {
    const place = this.workers.indexOf(worker);
    if (place < 0) return;
    this.workers.splice(place, 1);
    const waiting: RunningJob[] = [];
    for (const running of [...this.jobs.values()]) {
      if (!running.open.delete(worker)) continue;
      if (Atomics.load(running.job.control, control.stop) === 0) waiting.push(running);
      else if (running.open.size === 0) this.jobs.delete(running.job.id);
    }
    if (waiting.length > 0) {
      const fresh = this.add();
      fresh.ref();
      for (const running of waiting) {
        running.open.add(fresh);
        fresh.postMessage(running.job);
      }
    }
    void worker.terminate();
  }

  /** Threads that are alive. */
  get size(): number {
    return this.workers.length;
  }

  /** Ends all threads; those that are needed again are started again. */
  async close(): Promise<void> {
    await Promise.all(
      [...this.workers].map((worker) => this.remove(worker, new WorkerFailedError("the pool was closed"))),
    );
  }

  private add(): Worker {
    const worker = new Worker(workerFile());
    worker.on("message", (message: FromWorker) => {
      if (message.type === "ready") return;
      const running = this.jobs.get(message.job);
      if (running === undefined) return;
      if (message.type === "problems") running.listener.problems(message.problems);
      else this.partDone(running, worker);
    });
    worker.on("error", (error) => {
      this.remove(worker, new WorkerFailedError(`a worker thread failed: ${error.message}`, { cause: error }));
    });
    worker.on("exit", (code) => this.remove(worker, new WorkerFailedError(`a worker thread ended with code ${code}`)));
    worker.unref();
    this.workers.push(worker);
    return worker;
  }

  private partDone(running: RunningJob, worker: Worker): void {
    running.open.delete(worker);
    if (running.open.size === 0) {
      this.jobs.delete(running.job.id);
      running.listener.done();
    }
    if (![...this.jobs.values()].some((each) => each.open.has(worker))) worker.unref();
  }

  /** Takes a worker out, and fails the jobs it had a part in. */
  private async remove(worker: Worker, reason: Error): Promise<void> {
    const place = this.workers.indexOf(worker);
    if (place < 0) return;
    this.workers.splice(place, 1);
    for (const running of [...this.jobs.values()]) {
      if (!running.open.delete(worker)) continue;
      Atomics.store(running.job.control, control.stop, 1);
      const { listener } = running;
      this.jobs.set(running.job.id, { ...running, listener: silent });
      if (running.open.size === 0) this.jobs.delete(running.job.id);
      listener.failed(reason);
    }
    await worker.terminate();
  }
}

const silent: JobListener = { problems: () => undefined, done: () => undefined, failed: () => undefined };

let shared: WorkerPool | undefined;

/** The pool of this process. */
export function workerPool(): WorkerPool {
  shared ??= new WorkerPool();
  return shared;
}
