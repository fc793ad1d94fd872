/**
 * Runs cells through tslab's converter and executor and says how each ended: with a value, an error, or interrupted.
 */
import vm from "node:vm";
import type { CompletionInfo, Converter, Diagnostic } from "tslab/dist/converter";
import type { Executor } from "tslab/dist/executor";
import type { MimeBundle } from "../display/sink";
import { type CellContext, InterruptError, runInContext } from "./cellContext";
import { type CellError, describeDiagnostics, describeThrown } from "./cellError";
import { CellSources } from "./cellSources";
import { prepareCompiler, resolveOwnName } from "./compiler";
import { bundleOf } from "./mimeBundle";
import { nextTurn } from "./ownTimers";
import { phase } from "./phase";

export interface CellOutcome {
  result?: MimeBundle;
  error?: CellError;
}

interface Run {
  context: CellContext;
  thrown?: { value: unknown };
  diagnostics: Diagnostic[];
  last?: { value: unknown };
  /** Ends the wait for the step under way, whatever its code still does. */
  stop(reason: unknown): void;
  /** Why the run was stopped; it may have been between two steps. */
  stopped?: { reason: unknown };
}

type CompileModule = Pick<typeof import("tslab/dist/converter"), "createConverter" | "isCompleteCode">;
type ExecuteModule = Pick<typeof import("tslab/dist/executor"), "createExecutor">;
type InspectModule = Pick<typeof import("tslab/dist/inspect"), "printQuickInfo">;

export class CellRunner {
  private readonly compiler = prepareCompiler();
  // Loaded only here, after the compiler is prepared.
  private readonly compile = require("tslab/dist/converter") as CompileModule;
  private readonly inspection = require("tslab/dist/inspect") as InspectModule;
  private readonly executor: Executor;
  private readonly converters: { node: Converter; browser: Converter; close(): void };
  private readonly moduleTexts = new Map<string, string>();
  private readonly workingDirectory = process.cwd();
  readonly sources = new CellSources(this.workingDirectory);
  private run: Run | undefined;

  /** @param state shared with the control thread; the first integer is the {@link phase} */
  constructor(private readonly state: Int32Array) {
    this.converters = this.createConverters();
    const { createExecutor } = require("tslab/dist/executor") as ExecuteModule;
    this.nameExecutedCode();
    resolveOwnName();
    this.executor = createExecutor(this.workingDirectory, this.converters, {
      // The executor tells the value of the last expression by one call of `log`, what was thrown by one call of `error`
      // with one argument; diagnostics, with five, have been taken from the converter already.
      log: (value: unknown) => {
        if (this.run) this.run.last = { value };
      },
      error: (...args: unknown[]) => {
        if (this.run && args.length === 1) this.run.thrown = { value: args[0] };
      },
    });
  }

  private createConverters(): { node: Converter; browser: Converter; close(): void } {
    const node = this.watched(this.compile.createConverter({ isJS: false, isBrowser: false }));
    let browser: Converter | undefined;
    const { compile } = this;
    return {
      node,
      get browser(): Converter {
        browser ??= compile.createConverter({ isJS: false, isBrowser: true });
        return browser;
      },
      close: () => {
        node.close();
        browser?.close();
      },
    };
  }

  /** A converter whose diagnostics and source maps are seen here, and which is not ended by force at work. */
  private watched(converter: Converter): Converter {
    const compiling = <T>(work: () => T): T => {
      const before = Atomics.exchange(this.state, 0, phase.compiling);
      try {
        return work();
      } finally {
        Atomics.store(this.state, 0, before);
      }
    };
    return {
      close: () => converter.close(),
      inspect: (declarations, code, position) => compiling(() => converter.inspect(declarations, code, position)),
      complete: (declarations, code, position) => compiling(() => converter.complete(declarations, code, position)),
      addModule: (name, text, meta) =>
        compiling(() => {
          this.moduleTexts.set(`${this.workingDirectory}/${name}.js`, text);
          const diagnostics = converter.addModule(name, text, meta);
          this.run?.diagnostics.push(...diagnostics.map(({ fileName: _, ...rest }) => rest));
          return diagnostics;
        }),
      convert: (declarations, code) =>
        compiling(() => {
          this.compiler.takeCompiled();
          const converted = converter.convert(declarations, code);
          if (this.run) this.run.diagnostics.push(...converted.diagnostics);
          for (const compiled of this.compiler.takeCompiled()) {
            const side = converted.sideOutputs?.find((one) => one.data === compiled.output);
            if (side) this.sources.addFile(side.path, compiled, this.moduleTexts.get(side.path));
            else if (this.run) this.sources.setCompiled(this.run.context.file, compiled);
          }
          return converted;
        }),
    };
  }

