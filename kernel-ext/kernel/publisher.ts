/** What the kernel publishes to every front end that listens. */
import type { MimeBundle } from "../display/sink";
import type { CellError } from "./cellError";
import { portableBundle } from "./mimeBundle";
import type { SendQueue } from "./sendQueue";
import type { JsonObject, MessageHeader, WireCodec } from "./wire";

export class Publisher {
  constructor(
    private readonly codec: WireCodec,
    private readonly queue: SendQueue,
  ) {}

  /** Publishes a message that answers `parent`; its type is the topic. */
  publish(type: string, content: JsonObject, parent: MessageHeader | undefined, metadata: JsonObject = {}): void {
    this.queue.push(this.codec.compose(type, content, { parent, identities: [Buffer.from(type)], metadata }));
  }

  status(state: "starting" | "busy" | "idle", parent?: MessageHeader): void {
    this.publish("status", { execution_state: state }, parent);
  }

  /** An error, with its line and column in the cell as metadata where they are known. */
  error({ ename, evalue, traceback, place }: CellError, parent: MessageHeader): void {
    const metadata = place ? { line: place.line, column: place.column } : {};
    this.publish("error", { ename, evalue, traceback }, parent, metadata);
  }

  /** Text of a stream; what follows directly may be sent with it. */
  text(name: "stdout" | "stderr", text: string, parent: MessageHeader): void {
    this.queue.pushText(parent, name, text, (merged) =>
      this.codec.compose("stream", { name, text: merged }, { parent, identities: [Buffer.from("stream")] }),
    );
  }

  /** A display, or the new content of one that was shown under the same id. */
  display(bundle: MimeBundle, displayId: string | undefined, update: boolean, parent: MessageHeader): void {
    const transient = displayId === undefined ? {} : { display_id: displayId };
    const type = update ? "update_display_data" : "display_data";
    this.publish(type, { data: portableBundle(bundle), metadata: {}, transient }, parent);
  }

  /** Whether nothing waits to be sent. */
  isDrained(): boolean {
    return this.queue.waiting === 0;
  }

  /** Resolves when all of it has been handed over. */
  drain(): Promise<void> {
    return this.queue.drain();
  }
}
