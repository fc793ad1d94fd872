// The form of error messages is that of the Jupyter messaging specification 5.3 (memory); TypeScript's own messages and
// their numbers are those of its compiler.
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { type CellRun, KernelSession, until } from "./kernelSession";

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

/** The traceback, after checking that message and reply agree. */
function traceback(run: CellRun): string {
  const error = run.only("error");
  expect(run.reply.status).toBe("error");
  for (const field of ["ename", "evalue", "traceback"]) expect(run.reply[field]).toEqual(error?.[field]);
  return (run.reply.traceback as string[]).join("\n");
}

function place(run: CellRun): unknown {
  return run.messages.find(({ header }) => header.msg_type === "error")?.metadata;
}

describe("an exception", () => {
  it("is told with name, message, line and caret, and without frames of the kernel", async () => {
    const run = await session.run(
      'const a: number = 1;\n\ninterface Unused { x: string }\nthrow new RangeError("too far");\n',
    );
    expect(run.reply).toMatchObject({ ename: "RangeError", evalue: "too far" });
    expect(place(run)).toEqual({ line: 4, column: 7 });
    const text = traceback(run);
    expect(text).toContain('> 4 | throw new RangeError("too far");\n    |       ^');
    expect(text).not.toMatch(/node:|node_modules|tslab|dist/);
    expect(run.types).toEqual(["execute_input", "error"]);
  });

  it("is traced through functions of earlier cells, awaits and arrow functions", async () => {
    const first = await session.run(
      'type T = { x: number };\nconst fail = async (t: T) => {\n  await null;\n  throw new Error("deep " + t.x);\n};',
    );
    const run = await session.run("// a comment\nconst go = async () => {\n  await fail({ x: 3 });\n};\nawait go();");
    expect(place(run)).toEqual({ line: 4, column: 9 });
    const text = traceback(run);
    const [earlier, later] = [first.reply.execution_count, run.reply.execution_count];
    expect(text).toContain(`cell [${earlier}], line 4, column 9`);
    expect(text).toContain(`cell [${later}], line 3, column 3`);
    expect(text).toContain(`cell [${later}], line 5, column 1`);
  });

  it("is traced into files beside the notebook", async () => {
    writeFileSync(
      join(folder, "thrower.ts"),
      "export type A = 1;\n\nexport function thrower(): void {\n  throw new Error('beside');\n}\n",
    );
    const run = await session.run('import { thrower } from "./thrower";\nthrower();');
    expect(traceback(run)).toMatch(/thrower\.ts, line 4, column 9/);
    expect(traceback(run)).toMatch(/cell \[\d+\], line 2, column/);
  });

  it("shows its hint on a line of its own, and its causes", async () => {
    const run = await session.run(
      'throw Object.assign(new Error("outer", { cause: new TypeError("inner") }), { hint: "try hubble" });',
    );
    const lines = run.reply.traceback as string[];
    expect(lines).toContain("hint: try hubble");
    expect(lines).toContain("caused by TypeError: inner");
  });

  it("may be any value", async () => {
    expect((await session.run('throw "text"')).reply).toMatchObject({ ename: "ThrownValue", evalue: "text" });
    expect((await session.run("throw { a: 1 }")).reply).toMatchObject({ ename: "ThrownValue", evalue: "{ a: 1 }" });
    expect((await session.run("throw null")).reply).toMatchObject({ ename: "ThrownValue", evalue: "null" });
    expect((await session.run("throw undefined")).reply).toMatchObject({ ename: "ThrownValue", evalue: "undefined" });
  });

  it("of a stack overflow names the line", async () => {
    const run = await session.run("function down(): number {\n  return 1 + down();\n}\ndown();");
    expect(run.reply.ename).toBe("RangeError");
    expect(place(run)).toMatchObject({ line: 2 });
    expect(await session.value("1 + 1")).toBe("2");
  });

  it("in a timer's callback ends the cell that waits", async () => {
    const run = await session.run(
      'setTimeout(() => {\n  throw new Error("from a timer");\n}, 10);\nawait new Promise(() => {});',
    );
    expect(run.reply).toMatchObject({ status: "error", evalue: "from a timer" });
    expect(place(run)).toEqual({ line: 2, column: 9 });
  });
});

