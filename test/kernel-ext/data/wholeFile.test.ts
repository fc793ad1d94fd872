import { execFileSync } from "node:child_process";
import { mkdtempSync, readdirSync, readFileSync, rmSync, statSync, symlinkSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { PassThrough, Writable } from "node:stream";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { formatOfFile, openFile, openStream, wholeFile } from "../../../kernel-ext/data";

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "cosmology-cells-data-"));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

describe("wholeFile", () => {
  it("shows nothing under the name until it is finished", async () => {
    const file = join(folder, "out.csv");
    const sink = await wholeFile(file);
    await sink.write("a,b\n");
    expect(readdirSync(folder)).not.toContain("out.csv");
    await sink.write("1,2\n");
    await sink.finish();
    expect(readdirSync(folder)).toEqual(["out.csv"]);
    expect(readFileSync(file, "utf8")).toBe("a,b\n1,2\n");
  });

  it("leaves the old file as it was when the work is discarded", async () => {
    const file = join(folder, "out.csv");
    writeFileSync(file, "old", { mode: 0o640 });
    const sink = await wholeFile(file);
    await sink.write("new");
    sink.discard();
    expect(readdirSync(folder)).toEqual(["out.csv"]);
    expect(readFileSync(file, "utf8")).toBe("old");
  });

  it("keeps the permissions of the file it replaces, and follows a link", async () => {
    const file = join(folder, "real.csv");
    writeFileSync(file, "old", { mode: 0o640 });
    symlinkSync(file, join(folder, "link.csv"));
    const sink = await wholeFile(join(folder, "link.csv"));
    await sink.write("new");
    await sink.finish();
    expect(readFileSync(file, "utf8")).toBe("new");
    expect(statSync(file).mode & 0o777).toBe(0o640);
    expect(readdirSync(folder).sort()).toEqual(["link.csv", "real.csv"]);
  });

  it("writes to a pipe directly and leaves it a pipe", async () => {
    const file = join(folder, "pipe.csv");
    execFileSync("mkfifo", [file]);
    const reading = openFile(file).then(async (open) => {
      expect(open.length).toBeUndefined();
      let text = "";
      for await (const piece of open.bytes) text += new TextDecoder().decode(piece);
      return text;
    });
    const sink = await wholeFile(file);
    await sink.write("a\n1\n");
    await sink.finish();
    expect(await reading).toBe("a\n1\n");
    expect(statSync(file).isFIFO()).toBe(true);
  });

  it("refuses a folder, and a place in a folder that is not there", async () => {
    await expect(wholeFile(folder)).rejects.toThrow(`${folder}: cannot be written: it is a folder`);
    const nowhere = join(folder, "no", "out.csv");
    await expect(wholeFile(nowhere)).rejects.toThrow(`${nowhere}: cannot be written: there is no such file or folder`);
  });
});

describe("openStream", () => {
  it("waits for a slow reader", async () => {
    const pipe = new PassThrough({ highWaterMark: 8 });
    const sink = openStream(pipe, "standard output");
    let done = false;
    const writing = sink.write("x".repeat(100)).then(() => {
      done = true;
    });
    await new Promise((resolve) => setImmediate(resolve));
    expect(done).toBe(false);
    pipe.read();
    await writing;
    expect(done).toBe(true);
  });

  it("tells that the reader has gone, and any other failure with its reason", async () => {
    const failing = (code: string): Writable =>
      new Writable({
        highWaterMark: 1,
        write: (_chunk, _encoding, done) => done(Object.assign(new Error(`write ${code}`), { code })),
      });
    await expect(openStream(failing("EPIPE"), "standard output").write("data")).rejects.toThrow("has gone");
    await expect(openStream(failing("ENOSPC"), "standard output").write("data")).rejects.toThrow(
      "standard output: cannot be written: the disk is full",
    );
  });
});

describe("openFile", () => {
  it("refuses what is not there and what is a folder", async () => {
    const file = join(folder, "none.csv");
    await expect(openFile(file)).rejects.toThrow(`${file}: cannot be read: there is no such file or folder`);
    await expect(openFile(folder)).rejects.toThrow(`${folder}: cannot be read: it is a folder`);
  });
});

describe("formatOfFile", () => {
  it("reads the end of the name, in any letters", () => {
    expect(["a.csv", "b.TSV", "x.y/c.jsonl"].map(formatOfFile)).toEqual(["csv", "tsv", "jsonl"]);
  });

  it("names the known ends for another one or none", () => {
    expect(() => formatOfFile("a.txt")).toThrow(
      'a.txt: the name must end in .csv, .tsv, .jsonl, .parquet, and it ends in ".txt"',
    );
    expect(() => formatOfFile("a.b/models")).toThrow(
      "a.b/models: the name must end in .csv, .tsv, .jsonl, .parquet, and it ends in none of them",
    );
  });
});
