/** From published messages to the outputs of a notebook's cells, as a front end would keep them. */
import type { JsonObject, WireMessage } from "../kernel/wire";
import {
  type CodeCell,
  type DisplayOutput,
  type NotebookOutput,
  type OutputBundle,
  plainText,
  type ResultOutput,
  textLines,
} from "./notebookFile";

/** An error that a cell reported. */
export interface ReportedError {
  cell: CodeCell;
  ename: string;
  evalue: string;
  traceback: string[];
  /** The line in the cell, counted from one, where it is known. */
  line: number | undefined;
  /** Whether the cell had ended before. */
  late: boolean;
}

interface Target {
  cell: CodeCell;
  ended: boolean;
  /** A clear_output that waits for the next output. */
  clearPending: boolean;
}

function storedBundle(data: unknown): OutputBundle {
  const bundle: OutputBundle = {};
  for (const [type, content] of Object.entries((data ?? {}) as JsonObject)) {
    const isText = typeof content === "string" && (type.startsWith("text/") || /[+/]xml$|javascript$/.test(type));
    bundle[type] = isText ? textLines(content) : content;
  }
  return bundle;
}

export class OutputCollector {
  readonly errors: ReportedError[] = [];
  private readonly targets = new Map<string, Target>();
  private readonly displays = new Map<string, (DisplayOutput | ResultOutput)[]>();

  /** Says which cell the request with this message id runs. */
  assign(messageId: string, cell: CodeCell): void {
    this.targets.set(messageId, { cell, ended: false, clearPending: false });
  }

  /** Says that a cell has ended; errors that it reports from now on are late. */
  end(messageId: string): void {
    const target = this.targets.get(messageId);
    if (target) target.ended = true;
  }

  /** Takes one published message. */
  take(message: WireMessage): void {
    const target = this.targets.get(String(message.parent.msg_id));
    if (!target) return;
    const { content } = message;
    switch (message.header.msg_type) {
      case "execute_input":
        target.cell.execution_count = content.execution_count as number;
        break;
      case "stream":
        this.addText(target, String(content.name), String(content.text));
        break;
      case "display_data":
        this.addDisplay(target, content, {
          output_type: "display_data",
          data: storedBundle(content.data),
          metadata: (content.metadata ?? {}) as JsonObject,
        });
        break;
      case "execute_result":
        this.addDisplay(target, content, {
          output_type: "execute_result",
          execution_count: content.execution_count as number,
          data: storedBundle(content.data),
          metadata: (content.metadata ?? {}) as JsonObject,
        });
        break;
      case "update_display_data":
        this.updateDisplay(content);
        break;
      case "clear_output":
        if (content.wait === true) target.clearPending = true;
        else target.cell.outputs.length = 0;
        break;
      case "error":
        this.addError(target, message);
        break;
    }
  }

  private add(target: Target, output: NotebookOutput): void {
    if (target.clearPending) target.cell.outputs.length = 0;
    target.clearPending = false;
    target.cell.outputs.push(output);
  }

  private addText(target: Target, name: string, text: string): void {
    const last = target.clearPending ? undefined : target.cell.outputs.at(-1);
    if (last?.output_type === "stream" && last.name === name) {
      (last.text as string[]).push(text);
    } else this.add(target, { output_type: "stream", name, text: [text] });
  }

  private addDisplay(target: Target, content: JsonObject, output: DisplayOutput | ResultOutput): void {
    this.add(target, output);
    const id = (content.transient as JsonObject | undefined)?.display_id;
    if (typeof id === "string") this.displays.set(id, [...(this.displays.get(id) ?? []), output]);
  }

  private updateDisplay(content: JsonObject): void {
    const id = (content.transient as JsonObject | undefined)?.display_id;
    for (const output of this.displays.get(String(id)) ?? []) {
      output.data = storedBundle(content.data);
      output.metadata = (content.metadata ?? {}) as JsonObject;
    }
  }

  private addError(target: Target, message: WireMessage): void {
    const { content, metadata } = message;
    const error = {
      ename: String(content.ename),
      evalue: String(content.evalue),
      traceback: ((content.traceback ?? []) as unknown[]).map(String),
    };
    this.add(target, { output_type: "error", ...error });
    this.errors.push({
      ...error,
      cell: target.cell,
      line: typeof metadata.line === "number" ? metadata.line : undefined,
      late: target.ended,
    });
  }

  /** Puts the text of streams into the form in which notebooks keep it. */
  finish(cells: readonly CodeCell[]): void {
    for (const cell of cells) {
      for (const output of cell.outputs) {
        if (output.output_type === "stream") output.text = textLines(plainText(output.text));
      }
    }
  }
}
