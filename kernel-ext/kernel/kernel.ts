/** The kernel behind the sockets: what each request is answered with and what is published meanwhile. */
import type { MimeBundle } from "../display/sink";
import { completion, inspection, kernelInfo, requiredText } from "./answers";
import { type CellContext, currentContext, InterruptError, leaveContext } from "./cellContext";
import { describeThrown } from "./cellError";
import type { CellOutcome, CellRunner } from "./cellRunner";
import { History } from "./history";
import { sleep } from "./ownTimers";
import type { Publisher } from "./publisher";
import type { SendQueue } from "./sendQueue";
import type { Frame, JsonObject, MessageHeader, WireCodec, WireMessage } from "./wire";

export interface KernelParts {
  codec: WireCodec;
  publisher: Publisher;
  shell: SendQueue;
  runner: CellRunner;
  version: string;
  log(text: string): void;
  /** Whether the shell socket has more messages at this moment. */
  moreToRead(): boolean;
  /** Called when a shutdown has been answered. */
  shutdown(): void;
}

interface Waiting {
  message: WireMessage;
  aborted: boolean;
  /** How many ticks ago the cell of the request was interrupted. */
  ticksSinceInterrupt?: number;
  errorPublished?: boolean;
  /** The request was answered in place of its handler, which has been lost. */
  rescued?: boolean;
}

/** Ticks after an interrupt at which the handler of the cell is taken for lost. */
const rescueAfter = 3;

type Reply = { type: string; content: JsonObject } | undefined;

/** How many ended cells are remembered so that what they left running can be stopped. */
const rememberedCells = 1000;
/** A pause that lets requests arrive which were sent before a failure could be known. */
const gatherPause = 5;

export class Kernel {
  private readonly history = new History();
  private readonly waiting: Waiting[] = [];
  private readonly cells: CellContext[] = [];
  /** The request that is being handled. */
  private current: Waiting | undefined;
  /** Execution count. */
  private count = 0;
  /** All runs of code, also those that are not counted. */
  private runs = 0;
  private last: CellContext | undefined;

  constructor(private readonly parts: KernelParts) {}

  // ---- output of running code

  /** The cell that code belongs to when nothing better is known: the one that runs, or ran last. */
  lastCell(): CellContext | undefined {
    return this.last;
  }

  /** The cell that output of the running code goes to; throws for code of an interrupted cell. */
  private outputCell(): CellContext | undefined {
    const context = currentContext() ?? this.last;
    if (context?.cancelled) throw new InterruptError();
    return context;
  }

  /** Publishes text that running code wrote; false when no cell has run yet. */
  writeText(name: "stdout" | "stderr", text: string): boolean {
    const context = this.outputCell();
    if (!context) return false;
    if (context.silent || text === "") return true;
    this.parts.publisher.text(name, text, context.parent);
    return true;
  }

  /** Publishes a display, or the new content of one that was shown under the same id. */
  display(bundle: MimeBundle, displayId: string | undefined, update: boolean): void {
    const context = this.outputCell();
    if (context && !context.silent) this.parts.publisher.display(bundle, displayId, update, context.parent);
  }

  // ---- the queue of shell requests

  /** Takes a request of the shell socket; requests are handled one after the other. */
  receive(message: WireMessage): void {
    this.waiting.push({ message, aborted: false });
    this.handleNext();
  }

  private handleNext(): void {
    if (this.current) return;
    const next = this.waiting.shift();
    if (!next) return;
    this.current = next;
    const done = (): void => {
      if (next.rescued) return;
      this.current = undefined;
      this.handleNext();
    };
    this.handle(next).then(done, (error: unknown) => {
      this.parts.log(`a ${next.message.header.msg_type} failed: ${(error as Error)?.stack ?? error}`);
      done();
    });
  }

  private async handle(waiting: Waiting): Promise<void> {
    const { message, aborted } = waiting;
    const { header } = message;
    this.parts.publisher.status("busy", header);
    let reply: Reply;
    try {
      if (header.msg_type === "execute_request") {
        reply = { type: "execute_reply", content: aborted ? { status: "aborted" } : await this.execute(waiting) };
      } else reply = this.answer(message);
    } catch (error) {
      const { ename, evalue, traceback } = describeThrown(error, this.parts.runner.sources);
      this.parts.log(`a ${header.msg_type} failed: ${(error as Error)?.stack ?? error}`);
      reply = {
        type: header.msg_type.replace(/_request$/, "_reply"),
        content: { status: "error", ename, evalue, traceback },
      };
    }
    // What the request published is on its way before the reply is: who sees the reply may stop listening.
    await this.parts.publisher.drain();
    if (waiting.rescued) return;
    if (reply) this.parts.shell.push(this.replyFrames(reply, message));
    this.parts.publisher.status("idle", header);
  }

