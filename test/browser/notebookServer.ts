/** Debian's Notebook 6 with our kernel installed in a folder of its own, on the loopback. */
import { type ChildProcess, execFileSync, spawn } from "node:child_process";
import { randomUUID } from "node:crypto";
import { cpSync, mkdirSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { root } from "../notebooks-demo/demoNotebooks";

export const notebookProgram = "/usr/bin/jupyter-notebook";

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer().once("error", reject);
    server.listen(0, "127.0.0.1", () => {
      const { port } = server.address() as { port: number };
      server.close(() => resolve(port));
    });
  });
}

export class NotebookServer {
  private words = "";

  private constructor(
    private readonly process: ChildProcess,
    private readonly port: number,
    private readonly token: string,
    private readonly scratch: string,
    /** What the install command printed. */
    readonly installed: string,
    /** The folder that is served; it lies in the project, so that cells find the project's packages. */
    readonly folder: string,
  ) {
    const collect = (text: Buffer): void => {
      this.words = (this.words + text).slice(-20_000);
    };
    process.stdout?.on("data", collect);
    process.stderr?.on("data", collect);
  }

  /** Installs the kernel, copies the notebooks and starts the server. */
  static async start(from: string): Promise<NotebookServer> {
    const scratch = mkdtempSync(join(tmpdir(), "cosmology-cells-notebook-"));
    const prefix = join(scratch, "prefix");
    const folder = join(root, "out", "browser", "notebooks");
    rmSync(folder, { recursive: true, force: true });
    mkdirSync(folder, { recursive: true });
    cpSync(from, folder, { recursive: true });
    const installed = execFileSync(process.execPath, [join(root, "bin.cjs"), "install", "--prefix", prefix], {
      encoding: "utf8",
    });
    const port = await freePort();
    const token = randomUUID();
    const child = spawn(
      notebookProgram,
      [
        ...["--no-browser", "--allow-root", "--ip=127.0.0.1", `--port=${port}`, "--NotebookApp.port_retries=0"],
        ...[`--NotebookApp.token=${token}`, `--notebook-dir=${folder}`],
      ],
      {
        env: {
          PATH: "/usr/bin:/bin",
          LANG: "C.UTF-8",
          HOME: scratch,
          JUPYTER_PATH: join(prefix, "share", "jupyter"),
          JUPYTER_CONFIG_DIR: join(scratch, "config"),
          JUPYTER_DATA_DIR: join(scratch, "data"),
          JUPYTER_RUNTIME_DIR: join(scratch, "runtime"),
        },
        stdio: ["ignore", "pipe", "pipe"],
      },
    );
    const server = new NotebookServer(child, port, token, scratch, installed, folder);
    try {
      await server.untilReady();
    } catch (error) {
      await server.stop();
      throw error;
    }
    return server;
  }

  /** The address of a page or of the API, with the token. */
  address(path: string): string {
    return `http://127.0.0.1:${this.port}${path}?token=${this.token}`;
  }

  private async untilReady(): Promise<void> {
    for (let attempt = 0; attempt < 300; attempt++) {
      if (this.process.exitCode !== null) break;
      try {
        if ((await fetch(this.address("/api/status"))).ok) return;
      } catch {
        // Not listening yet.
      }
      await new Promise((resolve) => setTimeout(resolve, 200));
    }
    throw new Error(`${notebookProgram} did not start; it said:\n${this.words}`);
  }

  /** The kernels' names that the server offers. */
  async kernelNames(): Promise<string[]> {
    const answer = (await (await fetch(this.address("/api/kernelspecs"))).json()) as { kernelspecs: object };
    return Object.keys(answer.kernelspecs);
  }

  /** The process ids of the children, read from /proc; the kernels are among them. */
  children(): number[] {
    const task = `/proc/${this.process.pid}/task/${this.process.pid}/children`;
    return readFileSync(task, "utf8").trim().split(" ").filter(Boolean).map(Number);
  }

  async stop(): Promise<void> {
    const ended = new Promise<void>((resolve) => {
      if (this.process.exitCode !== null || this.process.signalCode !== null) resolve();
      else this.process.once("exit", () => resolve());
    });
    this.process.kill("SIGTERM");
    const force = setTimeout(() => this.process.kill("SIGKILL"), 15_000);
    await ended;
    clearTimeout(force);
    rmSync(this.scratch, { recursive: true, force: true });
  }
}
