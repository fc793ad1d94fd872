/**
 * Which cell a piece of running code belongs to. A timer keeps the cell that set it: what its callback and the promises
 * behind it print, show or throw later is put down to that cell, and no timer of an interrupted cell fires any more.
 *
 * Node's own AsyncLocalStorage would follow every kind of callback, but up to Node 22 it stands on async hooks, and with
 * those switched on Node aborts the process when running code is ended by force.
 */
import timers from "node:timers";
import timersPromises from "node:timers/promises";
import { promisify } from "node:util";
import type { MessageHeader } from "./wire";

export interface CellContext {
  /** What the user knows the cell by: "cell [3]". */
  readonly name: string;
  /** The name under which the virtual machine runs it; no two runs share one. */
  readonly file: string;
  /** The request that the cell's messages answer. */
  readonly parent: MessageHeader;
  /** A silent cell publishes nothing. */
  readonly silent: boolean;
  /** Set by an interrupt: what is left of the cell's code does nothing any more. */
  cancelled: boolean;
  /** Set when the cell has ended. */
  ended: boolean;
  /** Rejections that nobody has handled so far, in order. */
  readonly rejections: Map<Promise<unknown>, unknown>;
}

/** Ends code of an interrupted cell that comes back to life. */
export class InterruptError extends Error {
  override name = "InterruptError";
  constructor() {
    super("the cell was interrupted");
  }
}

let current: CellContext | undefined;

/** The cell that the running code is known to belong to. */
export function currentContext(): CellContext | undefined {
  return current;
}

/** Forgets the cell of code that was ended by force and could not leave its context itself. */
export function leaveContext(): void {
  current = undefined;
}

/** Runs code as part of a cell, with the microtasks that follow it. */
export function runInContext<T>(context: CellContext, code: () => T): T {
  const before = current;
  current = context;
  try {
    return code();
  } finally {
    // Ticks come when no microtask is left, and those that the code leaves behind still belong to it.
    queueMicrotask(() =>
      process.nextTick(() => {
        if (current === context) current = before;
      }),
    );
  }
}

type Callback = (...args: unknown[]) => void;

/** Makes a timer's callback run as part of its cell, and not at all once the cell is interrupted. */
function guard(callback: unknown): unknown {
  const context = current ?? runningCell();
  if (!context || typeof callback !== "function") return callback;
  return function (this: unknown, ...args: unknown[]): void {
    if (!context.cancelled) runInContext(context, () => (callback as Callback).apply(this, args));
    else if (this && typeof this === "object") clearInterval(this as NodeJS.Timeout);
  };
}

let runningCell: () => CellContext | undefined = () => undefined;

/**
 * Lets interrupts reach code that waits for a timer.
 *
 * @param running the cell that code belongs to when nothing better is known
 */
export function guardTimers(running: () => CellContext | undefined): void {
  runningCell = running;
  for (const name of ["setTimeout", "setInterval", "setImmediate"] as const) {
    const original = timers[name] as unknown as Callback & Record<symbol, unknown>;
    const guarded = Object.assign(
      (callback: unknown, ...rest: unknown[]): unknown => original(guard(callback), ...rest),
      { [promisify.custom]: original[promisify.custom] },
    );
    Object.defineProperty(guarded, "name", { value: name });
    (globalThis as Record<string, unknown>)[name] = guarded;
    (timers as unknown as Record<string, unknown>)[name] = guarded;
  }
  for (const name of ["setTimeout", "setImmediate"] as const) {
    const original = timersPromises[name] as (...args: unknown[]) => Promise<unknown>;
    const guarded = (...args: unknown[]): Promise<unknown> => {
      const context = current ?? runningCell();
      if (!context) return original(...args);
      return new Promise((resolve, reject) => {
        const unless = (settle: (value: unknown) => void) => (value: unknown) => {
          if (!context.cancelled) runInContext(context, () => settle(value));
        };
        original(...args).then(unless(resolve), unless(reject));
      });
    };
    (timersPromises as unknown as Record<string, unknown>)[name] = guarded;
  }
  for (const name of ["setTimeout", "setImmediate"] as const) {
    (timers[name] as unknown as Record<symbol, unknown>)[promisify.custom] = timersPromises[name];
  }
}
