/**
 * Messages of the Jupyter wire protocol: frames to message and back, each signed with HMAC-SHA256.
 *
 * Source: Jupyter messaging specification, "The wire protocol" (memory).
 */
import { createHmac, randomUUID, timingSafeEqual } from "node:crypto";

/** Separates routing identities from the signed part of a message. */
const delimiter = Buffer.from("<IDS|MSG>");

/**
 * A part of a message as it is handed to a socket. The JSON parts stay strings, of which zeromq makes copies of its own: a
 * larger buffer it would share, and give back to its thread also when that thread is already gone, with a crash as the end.
 */
export type Frame = Buffer | string;

export const protocolVersion = "5.3";

export interface MessageHeader {
  msg_id: string;
  session: string;
  username: string;
  date: string;
  msg_type: string;
  version: string;
}

export type JsonObject = Record<string, unknown>;

export interface WireMessage {
  identities: Buffer[];
  header: MessageHeader;
  parent: MessageHeader | JsonObject;
  metadata: JsonObject;
  content: JsonObject;
  buffers: Buffer[];
}

/** A message that is refused: malformed, unsigned, signed with another key, or seen before. */
export class WireError extends Error {
  override name = "WireError";
}

function jsonObject(frame: Buffer | undefined, part: string): JsonObject {
  let value: unknown;
  try {
    value = JSON.parse((frame ?? Buffer.alloc(0)).toString("utf8"));
  } catch {
    throw new WireError(`the ${part} is not JSON`);
  }
  if (typeof value !== "object" || value === null || Array.isArray(value)) {
    throw new WireError(`the ${part} is not a JSON object`);
  }
  return value as JsonObject;
}

/** Signs and reads the messages of one connection. */
export class WireCodec {
  readonly session = randomUUID();
  private readonly seen = new Set<string>();

  /**
   * @param key the key of the connection file; empty switches signatures off
   * @param refuseReplays whether a signature that was seen before is refused
   */
  constructor(
    private readonly key: string,
    private readonly refuseReplays = false,
  ) {}

  private sign(parts: readonly Frame[]): string {
    if (this.key === "") return "";
    const hash = createHmac("sha256", this.key);
    for (const part of parts) hash.update(part);
    return hash.digest("hex");
  }

  /** Reads one message; throws WireError for what must not be trusted. */
  parse(frames: Buffer[]): WireMessage {
    const at = frames.findIndex((frame) => frame.equals(delimiter));
    if (at < 0) throw new WireError("the delimiter is missing");
    const parts = frames.slice(at + 2);
    if (parts.length < 4) throw new WireError(`four signed parts are needed, got ${parts.length}`);
    const signature = frames[at + 1].toString("latin1");
    if (this.key !== "") {
      const given = Buffer.from(signature, "latin1");
      const wanted = Buffer.from(this.sign(parts.slice(0, 4)), "latin1");
      if (given.length !== wanted.length || !timingSafeEqual(given, wanted))
        throw new WireError("the signature is wrong");
      if (this.refuseReplays) {
        if (this.seen.has(signature)) throw new WireError("the message was received before");
        this.seen.add(signature);
        if (this.seen.size > 65536) this.seen.delete(this.seen.values().next().value as string);
      }
    }
    const header = jsonObject(parts[0], "header");
    if (typeof header.msg_type !== "string" || typeof header.msg_id !== "string") {
      throw new WireError("the header has no msg_type or no msg_id");
    }
    return {
      identities: frames.slice(0, at),
      header: header as unknown as MessageHeader,
      parent: jsonObject(parts[1], "parent header"),
      metadata: jsonObject(parts[2], "metadata"),
      content: jsonObject(parts[3], "content"),
      buffers: parts.slice(4),
    };
  }

  /** A header for a new message of this session. */
  header(type: string): MessageHeader {
    return {
      msg_id: randomUUID(),
      session: this.session,
      username: "cosmology-cells",
      date: new Date().toISOString(),
      msg_type: type,
      version: protocolVersion,
    };
  }

  /** The frames of a message, signed. */
  frames(message: WireMessage): Frame[] {
    const parts = [message.header, message.parent, message.metadata, message.content].map((part) =>
      JSON.stringify(part),
    );
    return [...message.identities, delimiter, this.sign(parts), ...parts, ...message.buffers];
  }

  /** The frames of a new message of `type` that belongs to `parent`. */
  compose(
    type: string,
    content: JsonObject,
    options: { parent?: MessageHeader | undefined; identities?: Buffer[]; metadata?: JsonObject } = {},
  ): Frame[] {
    return this.frames({
      identities: options.identities ?? [],
      header: this.header(type),
      parent: options.parent ?? {},
      metadata: options.metadata ?? {},
      content,
      buffers: [],
    });
  }
}

/** What a Jupyter connection file says. */
export interface ConnectionInfo {
  transport: string;
  ip: string;
  shell_port: number;
  iopub_port: number;
  stdin_port: number;
  control_port: number;
  hb_port: number;
  key: string;
  signature_scheme: string;
  kernel_name?: string;
}

/** The address of one of the sockets. */
export function socketAddress(info: ConnectionInfo, socket: "shell" | "iopub" | "stdin" | "control" | "hb"): string {
  const port = info[`${socket}_port`];
  return info.transport === "ipc" ? `ipc://${info.ip}-${port}` : `${info.transport}://${info.ip}:${port}`;
}
