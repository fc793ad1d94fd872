import { createHmac } from "node:crypto";
import { describe, expect, it } from "vitest";
import { type Frame, WireCodec, WireError } from "../../../kernel-ext/kernel/wire";

/** What a socket delivers of what was sent. */
const received = (frames: readonly Frame[]): Buffer[] => frames.map((frame) => Buffer.from(frame as string));

describe("WireCodec", () => {
  it("signs the four parts with HMAC-SHA256 in hexadecimal, after the delimiter (Jupyter wire protocol, memory)", () => {
    const codec = new WireCodec("key");
    const frames = codec.compose("status", { execution_state: "idle" }, { identities: [Buffer.from("topic")] });
    expect(frames.slice(0, 2).map(String)).toEqual(["topic", "<IDS|MSG>"]);
    const hash = createHmac("sha256", "key");
    for (const part of frames.slice(3)) hash.update(part);
    expect(String(frames[2])).toBe(hash.digest("hex"));
    expect(frames).toHaveLength(7);
  });

  it("signs as RFC 4231, test case 2, has it", () => {
    // RFC 4231 section 4.3: key "Jefe", data "what do ya want for nothing?"; here the data are cut into the four parts.
    const expected = "5bdcc146bf60754e6a042426089575c75a003f089d2739839dec58b964ec3843";
    const parts = ["what do", " ya want", " for ", "nothing?"].map((part) => Buffer.from(part));
    const frames = [Buffer.from("<IDS|MSG>"), Buffer.from(expected), ...parts];
    // The signature passes; what is refused is only that these parts are no JSON.
    expect(() => new WireCodec("Jefe").parse(frames)).toThrow("the header is not JSON");
    frames[1] = Buffer.from(expected.replace("5", "6"));
    expect(() => new WireCodec("Jefe").parse(frames)).toThrow("the signature is wrong");
  });

  it("reads what it wrote, with identities, parent and buffers", () => {
    const codec = new WireCodec("key");
    const header = codec.header("comm_msg");
    const parent = codec.header("comm_open");
    const message = {
      identities: [Buffer.from("a"), Buffer.from("b")],
      header,
      parent,
      metadata: { m: 1 },
      content: { text: "θ" },
      buffers: [Buffer.from([0, 255])],
    };
    expect(new WireCodec("key").parse(received(codec.frames(message)))).toEqual(message);
  });

  it("leaves signatures out when the key is empty", () => {
    const frames = new WireCodec("").compose("status", {});
    expect(String(frames[1])).toBe("");
    expect(new WireCodec("").parse(received(frames)).header.msg_type).toBe("status");
  });

  it("refuses headers without type or id, and parts that are no objects", () => {
    const codec = new WireCodec("");
    const parse = (...parts: string[]) =>
      codec.parse([Buffer.from("<IDS|MSG>"), Buffer.from(""), ...parts.map((part) => Buffer.from(part))]);
    expect(() => parse("{}", "{}", "{}", "{}")).toThrow(WireError);
    expect(() => parse('{"msg_type":"a","msg_id":"b"}', "[]", "{}", "{}")).toThrow(
      /parent header is not a JSON object/,
    );
    expect(() => parse('{"msg_type":"a","msg_id":"b"}', "{}", "{}", "null")).toThrow(/content is not a JSON object/);
    expect(parse('{"msg_type":"a","msg_id":"b"}', "{}", "{}", "{}").header.msg_id).toBe("b");
  });
});
