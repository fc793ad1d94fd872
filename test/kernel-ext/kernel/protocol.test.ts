// What a kernel must answer is taken from the Jupyter messaging specification 5.3 (memory).
import { randomUUID } from "node:crypto";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import * as zmq from "zeromq";
import { type ConnectionInfo, type Frame, socketAddress, WireCodec } from "../../../kernel-ext/kernel/wire";
import { KernelSession, until } from "./kernelSession";

let session: KernelSession;
beforeAll(async () => {
  session = await KernelSession.start();
});
afterAll(() => session.stop());

const ask = async (type: string, content: Record<string, unknown>, channel: "shell" | "control" = "shell") => {
  const reply = await session.client.request(type, content, 10_000, channel);
  expect(reply.header.msg_type).toBe(type.replace("_request", "_reply"));
  return reply.content;
};

describe("requests", () => {
  it("kernel_info_request is answered on both sockets with the language and the protocol", async () => {
    for (const channel of ["shell", "control"] as const) {
      const content = await ask("kernel_info_request", {}, channel);
      expect(content).toMatchObject({
        status: "ok",
        protocol_version: "5.3",
        implementation: "cosmology-cells",
        language_info: { name: "typescript", file_extension: ".ts", mimetype: "text/typescript" },
      });
    }
  });

  it("comm_info_request is answered with its own reply, and an unknown comm is closed again", async () => {
    expect(await ask("comm_info_request", {})).toEqual({ status: "ok", comms: {} });
    await session.client.send("comm_open", { comm_id: "abc", target_name: "jupyter.widget", data: {} });
    await until(() => session.published.some(({ header }) => header.msg_type === "comm_close"), "the comm is closed");
    const closed = session.published.find(({ header }) => header.msg_type === "comm_close");
    expect(closed?.content.comm_id).toBe("abc");
    await session.client.send("comm_msg", { comm_id: "abc", data: {} });
    await session.client.send("comm_close", { comm_id: "abc", data: {} });
    expect(await session.value("1 + 1")).toBe("2");
  });

  it("is_complete_request tells complete, incomplete with an indent, and invalid", async () => {
    expect(await ask("is_complete_request", { code: "const a = 1;" })).toEqual({ status: "complete" });
    expect(await ask("is_complete_request", { code: "await fetch('x')" })).toEqual({ status: "complete" });
    expect(await ask("is_complete_request", { code: "function f() {" })).toEqual({
      status: "incomplete",
      indent: "  ",
    });
    expect(await ask("is_complete_request", { code: "const = 5 5;" })).toEqual({ status: "invalid" });
  });

  it("complete_request and inspect_request count positions in code points", async () => {
    const code = '"😀😀"; Math.sq';
    const completion = await ask("complete_request", { code, cursor_pos: [...code].length });
    expect((completion.matches as string[])[0]).toBe("sqrt");
    expect(completion).toMatchObject({ cursor_start: [...code].length - 2, cursor_end: [...code].length });
    const info = await ask("inspect_request", { code: "Math.sqrt", cursor_pos: 9, detail_level: 0 });
    expect(info.found).toBe(true);
    expect((info.data as Record<string, string>)["text/plain"]).toContain("Returns the square root");
    expect(await ask("inspect_request", { code: "   ", cursor_pos: 1, detail_level: 0 })).toEqual({
      status: "ok",
      found: false,
      data: {},
      metadata: {},
    });
  });

  it("history_request gives what was stored: the last ones, a range, what matches", async () => {
    const run = await session.run("11 * 11");
    await session.run("12 * 12");
    await session.run("12 * 12");
    const line = run.reply.execution_count as number;
    const history = async (request: object) =>
      (await ask("history_request", { output: false, raw: true, ...request })).history as unknown[][];
    expect(await history({ hist_access_type: "tail", n: 3 })).toEqual([
      [1, line, "11 * 11"],
      [1, line + 1, "12 * 12"],
      [1, line + 2, "12 * 12"],
    ]);
    expect(await history({ hist_access_type: "range", session: 1, start: line, stop: line + 1, output: true })).toEqual(
      [[1, line, ["11 * 11", "121"]]],
    );
    expect(await history({ hist_access_type: "search", pattern: "12 ? 1*", unique: true })).toEqual([
      [1, line + 2, "12 * 12"],
    ]);
    expect(await history({ hist_access_type: "search", pattern: "(no such.*" })).toEqual([]);
  });

  it("of an unknown type are let pass", async () => {
    await session.client.send("invented_request", {});
    expect(await session.value("2 + 2")).toBe("4");
  });

  it("with content of the wrong kind get an error, and the next one its answer", async () => {
    const { reply } = await session.client.execute(5 as unknown as string);
    expect(reply.content).toMatchObject({ status: "error", ename: "TypeError" });
    expect((await ask("complete_request", { code: null })).status).toBe("error");
    expect(await session.value("2 + 3")).toBe("5");
  });
});

