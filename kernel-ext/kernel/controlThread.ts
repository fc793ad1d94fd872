/**
 * The thread that owns the control and heartbeat sockets: it answers while the main thread is kept busy by a cell, ends
 * code that does not give way to an interrupt, and takes the process down when its parent is gone.
 */
import { Session } from "node:inspector";
import { type MessagePort, parentPort, workerData } from "node:worker_threads";
import * as zmq from "zeromq";
import { phase } from "./phase";
import { type ConnectionInfo, socketAddress, WireCodec, WireError, type WireMessage } from "./wire";

export interface ControlThreadData {
  info: ConnectionInfo;
  /** The phase of the main thread, and the number of the last request that it has begun to answer. */
  state: Int32Array;
  /** The process without which this one has no purpose. */
  parent: number;
}

/** From this thread to the main one. */
export type FromControl =
  | { type: "ready" }
  | { type: "failed"; message: string }
  | { type: "request"; id: number; message: WireMessage }
  | { type: "refused"; message: string }
  | { type: "tick" };

/** From the main thread to this one. */
export type ToControl = { type: "reply"; id: number; frames: (Uint8Array | string)[] } | { type: "close" };

/** How long the main thread may take to answer before running code is ended by force. */
const patience = 150;
/** How often the main thread is woken and the parent looked for. */
const tickEvery = 1000;
/** A shutdown that is not answered by then is carried out from here. */
const shutdownPatience = 8000;

/**
 * Whose code a stack of the main thread holds. Ending code while none of the user's is there would hit the next callback
 * of the kernel instead. A stack without any frame is that of an idle thread, or of one between two microtasks.
 */
export function stackOwner(stack: string): "user" | "kernel" | "nobody" {
  const frames = stack.split("\n").filter((line) => /:\d+:\d+\)?$/.test(line) && !/[( ]evaluate:\d/.test(line));
  if (frames.length === 0) return "nobody";
  return frames.every((line) => ownFrame.test(line)) ? "kernel" : "user";
}

const ownFrame = /node:|[\\/](kernel-ext[\\/]kernel|tslab[\\/]dist|zeromq)[\\/]/;

/** Reads the stack of the main thread, wherever it is; an interrupt of the virtual machine runs this in between. */
const stackExpression = `(() => {
  const { stackTraceLimit, prepareStackTrace } = Error;
  Error.stackTraceLimit = Infinity;
  Error.prepareStackTrace = undefined;
  try { return String(new Error().stack); }
  finally { Object.assign(Error, { stackTraceLimit, prepareStackTrace }); }
})()
//# sourceURL=evaluate`;

/**
 * Ends the code that the main thread runs, if it is the user's.
 *
 * @param stillAsked whether the main thread has not begun to answer yet
 * @param idleBefore whether the thread was seen without code before and has not answered since: then it goes from one
 *   microtask to the next without end, for an idle thread answers at once
 * @param seen takes whether the thread was seen without code this time
 */
function endUserCode(stillAsked: () => boolean, idleBefore: boolean, seen: (nobody: boolean) => void): void {
  const session = new Session();
  session.connectToMainThread();
  session.post("Runtime.evaluate", { expression: stackExpression, returnByValue: true }, (error, answer) => {
    const stack = error ? "" : String((answer as { result?: { value?: unknown } }).result?.value ?? "");
    const owner = stackOwner(stack);
    const ends = stillAsked() && (owner === "user" || (owner === "nobody" && idleBefore));
    // After code was ended the thread needs time to answer; it must be seen idle twice again.
    seen(owner === "nobody" && !ends);
    if (ends) session.post("Runtime.terminateExecution", () => session.disconnect());
    else session.disconnect();
  });
}

async function serve(port: MessagePort, data: ControlThreadData): Promise<void> {
  const codec = new WireCodec(data.info.key, true);
  const control = new zmq.Router({ linger: 1000, sendHighWaterMark: 0, receiveHighWaterMark: 0 });
  const heartbeat = new zmq.Reply({ linger: 0 });
  const post = (message: FromControl): void => port.postMessage(message);
  await Promise.all([
    control.bind(socketAddress(data.info, "control")),
    heartbeat.bind(socketAddress(data.info, "hb")),
  ]);

  const unanswered = new Map<number, NodeJS.Timeout[]>();
  let lastId = 0;
  let sending = Promise.resolve();

  const answered = (id: number): void => {
    for (const timer of unanswered.get(id) ?? []) clearTimeout(timer);
    unanswered.delete(id);
  };

  /**
   * Asks again, and ends running code again, until the main thread has answered: it may start more code before it sees the
   * request, and the request itself may be lost with the code that is ended.
   */
  const insist = (id: number, message: WireMessage, endsCode: boolean): NodeJS.Timeout => {
    let idleBefore = false;
    return setInterval(() => {
      post({ type: "request", id, message });
      const stillAsked = (): boolean =>
        unanswered.has(id) && Atomics.load(data.state, 1) < id && Atomics.load(data.state, 0) === phase.running;
      if (!endsCode || !stillAsked()) return;
      endUserCode(stillAsked, idleBefore, (nobody) => {
        idleBefore = nobody;
      });
    }, patience);
  };

  const receive = async (): Promise<void> => {
    for await (const frames of control) {
      let message: WireMessage;
      try {
        message = codec.parse(frames);
      } catch (error) {
        if (!(error instanceof WireError)) throw error;
        post({ type: "refused", message: error.message });
        continue;
      }
      const id = ++lastId;
      const type = message.header.msg_type;
      const timers = [insist(id, message, type === "interrupt_request" || type === "shutdown_request")];
      if (type === "shutdown_request") {
        timers.push(setTimeout(() => process.kill(process.pid, "SIGKILL"), shutdownPatience));
      }
      unanswered.set(id, timers);
      post({ type: "request", id, message });
    }
  };

  const beat = async (): Promise<void> => {
    for await (const frames of heartbeat) await heartbeat.send(frames);
  };

  const tick = setInterval(() => {
    if (process.ppid !== data.parent) process.kill(process.pid, "SIGKILL");
    post({ type: "tick" });
  }, tickEvery);

  port.on("message", (message: ToControl) => {
    if (message.type === "reply") {
      answered(message.id);
      sending = sending.then(() => control.send(message.frames));
      return;
    }
    clearInterval(tick);
    for (const id of [...unanswered.keys()]) answered(id);
    sending.then(() => {
      control.close();
      heartbeat.close();
      port.close();
    });
  });

  const failed = (error: unknown): void => {
    if (!control.closed) post({ type: "failed", message: String(error) });
  };
  receive().catch(failed);
  beat().catch(failed);
  post({ type: "ready" });
}

if (parentPort) {
  const port = parentPort;
  serve(port, workerData as ControlThreadData).catch((error: unknown) => {
    port.postMessage({ type: "failed", message: String(error) } satisfies FromControl);
  });
}
