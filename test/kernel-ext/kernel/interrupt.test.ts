import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { KernelSession, until } from "./kernelSession";

let session: KernelSession;
beforeAll(async () => {
  session = await KernelSession.start();
  await session.run("let kept = 17; let turns = 0;");
});
afterAll(() => session.stop());

/** Runs code that would never end, interrupts it when it has begun, and checks that all of the state is still there. */
async function interrupted(code: string): Promise<void> {
  const running = session.run(
    `console.log("begun");\nawait new Promise((resolve) => setTimeout(resolve, 5));\n${code}`,
  );
  await begunThenInterrupted(running);
}

async function begunThenInterrupted(running: ReturnType<KernelSession["run"]>): Promise<void> {
  const before = session.published.length;
  await until(
    () => session.published.slice(before).some(({ header }) => header.msg_type === "execute_input"),
    "the cell has begun",
  );
  await new Promise((resolve) => setTimeout(resolve, 50));
  const reply = await session.client.request("interrupt_request", {}, 10_000, "control");
  expect(reply.header.msg_type).toBe("interrupt_reply");
  expect(reply.content.status).toBe("ok");
  const run = await running;
  expect(run.reply).toMatchObject({ status: "error", ename: "InterruptError" });
  expect(run.types.at(-1)).toBe("error");
  expect(await session.value("kept")).toBe("17");
}

describe("an interrupt", () => {
  it("ends an endless loop before any await", async () => {
    await begunThenInterrupted(session.run("while (true) {}"));
  });

  it("ends an endless loop after an await", () => interrupted("while (true) {}"));

  it("ends an endless loop that catches everything", () =>
    interrupted("for (;;) { try { for (;;) {} } catch {} finally { turns++; } }"));

  it("ends an endless loop of microtasks", () => interrupted("for (;;) await null;"));

  it("ends an endless loop of microtasks that the cell does not await", () =>
    interrupted("(async () => { for (;;) await null; })();"));

  it("ends an endless loop in a timer's callback", () =>
    interrupted("setTimeout(() => { for (;;) {} }, 1);\nawait new Promise(() => {});"));

  it("ends an endless loop in a value's own display", () => interrupted("({ [displaySymbol]() { for (;;) {} } })"));

  it("ends a wait for something that never comes", () => interrupted("await new Promise(() => {});"));

  it("ends a regular expression that backtracks for ever", () => interrupted('/(a+)+$/.test("a".repeat(40) + "b");'));

  it("stops what the cell would have gone on doing", async () => {
    await interrupted("for (;;) { turns++; await new Promise((resolve) => setTimeout(resolve, 2)); }");
    const turns = await session.value("turns");
    await new Promise((resolve) => setTimeout(resolve, 60));
    expect(await session.value("turns")).toBe(turns);
    await interrupted(
      'import { setTimeout as pause } from "node:timers/promises";\nfor (;;) { turns++; await pause(2); }',
    );
    const later = await session.value("turns");
    await new Promise((resolve) => setTimeout(resolve, 60));
    expect(await session.value("turns")).toBe(later);
  });

  it("without a running cell stops intervals that earlier cells left", async () => {
    await session.run("let ticks = 0; const ticking = setInterval(() => ticks++, 2);");
    await session.client.request("interrupt_request", {}, 10_000, "control");
    const ticks = await session.value("ticks");
    await new Promise((resolve) => setTimeout(resolve, 60));
    expect(await session.value("ticks")).toBe(ticks);
  });

  it("aborts the cells that wait behind the interrupted one", async () => {
    const first = session.run("for (;;) {}");
    const second = session.run("turns = -1");
    await begunThenInterrupted(first);
    expect((await second).reply.status).toBe("aborted");
    expect(await session.value("turns >= 0")).toBe("true");
  });

  it("can be repeated twenty times in a row", async () => {
    for (let round = 0; round < 20; round++) {
      const running = session.run(round % 2 === 0 ? "for (;;) {}" : "await null; for (;;) await null;", {
        timeout: 30,
      });
      const { reply, timedOut } = await running;
      expect([timedOut, reply.ename]).toEqual([true, "InterruptError"]);
      expect(await session.value("kept + 1")).toBe("18");
    }
  });
});
