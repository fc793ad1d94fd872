import { readFileSync, rmSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { command, newFolder, root } from "./notebooks";

let folder: string;
beforeAll(() => {
  folder = newFolder();
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

describe("cosmology-cells", () => {
  it("lists its commands, and explains each", async () => {
    const help = await command(["--help"], folder);
    expect([help.code, help.stderr]).toEqual([0, ""]);
    for (const name of ["install", "run", "start"]) {
      expect(help.stdout).toMatch(new RegExp(`^  ${name} `, "m"));
      const one = await command([name, "--help"], folder);
      expect([one.code, one.stdout]).toEqual([0, expect.stringContaining(`cosmology-cells ${name}`)]);
    }
  });

  it("tells its version, that of the package", async () => {
    const { version } = JSON.parse(readFileSync(join(root, "package.json"), "utf8"));
    expect(await command(["--version"], folder)).toEqual({ code: 0, stdout: `${version}\n`, stderr: "" });
  });

  it("suggests the command that was meant, and ends with 2", async () => {
    const { code, stdout, stderr } = await command(["instal"], folder);
    expect([code, stdout]).toEqual([2, ""]);
    expect(stderr).toContain('there is no command "instal"; did you mean install?');
    const far = await command(["quit"], folder);
    expect(far.code).toBe(2);
    expect(far.stderr).not.toContain("did you mean");
    expect((await command(["constructor"], folder)).code).toBe(2);
  });

  it("without a command shows the list and ends with 2", async () => {
    const { code, stdout, stderr } = await command([], folder);
    expect([code, stdout]).toEqual([2, ""]);
    expect(stderr).toContain("install");
  });
});
