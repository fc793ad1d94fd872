import { randomUUID } from "node:crypto";
import { once } from "node:events";
import { createWriteStream, realpathSync, rmSync, statSync, type WriteStream } from "node:fs";
import { chmod, rename } from "node:fs/promises";
import { basename, dirname, join } from "node:path";
import type { Writable } from "node:stream";
import { TableError } from "./tableError";

/** Where the text or the bytes of a table go, piece by piece. */
export interface TextSink {
  /** Resolves when more is welcome. */
  write(piece: string | Uint8Array): Promise<void>;
  /** Everything is written: makes it last. */
  finish(): Promise<void>;
  /** The work has failed: leaves nothing behind. Synchronous, so that a signal's handler can call it. */
  discard(): void;
}

/**
 * A file that is there whole or not at all: written under a temporary name beside its place, renamed at the end. A link is
 * followed; what is no plain file (a pipe, a terminal) is written directly.
 *
 * @throws TableError where it cannot be written
 */
export async function wholeFile(file: string): Promise<TextSink> {
  const fail = (error: unknown): never => {
    throw new TableError({ file, reason: `cannot be written: ${fileReason(error)}` });
  };
  const existing = statSync(file, { throwIfNoEntry: false });
  if (existing?.isDirectory()) throw new TableError({ file, reason: "cannot be written: it is a folder" });
  const direct = existing !== undefined && !existing.isFile();
  const place = existing === undefined ? file : realpathSync(file);
  const temporary = direct ? place : join(dirname(place), `.${basename(place)}.${randomUUID()}.tmp`);
  const stream = createWriteStream(temporary, { flags: direct ? "w" : "wx" });
  try {
    await once(stream, "open");
  } catch (error) {
    fail(error);
  }
  const sink = streamSink(stream, file);
  return {
    write: sink.write,
    async finish() {
      await sink.finish();
      if (direct) return;
      try {
        if (existing !== undefined) await chmod(temporary, existing.mode & 0o777);
        await rename(temporary, place);
      } catch (error) {
        rmSync(temporary, { force: true });
        fail(error);
      }
    },
    discard() {
      stream.on("error", () => undefined).destroy();
      if (!direct) rmSync(temporary, { force: true });
    },
  };
}

/** A stream that somebody else has opened: standard output. It is flushed at the end, not closed. */
export function openStream(stream: Writable, name: string): TextSink {
  const sink = streamSink(stream, name);
  return {
    write: sink.write,
    async finish() {
      await new Promise<void>((resolve) => stream.write("", () => resolve()));
      await sink.write("");
    },
    discard: () => undefined,
  };
}

function streamSink(stream: Writable | WriteStream, name: string): Pick<TextSink, "write" | "finish"> {
  let failure: Error | undefined;
  let wake: (() => void) | undefined;
  stream.on("error", (error: Error) => {
    failure ??= error;
    wake?.();
  });
  stream.on("drain", () => wake?.());
  const check = (): void => {
    if (failure === undefined) return;
    if ((failure as NodeJS.ErrnoException).code === "EPIPE") throw new ClosedPipeError();
    throw new TableError({ file: name, reason: `cannot be written: ${fileReason(failure)}` });
  };
  return {
    async write(piece) {
      check();
      if (piece.length === 0 || stream.write(piece)) return;
      if (failure === undefined) {
        await new Promise<void>((resolve) => {
          wake = resolve;
        });
      }
      wake = undefined;
      check();
    },
    async finish() {
      await new Promise<void>((resolve) => {
        wake = resolve;
        stream.end(resolve);
      });
      check();
    },
  };
}

/** The reader of standard output has gone, as `head` does when it has enough. */
export class ClosedPipeError extends Error {
  override readonly name = "ClosedPipeError";
  constructor() {
    super("the reader of the output has gone");
  }
}

/** Why a file could not be opened, read or written, in words. */
export function fileReason(error: unknown): string {
  const code = (error as NodeJS.ErrnoException).code;
  const words: Record<string, string> = {
    ENOENT: "there is no such file or folder",
    EACCES: "permission is denied",
    EISDIR: "it is a folder",
    ENOTDIR: "part of its path is no folder",
    ENOSPC: "the disk is full",
    EROFS: "the file system is read-only",
  };
  return (code === undefined ? undefined : words[code]) ?? (error as Error).message;
}
