// What is published, and in which order, is that of the Jupyter messaging specification 5.3 (memory).
import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { builtKernel, KernelSession, root } from "./kernelSession";

let session: KernelSession;
let folder: string;
beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), "cosmology-cells-kernel-"));
  session = await KernelSession.start(folder);
});
afterAll(async () => {
  await session.stop();
  rmSync(folder, { recursive: true, force: true });
});

describe("a cell that succeeds", () => {
  it("publishes its input, its result and a reply with the same count, between busy and idle", async () => {
    const run = await session.run("6 * 7");
    expect(run.messages.map(({ header, content }) => content.execution_state ?? header.msg_type)).toEqual([
      "busy",
      "execute_input",
      "execute_result",
      "idle",
    ]);
    const count = run.reply.execution_count;
    expect(count).toBeGreaterThan(0);
    expect(run.reply.status).toBe("ok");
    expect(run.only("execute_input")).toEqual({ code: "6 * 7", execution_count: count });
    expect(run.only("execute_result")).toEqual({
      data: { "text/plain": "42" },
      metadata: {},
      execution_count: count,
    });
  });

  it("counts on from cell to cell and keeps variables, functions, classes and types", async () => {
    const first = await session.run(
      "let kept = 40;\nfunction twice(x: number) { return 2 * x; }\nclass Box { constructor(readonly content: number) {} }\ntype Pair = [number, number];",
    );
    const second = await session.run("const pair: Pair = [twice(kept), new Box(2).content]; pair");
    expect(Number(second.reply.execution_count)).toBe(Number(first.reply.execution_count) + 1);
    expect(second.only("execute_result")?.data).toEqual({ "text/plain": "[ 80, 2 ]" });
  });

  it("shows no result for a statement, for undefined and for an empty cell", async () => {
    for (const code of ["const silent = 1;", "undefined", "", "// nothing"]) {
      expect((await session.run(code)).types, code).toEqual(["execute_input"]);
    }
  });

  it("awaits at the top level and in the last expression", async () => {
    expect(await session.value("const later = await Promise.resolve(5); await Promise.resolve(later + 1)")).toBe("6");
  });

  it("reads modules beside the notebook and modules that a cell defines", async () => {
    writeFileSync(join(folder, "beside.ts"), "export const beside: number = 11;\n");
    expect(await session.value('import { beside } from "./beside"; beside')).toBe("11");
    await session.run("/** @module defined */\nexport const defined: number = 12;");
    expect(await session.value('import { defined } from "./defined"; defined')).toBe("12");
  });
});

describe("an import", () => {
  it("finds the package under its own name from any folder, with its types, as the same module", async () => {
    expect(await session.value('import * as own from "cosmology-cells";\nown.formatNumber === formatNumber')).toBe(
      "true",
    );
    expect(
      await session.value(
        'import { evaluateModel as evaluate } from "cosmology-cells/cosmo";\nconst base = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };\nevaluate(base).model.constructor === evaluateModel(base).model.constructor && evaluate(base).value("age") === evaluateModel(base).value("age") && evaluate(base) instanceof evaluateModel(base).constructor',
      ),
    ).toBe("true");
    const wrong = await session.run('import { formatNumber as f } from "cosmology-cells";\nf({});');
    expect(wrong.reply.ename).toBe("TypeCheckError");
  });

  it("finds packages that are ES modules and have nothing but exports, with their types", async () => {
    const place = join(folder, "node_modules", "only-exports");
    mkdirSync(place, { recursive: true });
    writeFileSync(
      join(place, "package.json"),
      JSON.stringify({
        name: "only-exports",
        version: "1.0.0",
        type: "module",
        exports: { "./part": { types: "./inner/part.d.ts", default: "./inner/part.js" } },
      }),
    );
    mkdirSync(join(place, "inner"));
    writeFileSync(join(place, "inner", "part.js"), "export const part = 23;\n");
    writeFileSync(join(place, "inner", "part.d.ts"), "export declare const part: number;\n");
    expect(await session.value('import { part } from "only-exports/part";\npart + 1')).toBe("24");
    const wrong = await session.run('import { part as again } from "only-exports/part";\nconst s: string = again;');
    expect(wrong.reply.ename).toBe("TypeCheckError");
  });
});

describe("standard output and error", () => {
  it("arrive in the order in which they were written, also from asynchronous code", async () => {
    const run = await session.run(
      'console.log("a"); console.error("b"); process.stdout.write("c\\n");\n' +
        "await new Promise((resolve) => setTimeout(resolve, 20));\n" +
        'console.log("d"); await null; console.log("e");',
    );
    const written = run.messages.filter(({ header }) => header.msg_type === "stream");
    expect(written.map(({ content }) => content.text).join("")).toBe("a\nb\nc\nd\ne\n");
    expect(run.stdout).toBe("a\nc\nd\ne\n");
    expect(run.stderr).toBe("b\n");
  });

  it("keep characters whole that arrive in two pieces, and call back", async () => {
    const run = await session.run(
      'const bytes = Buffer.from("θ"); process.stdout.write(bytes.subarray(0, 1)); process.stdout.write(bytes.subarray(1));\n' +
        'await new Promise<void>((resolve) => process.stdout.write("!", () => resolve()));',
    );
    expect(run.stdout).toBe("θ!");
  });

  it("lose nothing of 100,000 lines in one synchronous cell", async () => {
    const run = await session.run("for (let i = 0; i < 100_000; i++) console.log(i);");
    expect(run.reply.status).toBe("ok");
    const lines = run.stdout.split("\n");
    expect(lines.length).toBe(100_001);
    expect(lines.slice(0, -1).every((line, index) => line === String(index))).toBe(true);
  });
});