  private replyFrames(reply: { type: string; content: JsonObject }, request: WireMessage): Frame[] {
    return this.parts.codec.compose(reply.type, reply.content, {
      parent: request.header,
      identities: request.identities,
    });
  }

  /** Answers a request of the control socket at once; the frames are sent by the control thread. */
  control(message: WireMessage): Frame[] {
    this.parts.publisher.status("busy", message.header);
    const reply = this.answer(message) ?? { type: "error", content: { status: "error" } };
    const frames = this.replyFrames(reply, message);
    this.parts.publisher.status("idle", message.header);
    return frames;
  }

  private answer(message: WireMessage): Reply {
    const { content, header } = message;
    switch (header.msg_type) {
      case "kernel_info_request":
        return { type: "kernel_info_reply", content: kernelInfo(this.parts.version) };
      case "complete_request":
        return { type: "complete_reply", content: completion(content, this.parts.runner) };
      case "inspect_request":
        return { type: "inspect_reply", content: inspection(content, this.parts.runner) };
      case "is_complete_request":
        return { type: "is_complete_reply", content: this.parts.runner.isComplete(requiredText(content, "code")) };
      case "history_request":
        return { type: "history_reply", content: this.history.answer(content) };
      case "comm_info_request":
        return { type: "comm_info_reply", content: { status: "ok", comms: {} } };
      case "comm_open":
        // No target is known here; the specification asks for the comm to be closed again.
        this.parts.publisher.publish("comm_close", { comm_id: content.comm_id ?? "", data: {} }, header);
        return undefined;
      case "comm_msg":
      case "comm_close":
        return undefined;
      case "interrupt_request":
        this.interrupt();
        return { type: "interrupt_reply", content: { status: "ok" } };
      case "shutdown_request":
        this.interrupt();
        this.parts.shutdown();
        return { type: "shutdown_reply", content: { status: "ok", restart: content.restart === true } };
      default:
        this.parts.log(`a message of the unknown type ${JSON.stringify(header.msg_type)} is ignored`);
        return undefined;
    }
  }

  // ---- cells

  private async execute(waiting: Waiting): Promise<JsonObject> {
    const { content, header } = waiting.message;
    const code = requiredText(content, "code");
    const silent = content.silent === true;
    const stored = !silent && content.store_history !== false;
    if (stored) this.count++;
    const count = this.count;
    if (!silent) this.parts.publisher.publish("execute_input", { code, execution_count: count }, header);
    const outcome = await this.runCell(code, header, silent, stored ? `cell [${count}]` : "unnumbered cell");
    if (waiting.rescued) return {};
    if (outcome.result && !silent) {
      this.parts.publisher.publish(
        "execute_result",
        { execution_count: count, data: outcome.result, metadata: {} },
        header,
      );
    }
    if (stored) this.history.add(count, code, (outcome.result?.["text/plain"] as string | undefined) ?? null);
    if (outcome.error) {
      if (!silent) this.parts.publisher.error(outcome.error, header);
      waiting.errorPublished = true;
      if (content.stop_on_error !== false) await this.abortWaiting();
      const { ename, evalue, traceback } = outcome.error;
      return { status: "error", execution_count: count, ename, evalue, traceback, user_expressions: {}, payload: [] };
    }
    return {
      status: "ok",
      execution_count: count,
      user_expressions: await this.userExpressions(content.user_expressions, header),
      payload: [],
    };
  }

  private async runCell(code: string, parent: MessageHeader, silent: boolean, name: string): Promise<CellOutcome> {
    this.runs++;
    const context: CellContext = {
      name,
      file: `cell[${this.runs}]`,
      parent,
      silent,
      cancelled: false,
      ended: false,
      rejections: new Map(),
    };
    this.last = context;
    this.cells.push(context);
    if (this.cells.length > rememberedCells) this.cells.shift();
    return this.parts.runner.execute(code, context);
  }