describe("a type error", () => {
  it("is told with every diagnostic, its lines and a rule under each, and nothing runs", async () => {
    const run = await session.run('console.log("ran");\nconst s: string = 5;\nunknownName(s);');
    const text = traceback(run);
    expect(run.stdout).toBe("");
    expect(run.reply.ename).toBe("TypeCheckError");
    expect(run.reply.evalue).toBe("line 2, column 7: Type 'number' is not assignable to type 'string'. (and 1 more)");
    expect(text).toContain("(TypeScript 2322)");
    expect(text).toContain("> 2 | const s: string = 5;\n    |       ^");
    expect(text).toContain("Cannot find name 'unknownName'. (TypeScript 2304)");
    expect(text).toContain("> 3 | unknownName(s);\n    | ~~~~~~~~~~~");
    expect(place(run)).toEqual({ line: 2, column: 7 });
  });

  it("keeps the details of a long message together", async () => {
    const run = await session.run("const n = { a: { b: 5 } };\nconst q: { a: { b: string } } = n;");
    const lines = run.reply.traceback as string[];
    expect(lines.filter((line) => line.startsWith("TypeCheckError"))).toHaveLength(1);
    expect(lines).toContain("  The types of 'a.b' are incompatible between these types.");
    expect(lines).toContain("  Type 'number' is not assignable to type 'string'.");
    expect(lines).toContain("> 2 | const q: { a: { b: string } } = n;");
  });

  it("of syntax names the line", async () => {
    const run = await session.run("const fine = 1;\nconst broken = (;\n");
    expect(run.reply.ename).toBe("TypeCheckError");
    expect(place(run)).toMatchObject({ line: 2 });
  });

  it("in a module that a cell defines fails that cell", async () => {
    const run = await session.run("/** @module wrongModule */\nexport const n: number = 'x';");
    expect(run.reply.ename).toBe("TypeCheckError");
    expect(place(run)).toMatchObject({ line: 2 });
  });
});

describe("a rejection", () => {
  it("that nobody handles fails the cell", async () => {
    const run = await session.run('const ignored = Promise.reject(new Error("lost"));\n"value";');
    expect(run.reply).toMatchObject({ status: "error", ename: "Error", evalue: "lost" });
    expect(place(run)).toEqual({ line: 1, column: 32 });
    expect(run.types).toEqual(["execute_input", "error"]);
  });

  it("that is handled in time does not", async () => {
    const run = await session.run(
      'const handled = Promise.reject(new Error("late hand"));\nawait new Promise((resolve) => setTimeout(resolve, 10));\nhandled.catch(() => "caught")',
    );
    expect(run.reply.status).toBe("ok");
  });

  it("after the cell's end is reported as an error of that cell", async () => {
    const run = await session.run('setTimeout(() => { Promise.reject(new Error("after the end")); }, 500);');
    expect(run.reply.status).toBe("ok");
    const id = (run.messages[0].parent as { msg_id: string }).msg_id;
    const late = () =>
      session.published.find(
        ({ header, parent }) => header.msg_type === "error" && (parent as { msg_id: string }).msg_id === id,
      );
    await until(() => late() !== undefined, "the late error is published");
    expect(late()?.content.evalue).toBe("after the end");
    expect(String(late()?.content.traceback)).toMatch(/\(after cell \[\d+\] had ended\)/);
  });

  it("or a throw, after the end, while another cell runs, is put down to the cell that set the timer", async () => {
    const first = await session.run('setTimeout(() => { throw new Error("of the first"); }, 500);');
    const second = await session.run("await new Promise((resolve) => setTimeout(resolve, 700)); 7");
    expect(second.reply.status).toBe("ok");
    const id = (first.messages[0].parent as { msg_id: string }).msg_id;
    const late = session.published.filter(
      ({ header, parent }) => header.msg_type === "error" && (parent as { msg_id: string }).msg_id === id,
    );
    expect(late.map(({ content }) => content.evalue)).toEqual(["of the first"]);
  });
});

describe("process.exit", () => {
  it("becomes an error of the cell", async () => {
    const run = await session.run("const before = 1;\nprocess.exit(3);");
    expect(run.reply).toMatchObject({ status: "error", ename: "ExitError" });
    expect(place(run)).toMatchObject({ line: 2 });
    expect((await session.run("process.abort()")).reply.ename).toBe("ExitError");
    expect((await session.run("setTimeout(() => process.exit(), 5); await new Promise(() => {});")).reply.ename).toBe(
      "ExitError",
    );
    expect(await session.value("1 + 1")).toBe("2");
  });
});

describe("code that is not counted", () => {
  it("keeps its hands off the lines of counted cells", async () => {
    const defined = await session.run("function thrower(): number {\n  throw new Error('from the definition');\n}", {
      userExpressions: { one: "1", two: "2" },
    });
    await session.run("3", { silent: true });
    await session.run("4", { storeHistory: false });
    const run = await session.run("thrower()", { storeHistory: false });
    const text = traceback(run);
    expect(text).toContain(`cell [${defined.reply.execution_count}], line 2, column 9`);
    expect(text).toContain("> 2 |   throw new Error('from the definition');");
    expect(text).toContain("unnumbered cell, line 1, column 1");
  });
});
