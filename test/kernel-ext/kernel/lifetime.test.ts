import { spawn } from "node:child_process";
import { mkdtempSync, readdirSync, rmSync, statSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { builtKernel, KernelSession, root, until } from "./kernelSession";

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch {
    return false;
  }
}

function pidOf(session: KernelSession): number {
  const { pid } = session.client.process;
  if (pid === undefined) throw new Error("the kernel has no process id");
  return pid;
}

describe("the kernel's process", () => {
  it("ends with 0 when it is shut down, and its connection file is gone", async () => {
    const session = await KernelSession.start();
    const pid = pidOf(session);
    const folders = () => readdirSync(tmpdir()).filter((name) => name.startsWith("cosmology-cells-"));
    const before = folders();
    expect(isAlive(pid)).toBe(true);
    await session.stop();
    expect(isAlive(pid)).toBe(false);
    expect(session.client.process.exitCode).toBe(0);
    expect(folders().length).toBeLessThan(before.length);
  });

  it("has a connection file that only its owner can read", async () => {
    const session = await KernelSession.start();
    const argv = session.client.process.spawnargs;
    const file = argv[argv.length - 1];
    expect(statSync(file).mode & 0o777).toBe(0o600);
    expect(session.client.info.ip).toBe("127.0.0.1");
    await session.stop();
  });

  it("answers a shutdown with the same restart flag", async () => {
    const session = await KernelSession.start();
    const reply = await session.client.request("shutdown_request", { restart: true }, 5000, "control");
    expect(reply.content).toEqual({ status: "ok", restart: true });
    await session.client.kill();
  });

  it("ends when it is shut down in the middle of an endless loop", async () => {
    const session = await KernelSession.start();
    const pid = pidOf(session);
    session.run("for (;;) {}").catch(() => undefined);
    await new Promise((resolve) => setTimeout(resolve, 200));
    await session.stop();
    await until(() => !isAlive(pid), "the process has ended");
  });

  it("is told to the client when it dies, with what it last said", async () => {
    const session = await KernelSession.start();
    await expect(
      session.run('require("fs").writeSync(2, "last words"); process.kill(process.pid, "SIGKILL"); for (;;) {}'),
    ).rejects.toThrow(/the kernel was ended by SIGKILL; it said:\nlast words/);
    await session.client.kill();
  });

  it("ends by itself when its parent is gone, also in the middle of an endless loop", async () => {
    const folder = mkdtempSync(join(tmpdir(), "cosmology-cells-orphan-"));
    const script = join(folder, "parent.cjs");
    writeFileSync(
      script,
      `const { KernelClient } = require(${JSON.stringify(join(root, "dist", "kernel-ext", "command", "kernelClient.js"))});
      KernelClient.start({ argv: ${JSON.stringify(builtKernel())}, cwd: process.cwd() }).then((client) => {
        client.execute("for (;;) {}").catch(() => undefined);
        setTimeout(() => { process.stdout.write(String(client.process.pid)); process.kill(process.pid, "SIGKILL"); }, 200);
      });`,
    );
    const parent = spawn(process.execPath, [script], { stdio: ["ignore", "pipe", "inherit"] });
    let said = "";
    parent.stdout.on("data", (text) => {
      said += text;
    });
    await new Promise((resolve) => parent.on("exit", resolve));
    const pid = Number(said);
    expect(pid).toBeGreaterThan(0);
    await until(() => !isAlive(pid), "the orphan has ended");
    rmSync(folder, { recursive: true, force: true });
  });
});