  private async userExpressions(expressions: unknown, parent: MessageHeader): Promise<JsonObject> {
    const results: JsonObject = {};
    if (typeof expressions !== "object" || expressions === null) return results;
    for (const [name, expression] of Object.entries(expressions)) {
      const { result, error } = await this.runCell(String(expression), parent, true, `expression "${name}"`);
      results[name] = error
        ? { status: "error", ename: error.ename, evalue: error.evalue, traceback: error.traceback }
        : { status: "ok", data: result ?? {}, metadata: {} };
    }
    return results;
  }

  /** Marks the cells that were sent before the failure of this one could be known. */
  private async abortWaiting(): Promise<void> {
    let known: number;
    do {
      known = this.waiting.length;
      await sleep(gatherPause);
    } while (this.parts.moreToRead() || this.waiting.length > known);
    for (const one of this.waiting) if (one.message.header.msg_type === "execute_request") one.aborted = true;
  }

  /** Runs the hidden first cell; its failure is told, since every cell after it lacks the names. */
  async runPrelude(code: string): Promise<void> {
    const { error } = await this.runCell(code, this.parts.codec.header("execute_request"), true, "prelude");
    if (error) this.parts.log(`the names of the package are not available to cells: ${error.traceback.join("\n")}`);
    this.last = undefined;
  }

  /** Stops the running cell; without one, stops what ended cells have left running. */
  interrupt(): void {
    leaveContext();
    if (this.parts.runner.interrupt()) {
      if (this.current) this.current.ticksSinceInterrupt ??= 0;
      return;
    }
    for (const context of this.cells) context.cancelled = true;
  }

  /**
   * Called about once a second. Ending code by force may drop continuations of the kernel's own that were queued behind it;
   * an interrupted cell whose handler never comes back is ended here, for a kernel that hangs is worse than any error.
   */
  tick(): void {
    const { current } = this;
    if (current?.ticksSinceInterrupt === undefined || !this.parts.publisher.isDrained()) return;
    current.ticksSinceInterrupt++;
    if (current.ticksSinceInterrupt < rescueAfter) return;
    const { header, content } = current.message;
    current.rescued = true;
    this.current = undefined;
    this.parts.runner.abandon();
    const error = describeThrown(new InterruptError(), this.parts.runner.sources);
    if (content.silent !== true && !current.errorPublished) this.parts.publisher.error(error, header);
    for (const one of this.waiting) {
      if (content.stop_on_error !== false && one.message.header.msg_type === "execute_request") one.aborted = true;
    }
    const { ename, evalue, traceback } = error;
    const reply = { status: "error", execution_count: this.count, ename, evalue, traceback };
    this.parts.shell.push(this.replyFrames({ type: "execute_reply", content: reply }, current.message));
    this.parts.publisher.status("idle", header);
    this.handleNext();
  }

  // ---- failures that no cell catches

  /** A promise was rejected and nobody has handled it so far. */
  rejected(reason: unknown, promise: Promise<unknown>): void {
    const context = currentContext() ?? this.last;
    if (!context)
      this.parts.log(`unhandled rejection: ${describeThrown(reason, this.parts.runner.sources).traceback.join("\n")}`);
    else if (context.cancelled && reason instanceof InterruptError) return;
    else if (context.ended) this.late(reason, context);
    else context.rejections.set(promise, reason);
  }

  /** A rejection was handled after all. */
  handledLate(promise: Promise<unknown>): void {
    for (const context of this.cells) context.rejections.delete(promise);
  }

  /** An exception came out of a callback. */
  uncaught(thrown: unknown): void {
    const context = currentContext() ?? this.last;
    if (!context)
      this.parts.log(`uncaught exception: ${describeThrown(thrown, this.parts.runner.sources).traceback.join("\n")}`);
    else if (context.cancelled && thrown instanceof InterruptError) return;
    else if (!this.parts.runner.abort(context, thrown)) this.late(thrown, context);
  }

  /** Reports a failure of a cell's code that came after the cell's end, in that cell. */
  private late(thrown: unknown, context: CellContext): void {
    const error = describeThrown(thrown, this.parts.runner.sources, `(after ${context.name} had ended)`);
    if (!context.silent) this.parts.publisher.error(error, context.parent);
  }
}