describe("displays", () => {
  it("all arrive, 2,000 of one synchronous cell, before idle and the reply", async () => {
    const run = await session.run(
      'import * as tslab from "tslab";\nfor (let i = 0; i < 2000; i++) tslab.display.html("<b>" + i + "</b>");',
    );
    const shown = run.messages.filter(({ header }) => header.msg_type === "display_data");
    expect(shown.map(({ content }) => (content.data as Record<string, string>)["text/html"])).toEqual(
      Array.from({ length: 2000 }, (_, index) => `<b>${index}</b>`),
    );
    expect(run.messages.at(-1)?.content.execution_state).toBe("idle");
  });

  it("of tslab's newDisplay are updated in place", async () => {
    const run = await session.run(
      'import { newDisplay } from "tslab";\nconst shown = newDisplay(); shown.text("one"); shown.text("two");',
    );
    expect(run.types).toEqual(["execute_input", "display_data", "update_display_data"]);
    const [, first, second] = run.messages.filter(({ header }) => header.msg_type !== "status");
    expect(first.content.data).toEqual({ "text/plain": "one" });
    expect(second.content.data).toEqual({ "text/plain": "two" });
    expect((second.content.transient as { display_id: string }).display_id).toBe(
      (first.content.transient as { display_id: string }).display_id,
    );
    expect((first.content.transient as { display_id: string }).display_id).toMatch(/\S/);
  });

  it("of the package's progress bar are shown once and updated under the same id", async () => {
    const run = await session.run('const bar = progress({ label: "Rows", total: 3 });\nbar.update(1); bar.finish();');
    expect(run.types[1]).toBe("display_data");
    expect(run.types.slice(2).length).toBeGreaterThan(0);
    expect(new Set(run.types.slice(2))).toEqual(new Set(["update_display_data"]));
    const ids = run.messages.flatMap(({ content }) => (content.transient as { display_id?: string })?.display_id ?? []);
    expect(new Set(ids).size).toBe(1);
  });

  it("give a value's own bundle as the result, also when it comes later, with bytes as base64", async () => {
    const run = await session.run(
      'class Shown { async [displaySymbol]() { await null; return { "text/html": "<i>x</i>", "text/plain": "x", "image/png": new Uint8Array([1, 2, 3]), "application/json": { a: [1] } }; } }\nnew Shown()',
    );
    expect(run.only("execute_result")?.data).toEqual({
      "text/html": "<i>x</i>",
      "text/plain": "x",
      "image/png": "AQID",
      "application/json": { a: [1] },
    });
  });

  it("fail the cell when the value's own bundle cannot be made", async () => {
    const run = await session.run('({ [displaySymbol]() { throw new RangeError("no picture"); } })');
    expect(run.reply).toMatchObject({ status: "error", ename: "RangeError", evalue: "no picture" });
    expect(run.types).toEqual(["execute_input", "error"]);
  });
});

describe("the names of the package", () => {
  const names = JSON.parse(readFileSync(join(root, "dist", "kernel-ext", "kernel", "exportedNames.json"), "utf8")) as {
    values: string[];
    types: string[];
  };

  it("are those that the built package exports, all known without an import", async () => {
    const exported = Object.keys(require(join(root, "dist", "kernel-ext", "index.js"))).filter(
      (name) => name !== "__esModule",
    );
    expect(names.values).toEqual(exported.sort());
    expect(names.values.length).toBeGreaterThan(5);
    expect(await session.value(`[${names.values.join(", ")}].every((one) => one !== undefined)`)).toBe("true");
  });

  it("include the types", async () => {
    expect(names.types).toContain("MimeBundle");
    const run = await session.run('const bundle: MimeBundle = { "text/plain": "x" };\nconst wrong: Progress = 5;');
    expect(run.reply.ename).toBe("TypeCheckError");
    expect(run.reply.evalue).toMatch(/^line 2, column 7: Type 'number' is not assignable to type 'Progress'/);
  });

  it("are typed, completed and described", async () => {
    const wrong = await session.run('formatNumber("seven")');
    expect(wrong.reply.ename).toBe("TypeCheckError");
    const completion = await session.client.request("complete_request", { code: "formatNu", cursor_pos: 8 });
    expect(completion.content.matches).toContain("formatNumber");
    const info = await session.client.request("inspect_request", {
      code: "formatNumber",
      cursor_pos: 4,
      detail_level: 0,
    });
    expect(info.content.found).toBe(true);
    expect((info.content.data as Record<string, string>)["text/plain"]).toMatch(/function formatNumber\(/);
  });

  it("can be used by a cell for something of its own", async () => {
    await session.run("const table = 3;");
    expect(await session.value("table + 1")).toBe("4");
  });
});

describe("the start", () => {
  it("ends with a message when there is no connection file", async () => {
    const missing = join(folder, "missing.json");
    const argv = builtKernel().map((part) => part.replace("{connection_file}", missing));
    await expect(KernelSession.start(folder, argv)).rejects.toThrow(/ended with exit code 1.*\n.*missing\.json/s);
  });
});
