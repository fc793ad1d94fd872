import { Readable, Writable } from "node:stream";
import { deriveCommand } from "../../../kernel-ext/command/derive";

/** What a run of the command left on its streams. */
export interface DeriveRun {
  code: number;
  stdout: string;
  stderr: string;
}

class Collector extends Writable {
  text = "";
  constructor(readonly isTTY: boolean) {
    super();
  }
  override _write(chunk: Buffer, _encoding: string, done: () => void): void {
    this.text += chunk.toString("utf8");
    done();
  }
}

/** Runs `derive` in this process, with standard input as given. */
export async function runDerive(args: string[], input = "", terminal = false): Promise<DeriveRun> {
  const stdout = new Collector(false);
  const stderr = new Collector(terminal);
  const code = await deriveCommand(args, { stdin: Readable.from([Buffer.from(input)]), stdout, stderr });
  return { code, stdout: stdout.text, stderr: stderr.text };
}
