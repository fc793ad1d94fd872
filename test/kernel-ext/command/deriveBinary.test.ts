import { type ChildProcess, spawn } from "node:child_process";
import { once } from "node:events";
import { mkdtempSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { setTimeout as wait } from "node:timers/promises";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { runDerive } from "./deriveRun";

// The command as a shell runs it, from the build. All files of models here are invented.

const program = join(__dirname, "..", "..", "..", "bin.cjs");

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "cosmology-cells-derive-"));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

function start(args: string[], environment: Record<string, string> = {}): ChildProcess {
  return spawn(process.execPath, [program, "derive", ...args], {
    cwd: folder,
    stdio: "pipe",
    env: { ...process.env, ...environment },
  });
}

async function finished(child: ChildProcess): Promise<{ code: number | null; stdout: string; stderr: string }> {
  let stdout = "";
  let stderr = "";
  child.stdout!.on("data", (piece: Buffer) => {
    stdout += piece;
  });
  child.stderr!.on("data", (piece: Buffer) => {
    stderr += piece;
  });
  const [code] = (await once(child, "close")) as [number | null];
  return { code, stdout, stderr };
}

const head = "hubble,baryonDensity,coldMatterDensity\n";
const row = "67.4,0.0224,0.12\n";

describe("cosmology-cells derive, built", () => {
  it("reads standard input as it comes and writes to standard output what the function writes", async () => {
    const child = start(["-", "--add", "age, lastScatteringRedshift", "--recombination", "saha"]);
    const text = `${head}${row}71,0.0219,0.1173\n`;
    const ending = finished(child);
    for (const piece of [text.slice(0, 10), text.slice(10, 50), text.slice(50)]) {
      child.stdin!.write(piece);
      await wait(20);
    }
    child.stdin!.end();
    const inProcess = await runDerive(["-", "--add", "age, lastScatteringRedshift", "--recombination", "saha"], text);
    const built = await ending;
    expect(built).toEqual(inProcess);
    expect(built.code).toBe(0);
    expect(built.stdout.trimEnd().split("\n")).toHaveLength(3);
  });

  it("ends with 1 for bad data, with 2 for a wrong command, with 0 for --help", async () => {
    writeFileSync(join(folder, "bad.csv"), `${head}67.4,x,0.12\n`);
    const bad = await finished(start(["bad.csv", "--add", "age", "--out", "out.csv"]));
    expect(bad).toMatchObject({ code: 1, stdout: "" });
    expect(bad.stderr).toContain('derive bad.csv: row 1 of column "baryonDensity": must be a number');
    expect(readdirSync(folder)).toEqual(["bad.csv"]);
    expect(await finished(start(["bad.csv", "--add", "ages"]))).toMatchObject({
      code: 2,
      stdout: "",
      stderr: 'cosmology-cells derive --add: "ages" is not a known quantity\n  did you mean "age"?\n',
    });
    const help = await finished(start(["--help"]));
    expect(help).toMatchObject({ code: 0, stderr: "" });
    expect(help.stdout).toContain('derive models.csv --add "age, acousticAngle" --recombination peebles');
  });

  for (const [signal, code] of [
    ["SIGINT", 130],
    ["SIGTERM", 143],
  ] as const) {
    it(`leaves nothing behind when ${signal} stops it half-way`, async () => {
      writeFileSync(join(folder, "long.csv"), head + row.repeat(20_000));
      const child = start(["long.csv", "--add", "acousticAngle", "--out", "out.csv"]);
      const ending = finished(child);
      const begun = (): boolean =>
        readdirSync(folder).some((name) => name.endsWith(".tmp") && statSync(join(folder, name)).size > 0);
      while (!begun()) await wait(20);
      child.kill(signal);
      expect((await ending).code).toBe(code);
      expect(readdirSync(folder)).toEqual(["long.csv"]);
    });
  }

  it("stops without a word when the reader of its output has enough", async () => {
    const child = start(["-", "--add", "age"]);
    const ending = once(child, "close");
    let stderr = "";
    child.stderr!.on("data", (piece: Buffer) => {
      stderr += piece;
    });
    // Its input goes on without end; the pipe breaks once it has stopped.
    child.stdin!.on("error", () => undefined);
    child.stdin!.write(head);
    const feed = setInterval(() => child.stdin!.write(row.repeat(200)), 5);
    await once(child.stdout!, "data");
    child.stdout!.destroy();
    const [code] = (await ending) as [number];
    clearInterval(feed);
    // 128 and the number of SIGPIPE, as a shell reports it.
    expect(code).toBe(141);
    expect(stderr).toBe("");
  });

  it("takes a file much longer than its memory", async () => {
    // 64 MB of text under a heap of 40 MB.
    const line = `67.4,0.0224,0.12,${"n".repeat(3200)}\n`;
    writeFileSync(join(folder, "wide.csv"), `hubble,baryonDensity,coldMatterDensity,note\n${line.repeat(20_000)}`);
    const run = await finished(
      start(["wide.csv", "--add", "reducedHubble", "--out", "out.jsonl"], { NODE_OPTIONS: "--max-old-space-size=40" }),
    );
    expect(run).toEqual({ code: 0, stdout: "", stderr: "" });
    const out = readFileSync(join(folder, "out.jsonl"), "utf8");
    expect(out.endsWith('"reducedHubble":0.674}\n')).toBe(true);
    expect(out.split("\n")).toHaveLength(20_001);
  });
});
