/** A client that starts a kernel of its own and runs code in it over ZeroMQ, without Jupyter. */
import { type ChildProcess, spawn } from "node:child_process";
import { randomUUID } from "node:crypto";
import { rmSync } from "node:fs";
import { join } from "node:path";
import * as zmq from "zeromq";
import { type ConnectionInfo, type JsonObject, socketAddress, WireCodec, type WireMessage } from "../kernel/wire";
import { newConnection } from "./newConnection";

/** How a kernel is started; `{connection_file}` is replaced as in a kernelspec. */
export interface KernelCommand {
  argv: string[];
  cwd: string;
}

/** The kernel did not start, ended, or does not answer. */
export class KernelFailure extends Error {
  override name = "KernelFailure";
}

/** The command of this package's own kernel. */
export function ownKernelArguments(): string[] {
  const main = join(__dirname, "..", "kernel", "main.js");
  return [process.execPath, "--no-force-async-hooks-checks", main, "{connection_file}"];
}

/** Exit code of our kernel when a port was taken between our choice and its start. */
const portTakenExitCode = 98;
const startAttempts = 3;
const startTimeout = 120_000;
const askAgainAfter = 3000;

export interface ExecuteOptions {
  /** The id of the request, where the caller must know it before anything is published. */
  id?: string;
  /** Milliseconds after which the code is interrupted. */
  timeout?: number | undefined;
  silent?: boolean;
  storeHistory?: boolean;
  stopOnError?: boolean;
  userExpressions?: Record<string, string>;
}

export interface ExecuteResult {
  reply: WireMessage;
  timedOut: boolean;
}

type Listener = (message: WireMessage) => void;

/** How long an interrupted cell may take to end before the kernel is given up. */
const interruptPatience = 10_000;
const interruptAgainAfter = 1000;
/** How long a kernel may take to answer a shutdown, and then to end. */
const shutdownPatience = 10_000;

export class KernelClient {
  private readonly replies = new Map<string, (message: WireMessage) => void>();
  private readonly idle = new Map<string, () => void>();
  private readonly listeners = new Set<Listener>();
  private fail: ((error: KernelFailure) => void) | undefined;
  private readonly failed = new Promise<never>((_, reject) => {
    this.fail = reject;
  });
  private closing = false;
  private exit: Promise<void> = Promise.resolve();
  /** What the kernel wrote to its own standard error. */
  private complaints = "";

  private constructor(
    readonly process: ChildProcess,
    readonly info: ConnectionInfo,
    private readonly codec: WireCodec,
    private readonly folder: string,
    private readonly shell: zmq.Dealer,
    private readonly controlSocket: zmq.Dealer,
    private readonly iopub: zmq.Subscriber,
  ) {
    this.failed.catch(() => undefined);
  }

  /** Starts a kernel and waits until it answers and its publications arrive. */
  static async start(command: KernelCommand): Promise<KernelClient> {
    for (let attempt = 1; ; attempt++) {
      const client = await KernelClient.launch(command);
      try {
        await client.untilReady();
        return client;
      } catch (error) {
        const taken = client.process.exitCode === portTakenExitCode;
        await client.kill();
        if (!taken || attempt >= startAttempts) throw error;
      }
    }
  }

  private static async launch(command: KernelCommand): Promise<KernelClient> {
    const { info, folder, file } = await newConnection();
    const [program, ...args] = command.argv.map((part) => part.replace("{connection_file}", file));
    const child = spawn(program, args, { cwd: command.cwd, stdio: ["ignore", "ignore", "pipe"] });
    const identity = randomUUID();
    const options = { linger: 0, sendHighWaterMark: 0, receiveHighWaterMark: 0 };
    const client = new KernelClient(
      child,
      info,
      new WireCodec(info.key),
      folder,
      new zmq.Dealer({ ...options, routingId: identity }),
      new zmq.Dealer({ ...options, routingId: `${identity}-control` }),
      new zmq.Subscriber({ linger: 0, receiveHighWaterMark: 0 }),
    );
    client.watchProcess();
    client.connect();
    return client;
  }

