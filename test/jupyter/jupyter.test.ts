// Real front ends, from Debian: python3-jupyter-kernel-test, jupyter-nbconvert, jupyter-console, python3-nbformat.
import { spawn, spawnSync } from "node:child_process";
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, symlinkSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { codeCell, command, markdownCell, newFolder, root, writeCells } from "../kernel-ext/command/notebooks";

const python = "/usr/bin/python3";

/** The checks are skipped where the packages are missing, but not where they were asked for. */
function available(module: string): boolean {
  if (process.env.COSMOLOGY_CELLS_REQUIRE_DEBIAN) return true;
  return spawnSync(python, ["-c", `import ${module}`]).status === 0;
}

interface Finished {
  code: number | null;
  output: string;
}

let folder: string;
let environment: NodeJS.ProcessEnv;

beforeAll(async () => {
  folder = newFolder();
  const data = join(folder, "data");
  environment = {
    ...process.env,
    HOME: folder,
    JUPYTER_PATH: data,
    JUPYTER_DATA_DIR: join(folder, "user-data"),
    JUPYTER_CONFIG_DIR: join(folder, "config"),
    JUPYTER_RUNTIME_DIR: join(folder, "runtime"),
    PYTHONWARNINGS: "ignore",
  };
  const installed = await command(["install"], folder, { JUPYTER_PATH: data });
  if (installed.code !== 0) throw new Error(installed.stderr);
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function run(args: string[], input = ""): Promise<Finished> {
  const child = spawn(python, args, { cwd: folder, env: environment, stdio: ["pipe", "pipe", "pipe"] });
  let output = "";
  for (const stream of [child.stdout, child.stderr]) {
    stream.on("data", (text) => {
      output += text;
    });
  }
  child.stdin.end(input);
  return new Promise((resolve, reject) => {
    child.on("error", reject);
    child.on("close", (code) => resolve({ code, output }));
  });
}

const nbconvert = (...args: string[]) =>
  run(["-m", "nbconvert", "--to", "notebook", "--ExecutePreprocessor.kernel_name=cosmology-cells", ...args]);

describe.skipIf(!available("jupyter_kernel_test"))("python3-jupyter-kernel-test", () => {
  it("passes on everything that applies", { timeout: 300_000 }, async () => {
    const { code, output } = await run([join(root, "test", "jupyter", "kernel_test.py")]);
    expect(code, output).toBe(0);
    expect(output).toMatch(/Ran 12 tests/);
    // What does not apply: there is no pager, and no function of a cell that clears its output.
    const skipped = [...output.matchAll(/^(test_\w+) .*skipped/gm)].map(([, name]) => name);
    expect(skipped.sort()).toEqual(["test_clear_output", "test_pager"]);
  });
});

describe.skipIf(!available("nbconvert, nbformat"))("jupyter nbconvert --execute", () => {
  it("runs a notebook and keeps results, streams and displays", { timeout: 300_000 }, async () => {
    writeCells(folder, "good.ipynb", [
      markdownCell("# Good"),
      codeCell("const a = 40;\nconsole.log('printed');\na + 2"),
      codeCell("for (let i = 0; i < 1500; i++) console.log(i);"),
    ]);
    const { code, output } = await nbconvert("--execute", "good.ipynb", "--output", "good-done.ipynb");
    expect(code, output).toBe(0);
    const done = JSON.parse(readFileSync(join(folder, "good-done.ipynb"), "utf8"));
    expect(done.cells[1].execution_count).toBe(1);
    expect(done.cells[1].outputs.map((one: { output_type: string }) => one.output_type)).toEqual([
      "stream",
      "execute_result",
    ]);
    expect([done.cells[2].outputs[0].text].flat().join("").trim().split("\n")).toHaveLength(1500);
  });

  it("runs the demo notebooks by the kernel that they name", { timeout: 600_000 }, async () => {
    const demos = readdirSync(join(root, "notebooks-demo")).filter((name) => name.endsWith(".ipynb"));
    expect(demos.length).toBeGreaterThan(0);
    for (const name of demos) {
      const { code, output } = await run([
        ...["-m", "nbconvert", "--to", "notebook", "--execute", "--output-dir", folder],
        join(root, "notebooks-demo", name),
      ]);
      expect(code, output).toBe(0);
      const done = JSON.parse(readFileSync(join(folder, name), "utf8"));
      const outputs = done.cells.flatMap((cell: { outputs?: object[] }) => cell.outputs ?? []);
      expect(outputs.length).toBeGreaterThan(0);
      expect(outputs.filter((one: { output_type: string }) => one.output_type === "error")).toEqual([]);
      expect(JSON.stringify(outputs)).toContain("image/svg+xml");
    }
  });

  it("fails loudly on a broken cell, with the error and the line", { timeout: 300_000 }, async () => {
    for (const [source, expected] of [
      ["const b = 1;\nthrow new RangeError('broken here');", /RangeError: broken here[\s\S]*> 2 \| throw/],
      ["const c: string = 5;", /TypeCheckError[\s\S]*not assignable to type 'string'/],
      ["Promise.reject(new Error('nobody cares'));", /Error: nobody cares/],
      ["process.exit(0);", /ExitError/],
    ] as const) {
      writeCells(folder, "broken.ipynb", [codeCell(source), codeCell("1")]);
      const { code, output } = await nbconvert("--execute", "broken.ipynb", "--output", "broken-done.ipynb");
      expect(code, source).not.toBe(0);
      expect(output).toMatch(expected);
      expect(existsSync(join(folder, "broken-done.ipynb"))).toBe(false);
    }
  });

  it("with errors allowed runs the next cell all the same", { timeout: 300_000 }, async () => {
    writeCells(folder, "allowed.ipynb", [codeCell("throw new Error('x')"), codeCell("5 + 5")]);
    const { code, output } = await nbconvert(
      "--execute",
      "--allow-errors",
      "allowed.ipynb",
      "--output",
      "allowed-done.ipynb",
    );
    expect(code, output).toBe(0);
    const done = JSON.parse(readFileSync(join(folder, "allowed-done.ipynb"), "utf8"));
    expect(done.cells[1].outputs[0].data["text/plain"]).toEqual(["10"]);
  });

  it("interrupts a cell that takes too long, and leaves no kernel behind", { timeout: 300_000 }, async () => {
    writeCells(folder, "slow.ipynb", [codeCell("await null; for (;;) {}")]);
    const started = await nbconvert(
      "--execute",
      "--ExecutePreprocessor.timeout=3",
      "slow.ipynb",
      "--output",
      "slow-done.ipynb",
    );
    expect(started.code).not.toBe(0);
    expect(started.output).toMatch(/Timeout/i);
    const left = spawnSync("ps", ["-eo", "args"], { encoding: "utf8" }).stdout.split("\n");
    expect(left.filter((line) => line.includes(join(folder, "runtime")))).toEqual([]);
  });
});

describe.skipIf(!available("nbformat"))("notebooks that `cosmology-cells run` writes", () => {
  it("are valid nbformat 4.5 by the official schema", { timeout: 300_000 }, async () => {
    const path = writeCells(folder, "any.ipynb", [
      markdownCell("# θ"),
      codeCell("console.log('a'); console.error('b'); 1"),
      codeCell(
        "progress({ label: 'Rows', total: 2 }).finish(); ({ [displaySymbol]: () => ({ 'text/html': '<b>x</b>\\n<i>y</i>', 'application/json': { a: 1 } }) })",
      ),
      codeCell("throw new Error('x')"),
    ]);
    await command(["run", path, "--out", join(folder, "out"), "--allow-errors"], folder);
    const check =
      "import json, sys, nbformat; nb = json.load(open(sys.argv[1])); nbformat.validate(nb); print(nb['nbformat'], nb['nbformat_minor'])";
    const { code, output } = await run(["-c", check, join(folder, "out", "any.ipynb")]);
    expect([code, output.trim()]).toEqual([0, "4 5"]);
  });
});

describe.skipIf(!available("jupyter_console"))("jupyter console", () => {
  it("shows results, output and errors", { timeout: 300_000 }, async () => {
    const { output } = await run(
      ["-m", "jupyter_console", "--kernel", "cosmology-cells", "--simple-prompt", "--no-confirm-exit"],
      "const a = 20;\na + 22\nconsole.log('to the console')\nthrow new RangeError('in the console')\nquit\n",
    );
    expect(output).toMatch(/42/);
    expect(output).toMatch(/to the console/);
    expect(output).toMatch(/RangeError: in the console/);
  });
});

describe("a plain tslab cell", () => {
  it("can import the package, and its results speak as text", { timeout: 300_000 }, async () => {
    const project = join(folder, "project");
    mkdirSync(join(project, "node_modules"), { recursive: true });
    symlinkSync(root, join(project, "node_modules", "cosmology-cells"), "dir");
    const script = join(project, "stock.cjs");
    // The stock executor of tslab, as its kernel uses it; what a cell shows goes to the console.
    writeFileSync(
      script,
      `const { createConverter } = require(${JSON.stringify(join(root, "node_modules", "tslab", "dist", "converter.js"))});
      const { createExecutor } = require(${JSON.stringify(join(root, "node_modules", "tslab", "dist", "executor.js"))});
      const node = createConverter({ isJS: false, isBrowser: false });
      const executor = createExecutor(process.cwd(), { node, browser: node, close: () => node.close() }, console);
      (async () => {
        const ok = await executor.execute('import { formatNumber, type MimeBundle } from "cosmology-cells";\\nconst shown: string = formatNumber(1.5);\\nshown');
        const wrong = await executor.execute('const n: number = formatNumber(1);');
        console.log("ok", ok, "wrong", wrong);
        process.exit(0);
      })();`,
    );
    const result = spawnSync(process.execPath, [script], { cwd: project, encoding: "utf8" });
    expect(result.stdout).toMatch(/^1\.5\d*\n/);
    expect(result.stdout).toContain("ok true wrong false");
    expect(result.stderr).toContain("Type 'string' is not assignable to type 'number'");
  });
});
