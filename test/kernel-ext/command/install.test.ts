// Where Jupyter looks for kernels, and what kernel.json holds: Jupyter's documentation (memory).
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { isAbsolute, join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { firstDataFolder, prefixDataFolder, userDataFolder } from "../../../kernel-ext/command/jupyterFolders";
import { command, newFolder } from "./notebooks";

let folder: string;
beforeAll(() => {
  folder = newFolder();
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** Surroundings in which nothing of the real user's Jupyter is in reach. */
const clean = (more: Record<string, string> = {}) => ({
  HOME: join(folder, "home"),
  USERPROFILE: join(folder, "home"),
  XDG_DATA_HOME: "",
  JUPYTER_PATH: "",
  JUPYTER_DATA_DIR: "",
  ...more,
});

describe("the Jupyter data folder", () => {
  const at = (platform: NodeJS.Platform, environment: NodeJS.ProcessEnv) => ({
    platform,
    environment,
    home: "/home/x",
  });

  it("is what each platform prescribes", () => {
    expect(userDataFolder(at("linux", {}))).toBe("/home/x/.local/share/jupyter");
    expect(userDataFolder(at("linux", { XDG_DATA_HOME: "/data" }))).toBe("/data/jupyter");
    expect(userDataFolder(at("darwin", {}))).toBe("/home/x/Library/Jupyter");
    expect(userDataFolder(at("win32", { APPDATA: "/roaming" }))).toBe("/roaming/jupyter");
  });

  it("is JUPYTER_DATA_DIR where that is set, and the first of JUPYTER_PATH before it", () => {
    expect(userDataFolder(at("linux", { JUPYTER_DATA_DIR: "/own" }))).toBe("/own");
    expect(firstDataFolder(at("linux", { JUPYTER_DATA_DIR: "/own", JUPYTER_PATH: "/a:/b" }))).toBe("/a");
    expect(firstDataFolder(at("linux", { JUPYTER_DATA_DIR: "/own", JUPYTER_PATH: "" }))).toBe("/own");
    expect(prefixDataFolder("/env")).toBe("/env/share/jupyter");
  });
});

describe("cosmology-cells install", () => {
  it("writes a description that Jupyter can start, says where, and takes it away again", async () => {
    const places = [
      { args: [] as string[], environment: clean(), at: join(folder, "home", ".local", "share", "jupyter") },
      { args: [], environment: clean({ JUPYTER_PATH: join(folder, "path") }), at: join(folder, "path") },
      { args: ["--user"], environment: clean({ JUPYTER_DATA_DIR: join(folder, "own") }), at: join(folder, "own") },
      { args: ["--prefix", join(folder, "env")], environment: clean(), at: join(folder, "env", "share", "jupyter") },
    ];
    for (const { args, environment, at } of places) {
      const kernel = join(at, "kernels", "cosmology-cells");
      const installed = await command(["install", ...args], folder, environment);
      expect([installed.code, installed.stdout]).toEqual([0, expect.stringContaining(kernel)]);
      expect(readdirSync(kernel)).toEqual(["kernel.json"]);
      const description = JSON.parse(readFileSync(join(kernel, "kernel.json"), "utf8"));
      expect(description).toMatchObject({ language: "typescript", interrupt_mode: "message" });
      const [node, flag, main, file] = description.argv;
      expect([isAbsolute(node), flag, file]).toEqual([true, "--no-force-async-hooks-checks", "{connection_file}"]);
      expect(existsSync(main)).toBe(true);
      expect((await command(["install", ...args], folder, environment)).code).toBe(0);
      const removed = await command(["install", ...args, "--remove"], folder, environment);
      expect([removed.code, removed.stdout]).toEqual([0, expect.stringContaining(kernel)]);
      expect(existsSync(kernel)).toBe(false);
      const again = await command(["install", ...args, "--remove"], folder, environment);
      expect([again.code, again.stdout]).toEqual([0, `There is no kernel at ${kernel}\n`]);
    }
  });

  it("leaves alone what it did not write", async () => {
    const kernel = join(folder, "other", "share", "jupyter", "kernels", "cosmology-cells");
    mkdirSync(kernel, { recursive: true });
    writeFileSync(join(kernel, "kernel.json"), '{"argv":["something"],"display_name":"x","language":"y"}');
    for (const args of [["install"], ["install", "--remove"]]) {
      const run = await command([...args, "--prefix", join(folder, "other")], folder, clean());
      expect([run.code, run.stderr]).toEqual([2, expect.stringContaining("was not written by this command")]);
    }
    expect(readFileSync(join(kernel, "kernel.json"), "utf8")).toContain("something");
  });

  it("refuses two places at once", async () => {
    const run = await command(["install", "--user", "--prefix", folder], folder, clean());
    expect([run.code, run.stderr]).toEqual([2, expect.stringContaining("--user and --prefix name two places")]);
  });
});