  private watchProcess(): void {
    const { process: child } = this;
    child.stderr?.setEncoding("utf8").on("data", (text: string) => {
      this.complaints = (this.complaints + text).slice(-20_000);
    });
    const ended = (how: string): void => {
      const words = this.complaints.trim();
      this.fail?.(new KernelFailure(`the kernel ${how}${words ? `; it said:\n${words}` : ""}`));
    };
    child.on("error", (error) => ended(`could not be started: ${error.message}`));
    this.exit = new Promise((resolve) => {
      child.on("error", () => resolve());
      child.on("close", (code, signal) => {
        resolve();
        if (!this.closing) ended(signal ? `was ended by ${signal}` : `ended with exit code ${code}`);
      });
    });
  }

  private connect(): void {
    this.iopub.subscribe();
    this.shell.connect(socketAddress(this.info, "shell"));
    this.controlSocket.connect(socketAddress(this.info, "control"));
    this.iopub.connect(socketAddress(this.info, "iopub"));
    const read = async (socket: zmq.Dealer | zmq.Subscriber, take: Listener): Promise<void> => {
      for await (const frames of socket) take(this.codec.parse(frames));
    };
    const broken = (error: unknown): void => {
      if (!this.closing) this.fail?.(new KernelFailure(`the connection to the kernel broke: ${error}`));
    };
    const toWaiting: Listener = (message) => {
      const id = String(message.parent.msg_id);
      this.replies.get(id)?.(message);
      this.replies.delete(id);
    };
    read(this.shell, toWaiting).catch(broken);
    read(this.controlSocket, toWaiting).catch(broken);
    read(this.iopub, (message) => {
      for (const listener of this.listeners) listener(message);
      if (message.header.msg_type !== "status" || message.content.execution_state !== "idle") return;
      const id = String(message.parent.msg_id);
      this.idle.get(id)?.();
      this.idle.delete(id);
    }).catch(broken);
  }

  private async untilReady(): Promise<void> {
    const deadline = Date.now() + startTimeout;
    let arrived = false;
    const stop = this.onPublished(() => {
      arrived = true;
    });
    try {
      // A subscription takes effect some time after connecting; only a published message proves that it has. A kernel that
      // is not ours may lose a request or its reply while it starts, so that one is sent again from time to time.
      for (let answered = false; !answered || !arrived; ) {
        if (Date.now() > deadline)
          throw new KernelFailure(`the kernel did not get ready within ${startTimeout / 1000} s`);
        const { reply } = await this.send("kernel_info_request", {});
        const pause = new Promise<boolean>((resolve) => setTimeout(() => resolve(false), askAgainAfter).unref());
        if (await Promise.race([reply.then(() => true), pause])) answered = true;
        if (answered && !arrived) await this.unlessFailed(new Promise((resolve) => setTimeout(resolve, 5)));
      }
    } finally {
      stop();
    }
  }

  private unlessFailed<T>(promise: Promise<T>): Promise<T> {
    return Promise.race([promise, this.failed]);
  }

  /** Calls `listener` with every published message; returns how to stop that. */
  onPublished(listener: Listener): () => void {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  }

  /** Sends a request and returns its header's id and the promise of its reply. */
  async send(
    type: string,
    content: JsonObject,
    channel: "shell" | "control" = "shell",
    id?: string,
  ): Promise<{ id: string; reply: Promise<WireMessage>; idle: Promise<void> }> {
    const fresh = this.codec.header(type);
    const header = id === undefined ? fresh : { ...fresh, msg_id: id };
    const message = { identities: [], header, parent: {}, metadata: {}, content, buffers: [] };
    const reply = new Promise<WireMessage>((resolve) => this.replies.set(header.msg_id, resolve));
    const idle = new Promise<void>((resolve) => this.idle.set(header.msg_id, resolve));
    await (channel === "shell" ? this.shell : this.controlSocket).send(this.codec.frames(message));
    const result = { id: header.msg_id, reply: this.unlessFailed(reply), idle: this.unlessFailed(idle) };
    // Who asks only for one of them need not handle the other's failure, which is the same.
    result.reply.catch(() => undefined);
    result.idle.catch(() => undefined);
    return result;
  }

