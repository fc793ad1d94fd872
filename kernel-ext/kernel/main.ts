/**
 * The process that a front end starts: `node --no-force-async-hooks-checks main.js CONNECTION_FILE`.
 */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { StringDecoder } from "node:string_decoder";
import { Worker } from "node:worker_threads";
import * as zmq from "zeromq";
import { setDisplaySink } from "../display/sink";
import { guardTimers } from "./cellContext";
import { CellRunner } from "./cellRunner";
import type { ControlThreadData, FromControl, ToControl } from "./controlThread";
import { Kernel } from "./kernel";
import { later, nextTurn } from "./ownTimers";
import { preludeSource } from "./prelude";
import { Publisher } from "./publisher";
import { Receiver } from "./receiver";
import { SendQueue } from "./sendQueue";
import { type ConnectionInfo, socketAddress, WireCodec, WireError, type WireMessage } from "./wire";

/** Exit code when a port of the connection file is taken: the client may try again with others. */
export const portTakenExitCode = 98;

const leave = process.exit.bind(process);
const writeToStderr = process.stderr.write.bind(process.stderr);

function log(text: string): void {
  writeToStderr(`cosmology-cells kernel: ${text}\n`);
}

function readConnectionFile(path: string): ConnectionInfo {
  const info = JSON.parse(readFileSync(path, "utf8")) as ConnectionInfo;
  if (info.signature_scheme !== "hmac-sha256" && info.key !== "") {
    throw new Error(`the signature scheme must be hmac-sha256, got ${JSON.stringify(info.signature_scheme)}`);
  }
  return info;
}

/** Output of cells goes to the front end; text that no cell wrote goes where it always went. */
function redirectStreams(kernel: Kernel): void {
  for (const name of ["stdout", "stderr"] as const) {
    const stream = process[name];
    const original = stream.write.bind(stream) as (...args: unknown[]) => boolean;
    const decoder = new StringDecoder("utf8");
    stream.write = (chunk: string | Uint8Array, encoding?: unknown, callback?: unknown): boolean => {
      const done = typeof encoding === "function" ? encoding : callback;
      const text =
        typeof chunk === "string"
          ? typeof encoding === "string" && Buffer.isEncoding(encoding) && /^(hex|base64|base64url)$/.test(encoding)
            ? decoder.write(Buffer.from(chunk, encoding))
            : chunk
          : decoder.write(Buffer.from(chunk));
      if (!kernel.writeText(name, text)) return original(chunk, encoding, callback);
      if (typeof done === "function") process.nextTick(done as () => void);
      return true;
    };
  }
}

/** A cell may not take the kernel down with it. */
function forbidExit(): void {
  const refuse = (what: string): never => {
    throw Object.assign(new Error(`${what} was called: a cell cannot end the kernel`), {
      name: "ExitError",
      hint: "throw an error to end the cell, or shut the kernel down from the notebook",
    });
  };
  process.exit = (code) => refuse(`process.exit(${code ?? ""})`);
  process.abort = () => refuse("process.abort()");
}

/** Lets tslab's own display functions reach the front end. */
function connectTslabDisplay(kernel: Kernel): void {
  type Write = (
    content: { data: Record<string, string>; transient: { display_id?: string } },
    update?: boolean,
  ) => void;
  const module = require("tslab/dist/jupyter") as { lastWriteDisplayData: Write | null };
  module.lastWriteDisplayData = (content, update) =>
    kernel.display(content.data, content.transient.display_id, update === true);
}

