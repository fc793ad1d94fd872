import { describe, expect, it } from "vitest";
import { SendQueue } from "../../../kernel-ext/kernel/sendQueue";
import type { Frame } from "../../../kernel-ext/kernel/wire";

/** A socket that refuses a second send while one is under way, as zeromq does. */
class OneAtATime {
  readonly sent: string[] = [];
  readonly pending: (() => void)[] = [];
  failNext = false;

  send(frames: Frame[]): Promise<void> {
    if (this.pending.length > 0) throw new Error("busy");
    if (this.failNext) {
      this.failNext = false;
      return Promise.reject(new Error("lost"));
    }
    this.sent.push(frames.map(String).join("|"));
    return new Promise((resolve) => this.pending.push(resolve));
  }

  async complete(): Promise<void> {
    this.pending.shift()?.();
    await new Promise((resolve) => setImmediate(resolve));
  }

  async completeAll(): Promise<void> {
    while (this.pending.length > 0) await this.complete();
  }
}

const frames = (text: string): Buffer[] => [Buffer.from(text)];

describe("SendQueue", () => {
  it("sends in order, one after the other, and drains", async () => {
    const socket = new OneAtATime();
    const queue = new SendQueue(socket, () => undefined);
    for (let i = 0; i < 3000; i++) queue.push(frames(String(i)));
    let drained = false;
    const end = queue.drain().then(() => {
      drained = true;
    });
    await socket.complete();
    expect([socket.sent.length, drained]).toEqual([2, false]);
    await socket.completeAll();
    await end;
    expect(socket.sent).toEqual(Array.from({ length: 3000 }, (_, index) => String(index)));
    await queue.drain();
  });

  it("merges waiting text of one stream, but never across another message", async () => {
    const socket = new OneAtATime();
    const queue = new SendQueue(socket, () => undefined);
    const text = (key: string, name: string, value: string) =>
      queue.pushText(key, name, value, (merged) => frames(`${key}:${name}:${merged}`));
    for (const value of ["1", "2", "3"]) text("a", "out", value);
    text("a", "err", "4");
    text("b", "err", "5");
    queue.push(frames("display"));
    text("b", "err", "6");
    await socket.completeAll();
    expect(socket.sent).toEqual(["a:out:1", "a:out:23", "a:err:4", "b:err:5", "display", "b:err:6"]);
  });

  it("goes on after a message that could not be sent, and says so", async () => {
    const socket = new OneAtATime();
    const errors: unknown[] = [];
    const queue = new SendQueue(socket, (error) => errors.push(error));
    socket.failNext = true;
    queue.push(frames("first"));
    queue.push(frames("second"));
    await new Promise((resolve) => setImmediate(resolve));
    await socket.completeAll();
    expect(socket.sent).toEqual(["second"]);
    expect(errors.map(String)).toEqual(["Error: lost"]);
  });

  it("sends nothing twice when it is revived", async () => {
    const socket = new OneAtATime();
    const queue = new SendQueue(socket, () => undefined);
    queue.push(frames("first"));
    queue.push(frames("second"));
    queue.revive();
    queue.revive();
    await socket.complete();
    queue.revive();
    await socket.completeAll();
    expect(socket.sent).toEqual(["first", "second"]);
  });
});