  /** Sends a request and waits for its reply. */
  async request(
    type: string,
    content: JsonObject,
    timeout = 30_000,
    channel: "shell" | "control" = "shell",
  ): Promise<WireMessage> {
    const { reply } = await this.send(type, content, channel);
    return this.within(reply, timeout, `the kernel did not answer a ${type} within ${timeout / 1000} s`);
  }

  private async within<T>(promise: Promise<T>, timeout: number, complaint: string): Promise<T> {
    let timer: NodeJS.Timeout | undefined;
    const late = new Promise<never>((_, reject) => {
      timer = setTimeout(() => reject(new KernelFailure(complaint)), timeout);
    });
    try {
      return await Promise.race([promise, late]);
    } finally {
      clearTimeout(timer);
    }
  }

  /** Runs code and returns when the reply and the end of publishing are there. */
  async execute(code: string, options: ExecuteOptions = {}): Promise<ExecuteResult> {
    const { timeout } = options;
    let timer: NodeJS.Timeout | undefined;
    let timedOut = false;
    const interrupting: Promise<void>[] = [];
    const { reply, idle } = await this.send(
      "execute_request",
      {
        code,
        silent: options.silent ?? false,
        store_history: options.storeHistory ?? true,
        user_expressions: options.userExpressions ?? {},
        allow_stdin: false,
        stop_on_error: options.stopOnError ?? true,
      },
      "shell",
      options.id,
    );
    const late = new Promise<never>((_, reject) => {
      if (timeout === undefined) return;
      timer = setTimeout(() => {
        timedOut = true;
        // Again and again: the first may arrive before the kernel has begun with the cell.
        const deadline = Date.now() + interruptPatience;
        const insist = (): void => {
          if (Date.now() > deadline) {
            reject(new KernelFailure("the kernel did not end the cell when it was interrupted"));
            return;
          }
          interrupting.push(this.interrupt().catch(() => undefined));
          timer = setTimeout(insist, interruptAgainAfter);
        };
        insist();
      }, timeout);
    });
    try {
      const [answer] = await Promise.race([Promise.all([reply, idle]), late]);
      // An interrupt that is still on its way would hit the next cell.
      clearTimeout(timer);
      await Promise.all(interrupting);
      return { reply: answer, timedOut };
    } finally {
      clearTimeout(timer);
    }
  }

  /** What the kernel says about its language. */
  async languageInfo(): Promise<JsonObject> {
    const { content } = await this.request("kernel_info_request", {});
    return content.language_info as JsonObject;
  }

  /** Interrupts what runs. */
  async interrupt(): Promise<void> {
    await this.request("interrupt_request", {}, interruptPatience, "control");
  }

  /** Ends the kernel, by force if it does not answer. */
  async shutdown(): Promise<void> {
    this.closing = true;
    try {
      await this.request("shutdown_request", { restart: false }, shutdownPatience, "control");
      await this.within(this.exit, shutdownPatience, "the kernel did not end");
    } catch {
      this.process.kill("SIGKILL");
      await this.exit;
    }
    this.cleanUp();
  }

  /** Ends the kernel at once. */
  async kill(): Promise<void> {
    this.closing = true;
    this.process.kill("SIGKILL");
    this.fail?.(new KernelFailure("the kernel was ended"));
    await this.exit;
    this.cleanUp();
  }

  private cleanUp(): void {
    for (const socket of [this.shell, this.controlSocket, this.iopub]) socket.close();
    rmSync(this.folder, { recursive: true, force: true });
  }
}
