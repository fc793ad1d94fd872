/** For tests: the built kernel, with what a cell published in plain form. */
import { existsSync } from "node:fs";
import { join } from "node:path";
import { type ExecuteOptions, KernelClient } from "../../../kernel-ext/command/kernelClient";
import type { JsonObject, WireMessage } from "../../../kernel-ext/kernel/wire";

export const root = join(__dirname, "..", "..", "..");

/** The command of the built kernel; `npm test` builds it first. */
export function builtKernel(): string[] {
  const main = join(root, "dist", "kernel-ext", "kernel", "main.js");
  if (!existsSync(main)) throw new Error(`${main} is missing: run node setup.mjs`);
  return [process.execPath, "--no-force-async-hooks-checks", main, "{connection_file}"];
}

export interface CellRun {
  reply: JsonObject;
  timedOut: boolean;
  messages: WireMessage[];
  /** Types of the published messages without status. */
  types: string[];
  stdout: string;
  stderr: string;
  /** The content of the only message of this type; undefined if there is none. */
  only(type: string): JsonObject | undefined;
}

export class KernelSession {
  /** Everything published since the start. */
  readonly published: WireMessage[] = [];

  private constructor(readonly client: KernelClient) {
    client.onPublished((message) => this.published.push(message));
  }

  static async start(cwd: string = root, argv: string[] = builtKernel()): Promise<KernelSession> {
    return new KernelSession(await KernelClient.start({ argv, cwd }));
  }

  async run(code: string, options: ExecuteOptions = {}): Promise<CellRun> {
    const { reply, timedOut } = await this.client.execute(code, options);
    const id = (reply.parent as { msg_id: string }).msg_id;
    const messages = this.published.filter((message) => (message.parent as { msg_id?: string }).msg_id === id);
    const text = (name: string): string =>
      messages
        .filter(({ header, content }) => header.msg_type === "stream" && content.name === name)
        .map(({ content }) => content.text)
        .join("");
    return {
      reply: reply.content,
      timedOut,
      messages,
      types: messages.map(({ header }) => header.msg_type).filter((type) => type !== "status"),
      stdout: text("stdout"),
      stderr: text("stderr"),
      only(type) {
        const found = messages.filter(({ header }) => header.msg_type === type);
        if (found.length > 1) throw new Error(`${found.length} messages of type ${type}`);
        return found[0]?.content;
      },
    };
  }

  /** The text/plain of a cell's result. */
  async value(code: string): Promise<string | undefined> {
    const run = await this.run(code);
    if (run.reply.status !== "ok") throw new Error((run.reply.traceback as string[]).join("\n"));
    return (run.only("execute_result")?.data as { "text/plain": string } | undefined)?.["text/plain"];
  }

  async stop(): Promise<void> {
    await this.client.shutdown();
  }
}

/** Waits until a condition holds; fails with a message instead of hanging. */
export async function until(condition: () => boolean, what: string, seconds = 20): Promise<void> {
  const deadline = Date.now() + seconds * 1000;
  while (!condition()) {
    if (Date.now() > deadline) throw new Error(`waited ${seconds} s in vain until ${what}`);
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
}