  /** Gives the code of a cell a name in stack traces; tslab runs it without one. */
  private nameExecutedCode(): void {
    const original = vm.runInThisContext;
    const head = /^\((?:async )?function\(exports, require\) \{ /;
    vm.runInThisContext = (code, options) => {
      const match = this.run ? head.exec(code) : null;
      if (!this.run || !match || typeof options !== "object") return original(code, options);
      return original(code, {
        ...options,
        filename: this.run.context.file,
        columnOffset: -match[0].length,
      });
    };
  }

  /** Runs a cell to its end, including the display of its last value. Never rejects. */
  async execute(code: string, context: CellContext): Promise<CellOutcome> {
    this.sources.addCell(context.file, context.name, code);
    const run: Run = { context, diagnostics: [], stop: () => undefined };
    this.run = run;
    Atomics.store(this.state, 0, phase.running);
    let outcome = await this.outcome(run, code);
    // Rejections that came with the last microtasks are reported by the next turn.
    await new Promise<void>((resolve) => nextTurn(resolve));
    if (context.cancelled) outcome = this.interrupted(context);
    else if (!outcome.error && context.rejections.size > 0) outcome = this.rejected(context);
    if (this.run === run) this.abandon();
    return outcome;
  }

  /**
   * Runs code of the user from a fresh turn of the event loop and in a microtask of its own: ending it by force unwinds
   * that microtask and drops those queued behind it, and none of the kernel's own may be among them.
   */
  private apart<T>(run: Run, work: () => Promise<T>): Promise<T> {
    return new Promise<T>((resolve, reject) => {
      run.stop = (reason) => {
        run.stopped = { reason };
        reject(reason);
      };
      nextTurn(() => {
        queueMicrotask(() => {
          if (run.stopped) {
            reject(run.stopped.reason);
            return;
          }
          runInContext(run.context, () => {
            work().then(resolve, reject);
          });
        });
      });
    });
  }

  private async outcome(run: Run, code: string): Promise<CellOutcome> {
    try {
      const completed = await this.apart(run, () => this.executor.execute(code));
      if (run.diagnostics.length > 0) {
        return { error: describeDiagnostics(run.diagnostics, run.context.name, this.sources) };
      }
      if (run.thrown) return { error: describeThrown(run.thrown.value, this.sources) };
      if (!completed) throw new Error("the cell did not complete");
      if (!run.last) return {};
      const { value } = run.last;
      return { result: await this.apart(run, () => bundleOf(value)) };
    } catch (error) {
      return { error: describeThrown(error, this.sources) };
    }
  }

  private interrupted(context: CellContext): CellOutcome {
    const note = context.rejections.size > 0 ? "before that, nobody handled:" : undefined;
    const error = describeThrown(new InterruptError(), this.sources, note);
    for (const reason of context.rejections.values()) {
      error.traceback.push(...describeThrown(reason, this.sources).traceback);
    }
    return { error };
  }

  private rejected(context: CellContext): CellOutcome {
    const [first, ...others] = context.rejections.values();
    const error = describeThrown(first, this.sources, "(a promise was rejected and nobody handled it)");
    for (const reason of others) error.traceback.push("", ...describeThrown(reason, this.sources).traceback);
    return { error };
  }

  /** Ends the running cell, if any; true when there was one. */
  interrupt(): boolean {
    const { run } = this;
    if (!run || run.context.ended) return false;
    run.context.cancelled = true;
    this.executor.interrupt();
    run.stop(new InterruptError());
    return true;
  }

  /** Ends the running cell with an exception that nobody caught, such as one from a timer. */
  abort(context: CellContext, thrown: unknown): boolean {
    const { run } = this;
    if (!run || run.context !== context || context.ended) return false;
    this.executor.interrupt();
    run.stop(thrown);
    return true;
  }

  /** Forgets the cell that ran: it has ended, or was interrupted and never came to its end. */
  abandon(): void {
    if (this.run) this.run.context.ended = true;
    this.run = undefined;
    Atomics.store(this.state, 0, phase.idle);
  }

  complete(code: string, position: number): CompletionInfo {
    return this.executor.complete(code, position);
  }

  /** The description of what stands at a position, as text; undefined when there is nothing to say. */
  inspect(code: string, position: number): string | undefined {
    const info = this.executor.inspect(code, position);
    return info ? this.inspection.printQuickInfo(info) : undefined;
  }

  /** Whether more lines are needed before the code can run. */
  isComplete(code: string): { status: "complete" | "incomplete" | "invalid"; indent?: string } {
    const { completed, indent } = this.compile.isCompleteCode(code);
    if (!completed) return { status: "incomplete", indent: indent ?? "" };
    const { typescript } = this.compiler;
    const parsed = typescript.createSourceFile("cell.ts", `export {};\n${code}`, typescript.ScriptTarget.Latest);
    const { parseDiagnostics } = parsed as unknown as { parseDiagnostics?: unknown[] };
    return { status: parseDiagnostics && parseDiagnostics.length > 0 ? "invalid" : "complete" };
  }

  close(): void {
    this.executor.close();
  }
}
