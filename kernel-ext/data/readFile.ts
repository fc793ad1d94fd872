import { once } from "node:events";
import { createReadStream, statSync } from "node:fs";
import { TableError } from "./tableError";
import { fileReason } from "./wholeFile";

/** A file that is being read. */
export interface OpenedFile {
  readonly bytes: AsyncIterable<Uint8Array>;
  /** Its length in bytes; undefined for what has none, as a pipe. */
  readonly length: number | undefined;
}

/**
 * Opens a file for reading in pieces.
 *
 * @throws TableError where there is none, or it cannot be read
 */
export async function openFile(file: string): Promise<OpenedFile> {
  const stream = createReadStream(file, { highWaterMark: 256 * 1024 });
  try {
    await once(stream, "open");
    const status = statSync(file);
    if (status.isDirectory()) throw new TableError({ file, reason: "cannot be read: it is a folder" });
    return { bytes: pieces(stream, file), length: status.isFile() ? status.size : undefined };
  } catch (error) {
    stream.destroy();
    if (error instanceof TableError) throw error;
    throw new TableError({ file, reason: `cannot be read: ${fileReason(error)}` });
  }
}

async function* pieces(stream: AsyncIterable<Uint8Array>, file: string): AsyncGenerator<Uint8Array, void, undefined> {
  try {
    yield* stream;
  } catch (error) {
    throw new TableError({ file, reason: `cannot be read: ${fileReason(error)}` });
  }
}