async function main(connectionFile: string): Promise<void> {
  const info = readConnectionFile(connectionFile);
  const codec = new WireCodec(info.key, true);
  const state = new Int32Array(new SharedArrayBuffer(8));
  const { version } = JSON.parse(readFileSync(join(__dirname, "..", "..", "..", "package.json"), "utf8")) as {
    version: string;
  };
  const data: ControlThreadData = { info, state, parent: process.ppid };
  const thread = new Worker(join(__dirname, "controlThread.js"), { workerData: data });
  const toControl = (message: ToControl): void => thread.postMessage(message);

  const unlimited = { linger: 1000, sendHighWaterMark: 0, receiveHighWaterMark: 0 };
  const iopubSocket = new zmq.Publisher({ linger: 1000, sendHighWaterMark: 0 });
  const shellSocket = new zmq.Router(unlimited);
  const stdinSocket = new zmq.Router(unlimited);
  const onSendError = (error: unknown): void => log(`a message could not be sent: ${error}`);
  const iopub = new SendQueue(iopubSocket, onSendError);
  const shell = new SendQueue(shellSocket, onSendError);

  let kernel: Kernel | undefined;
  let leaving = false;
  const close = (): void => {
    iopubSocket.close();
    shellSocket.close();
    stdinSocket.close();
    leave(0);
  };
  // Only when the thread has gone: two threads that take zeromq down at once end in a crash now and then.
  thread.on("exit", (code) => {
    if (!leaving) log(`the control thread ended with code ${code}`);
    close();
  });
  thread.on("error", (error) => log(`the control thread failed: ${error.stack ?? error}`));
  const shutdown = (): void => {
    if (leaving) return;
    leaving = true;
    // The reply to the request goes first; a queue that nobody empties holds nobody up.
    nextTurn(() => {
      Promise.race([Promise.all([iopub.drain(), shell.drain()]), new Promise((resolve) => later(resolve, 2000))]).then(
        () => toControl({ type: "close" }),
      );
    });
  };

  // The control thread repeats a request until it is answered; while the kernel starts that is enough of a queue.
  let answered = 0;
  const answerControl = (id: number, message: WireMessage): void => {
    if (!kernel || id <= answered) return;
    // Seen by the control thread at once, before the reply has found its way there.
    Atomics.store(state, 1, id);
    const frames = kernel.control(message);
    answered = id;
    toControl({ type: "reply", id, frames });
  };
  const receiver = new Receiver(
    shellSocket,
    (frames) => {
      try {
        kernel?.receive(codec.parse(frames));
      } catch (error) {
        if (!(error instanceof WireError)) throw error;
        log(`a message on the shell socket is refused: ${error.message}`);
      }
    },
    (error) => log(`the shell socket failed: ${error}`),
  );
  thread.on("message", (message: FromControl) => {
    if (message.type === "request") {
      const { identities, buffers } = message.message;
      const revived = (frames: Uint8Array[]): Buffer[] => frames.map((frame) => Buffer.from(frame));
      answerControl(message.id, {
        ...message.message,
        identities: revived(identities),
        buffers: revived(buffers),
      });
    } else if (message.type === "refused") log(`a message on the control socket is refused: ${message.message}`);
    else if (message.type === "failed") {
      log(`the control thread failed: ${message.message}`);
      leave(/EADDRINUSE|in use/i.test(message.message) ? portTakenExitCode : 1);
    }
    if (kernel) {
      // Ending code by force may have dropped the continuations of these.
      iopub.revive();
      shell.revive();
      receiver.revive();
      if (message.type === "tick") kernel.tick();
    }
  });

  try {
    await Promise.all([
      iopubSocket.bind(socketAddress(info, "iopub")),
      shellSocket.bind(socketAddress(info, "shell")),
      stdinSocket.bind(socketAddress(info, "stdin")),
    ]);
  } catch (error) {
    log(`a socket could not be bound: ${error}`);
    leave((error as NodeJS.ErrnoException).code === "EADDRINUSE" ? portTakenExitCode : 1);
  }

  const publisher = new Publisher(codec, iopub);
  const runner = new CellRunner(state);
  const started = new Kernel({
    codec,
    publisher,
    shell,
    runner,
    version,
    log,
    moreToRead: () => shellSocket.readable,
    shutdown,
  });
  publisher.status("starting");
  guardTimers(() => started.lastCell());
  Error.stackTraceLimit = 50;
  redirectStreams(started);
  connectTslabDisplay(started);
  setDisplaySink({
    show: (bundle, displayId) => started.display(bundle, displayId, false),
    update: (displayId, bundle) => started.display(bundle, displayId, true),
  });
  process.on("unhandledRejection", (reason, promise) => started.rejected(reason, promise));
  process.on("rejectionHandled", (promise) => started.handledLate(promise));
  process.on("uncaughtException", (error) => started.uncaught(error));
  process.on("SIGINT", () => started.interrupt());
  process.on("SIGTERM", shutdown);
  forbidExit();
  await started.runPrelude(preludeSource());

  kernel = started;
  receiver.start();
}

main(process.argv[2] ?? "").catch((error: unknown) => {
  log((error as Error)?.stack ?? String(error));
  leave(1);
});
