import { readdirSync } from "node:fs";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { KernelSession, until } from "../kernel/kernelSession";

// The built kernel (node setup.mjs); the chain is invented.

let session: KernelSession;
beforeAll(async () => {
  session = await KernelSession.start();
  await session.run(`let kept = 17;
const rows = 200_000;
const column = (from: number, to: number) => Float64Array.from({ length: rows }, (_, row) => from + ((to - from) * row) / rows);
const models = { hubble: column(62, 72), baryonDensity: column(0.022, 0.023), coldMatterDensity: column(0.11, 0.13) };`);
});
afterAll(() => session.stop());

/** Interrupts a cell that derives columns once its bar has moved; returns what the cell ended with. */
async function interruptWhileDeriving(code: string): Promise<void> {
  const before = session.published.length;
  const running = session.run(code);
  await until(
    () => session.published.slice(before).some(({ header }) => header.msg_type === "update_display_data"),
    "the bar has moved",
  );
  await session.client.request("interrupt_request", {}, 10_000, "control");
  const run = await running;
  expect(run.reply).toMatchObject({ status: "error", ename: "InterruptError" });
  expect(run.stdout).toBe("");
}

/** Rows that the workers compute after the cell has ended would keep the processor busy. */
async function processorTime(): Promise<number> {
  const text = await session.value("(({ user, system }) => user + system)(process.cpuUsage())");
  return Number(text) / 1e6;
}

describe("an interrupt of a cell that derives columns", () => {
  for (const [name, prefix] of [
    ["at once", ""],
    ["after a wait", "await new Promise((resolve) => setTimeout(resolve, 20));\n"],
    ["after reading a file", 'await (await import("node:fs/promises")).readFile("package.json");\n'],
  ] as const) {
    it(`ends the cell and the workers, ${name}`, async () => {
      await interruptWhileDeriving(
        `${prefix}const late = await chainCell(models, { add: "age, dampingWavenumber", accuracy: "full" });\nconsole.log("went on");`,
      );
      expect(await session.value("kept")).toBe("17");
      await new Promise((resolve) => setTimeout(resolve, 1200));
      const before = await processorTime();
      await new Promise((resolve) => setTimeout(resolve, 1000));
      // Two workers that went on would take about two seconds of it, or all that the machine has to give.
      expect((await processorTime()) - before).toBeLessThan(0.5);
    });
  }

  it("leaves workers that serve the next cell", async () => {
    const text = await session.value(
      `const again = await chainCell(models, { add: "age", burnIn: 190_000, workers: 2 });
again.values.columns.age.every(Number.isFinite);`,
    );
    expect(text).toBe("true");
  });

  it("a kernel that is shut down while it derives leaves no process", async () => {
    const other = await KernelSession.start();
    const pid = Number(await other.value("process.pid"));
    const before = other.published.length;
    const running = other
      .run(
        `const n = Float64Array.from({ length: 100_000 }, (_, row) => 62 + row / 10_000);
await chainCell({ hubble: n }, { add: "age", accuracy: "full", shared: { baryonDensity: 0.022, coldMatterDensity: 0.12 } });`,
      )
      .catch(() => undefined);
    await until(
      () => other.published.slice(before).some(({ header }) => header.msg_type === "update_display_data"),
      "the bar has moved",
    );
    await other.stop();
    await running;
    await until(() => !readdirSync("/proc").includes(String(pid)), "the process is gone");
  });
});