describe("execute_request", () => {
  it("when silent publishes nothing but status, counts nothing and stores nothing", async () => {
    const before = (await session.run("1")).reply.execution_count;
    const quiet = await session.run('let hushed = 5; console.log("x"); hushed', { silent: true });
    expect(quiet.types).toEqual([]);
    expect(quiet.reply).toMatchObject({ status: "ok", execution_count: before });
    const failed = await session.run('throw new Error("quiet")', { silent: true });
    expect(failed.types).toEqual([]);
    expect(failed.reply).toMatchObject({ status: "error", evalue: "quiet" });
    expect(await session.value("hushed")).toBe("5");
  });

  it("without store_history counts nothing but publishes", async () => {
    const before = (await session.run("1")).reply.execution_count;
    const run = await session.run("2", { storeHistory: false });
    expect(run.reply.execution_count).toBe(before);
    expect(run.types).toEqual(["execute_input", "execute_result"]);
  });

  it("evaluates user_expressions, each on its own", async () => {
    const { reply } = await session.run("const base = 20;", {
      userExpressions: { good: "base + 1", bad: 'throw new RangeError("no")', typo: "bsae" },
    });
    expect(reply.user_expressions).toMatchObject({
      good: { status: "ok", data: { "text/plain": "21" } },
      bad: { status: "error", ename: "RangeError", evalue: "no" },
      typo: { status: "error", ename: "TypeCheckError" },
    });
  });

  it("that fails aborts those that wait, but none that comes after the reply", async () => {
    await session.run("let reached = 0;");
    const runs = [session.run('throw new Error("first")'), session.run("reached = 1"), session.run("reached = 2")];
    const [first, second, third] = await Promise.all(runs);
    expect([first, second, third].map(({ reply }) => reply.status)).toEqual(["error", "aborted", "aborted"]);
    expect(second.types).toEqual([]);
    expect(await session.value("reached")).toBe("0");
  });

  it("that fails with stop_on_error off lets those that wait run", async () => {
    await session.run("let passed = 0;");
    const runs = [session.run('throw new Error("first")', { stopOnError: false }), session.run("passed = 1")];
    expect((await Promise.all(runs)).map(({ reply }) => reply.status)).toEqual(["error", "ok"]);
    expect(await session.value("passed")).toBe("1");
  });
});

describe("messages that cannot be trusted", () => {
  const codec = (info: ConnectionInfo, key = info.key) => new WireCodec(key);

  async function sendRaw(socket: "shell" | "control", frames: Frame[][]): Promise<number> {
    const dealer = new zmq.Dealer({ linger: 1000, receiveTimeout: 400, routingId: randomUUID() });
    dealer.connect(socketAddress(session.client.info, socket));
    for (const one of frames) await dealer.send(one);
    let answers = 0;
    try {
      for (;;) {
        await dealer.receive();
        answers++;
      }
    } catch {
      // no more answers
    }
    dealer.close();
    return answers;
  }

  it("are refused: another key, no signature, a changed part, no JSON, too few parts, no delimiter", async () => {
    const { info } = session.client;
    const good = () => codec(info).compose("kernel_info_request", {});
    const unsigned = good();
    unsigned[1] = Buffer.from("");
    const changed = good();
    changed[5] = Buffer.from('{"a":1}');
    const notJson = good();
    notJson[2] = Buffer.from("{");
    const bad = [
      codec(info, "another key").compose("kernel_info_request", {}),
      unsigned,
      changed,
      notJson,
      good().slice(0, 3),
      [Buffer.from("nothing")],
      [Buffer.alloc(0)],
    ];
    for (const socket of ["shell", "control"] as const) {
      expect(await sendRaw(socket, bad)).toBe(0);
      expect(await sendRaw(socket, [good()])).toBe(1);
    }
    expect(await session.value("3 + 3")).toBe("6");
  });

  it("are refused when they come a second time", async () => {
    const once = codec(session.client.info).compose("kernel_info_request", {});
    expect(await sendRaw("shell", [once, once, once])).toBe(1);
  });
});

describe("the heartbeat", () => {
  it("echoes, also while a cell keeps the kernel busy", async () => {
    const beat = new zmq.Request({ linger: 0, receiveTimeout: 5000 });
    beat.connect(socketAddress(session.client.info, "hb"));
    const running = session.run("for (;;) {}", { timeout: 400 });
    await new Promise((resolve) => setTimeout(resolve, 150));
    await beat.send("ping");
    expect((await beat.receive()).toString()).toBe("ping");
    beat.close();
    expect((await running).reply.ename).toBe("InterruptError");
  });
});
