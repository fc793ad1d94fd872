import { spawnSync } from "node:child_process";
import {
  copyFileSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { newFolder, root } from "./notebooks";

// A small project of the same layout, with the dependencies of this one.
let folder: string;
beforeAll(() => {
  folder = newFolder();
  for (const name of ["setup.mjs", "package.json", "package-lock.json", "tsconfig.json", "tsconfig.build.json"]) {
    copyFileSync(join(root, name), join(folder, name));
  }
  symlinkSync(join(root, "node_modules"), join(folder, "node_modules"), "dir");
  for (const part of ["cosmo", join("kernel-ext", "kernel")]) mkdirSync(join(folder, part), { recursive: true });
  const names = join("kernel-ext", "kernel", "exportedNames.ts");
  copyFileSync(join(root, names), join(folder, names));
  writeFileSync(
    join(folder, "cosmo", "index.ts"),
    'import data from "./data.json";\nexport const one: number = data.one;\n',
  );
  writeFileSync(join(folder, "cosmo", "data.json"), '{ "one": 1 }\n');
  writeFileSync(
    join(folder, "kernel-ext", "index.ts"),
    'export { one } from "../cosmo";\nexport { gone } from "./gone";\nexport type Only = string;\n',
  );
  writeFileSync(join(folder, "kernel-ext", "gone.ts"), "export const gone = 2;\n");
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function setup(...args: string[]): { code: number | null; said: string } {
  const { status, stdout, stderr } = spawnSync(process.execPath, ["setup.mjs", ...args], {
    cwd: folder,
    encoding: "utf8",
  });
  return { code: status, said: stdout + stderr };
}

const built = (...parts: string[]): string => join(folder, "dist", ...parts);
const inFolder = (): string[] => readdirSync(folder).filter((name) => name.startsWith(".dist"));

describe("setup.mjs", () => {
  it("builds once, with the JSON that the code imports and the names that the package exports", () => {
    expect(setup()).toEqual({ code: 0, said: "setup: building ...\n" });
    expect(existsSync(built("cosmo", "data.json"))).toBe(true);
    expect(JSON.parse(readFileSync(built("kernel-ext", "kernel", "exportedNames.json"), "utf8"))).toEqual({
      values: ["gone", "one"],
      types: ["Only"],
    });
    expect(setup()).toEqual({ code: 0, said: "" });
  });

  it("builds again when asked, and when a source has changed, and leaves nothing stale behind", () => {
    expect(setup("--build")).toEqual({ code: 0, said: "setup: building ...\n" });
    rmSync(join(folder, "kernel-ext", "gone.ts"));
    writeFileSync(join(folder, "kernel-ext", "index.ts"), 'export { one } from "../cosmo";\n');
    expect(setup()).toEqual({ code: 0, said: "setup: building ...\n" });
    expect(readdirSync(built("kernel-ext")).filter((name) => name.startsWith("gone"))).toEqual([]);
    writeFileSync(join(folder, "cosmo", "data.json"), '{ "one": 11 }\n');
    expect(setup().said).toBe("setup: building ...\n");
    expect(require(built("kernel-ext", "index.js")).one).toBe(11);
    expect(inFolder()).toEqual([]);
  });

  it("keeps the old build when the new one fails, and says why", () => {
    writeFileSync(join(folder, "cosmo", "index.ts"), 'export const one: number = "x";\n');
    const { code, said } = setup();
    expect(code).toBe(1);
    expect(said).toMatch(/cosmo\/index\.ts\(1,14\): error TS2322/);
    expect(said).toContain("setup: the TypeScript compiler failed");
    expect(existsSync(built("kernel-ext", "index.js"))).toBe(true);
    expect(inFolder()).toEqual([]);
  });
});
