/**
 * Makes what is missing or stale: the dependencies (by the hash of the lock file and Node's major version) and the build
 * (by the hash of the sources). Cheap when nothing is to do, so that every npm script calls it. Plain Node, no dependency,
 * and no install script is ever needed.
 *
 *   node setup.mjs           what is stale
 *   node setup.mjs --build   the build in any case
 */
import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { dirname, join, relative } from "node:path";
import { fileURLToPath } from "node:url";

const root = dirname(fileURLToPath(import.meta.url));
const inRoot = (...parts) => join(root, ...parts);
const say = (text) => process.stderr.write(`setup: ${text}\n`);

function readIfThere(path) {
  try {
    return readFileSync(path, "utf8");
  } catch {
    return undefined;
  }
}

function fail(text) {
  say(text);
  process.exit(1);
}

function run(command, args, what, shell = false) {
  const result = spawnSync(command, args, { cwd: root, stdio: ["ignore", "pipe", "pipe"], encoding: "utf8", shell });
  if (result.error) fail(`${what} could not be started: ${result.error.message}`);
  if (result.status !== 0) {
    process.stderr.write(result.stdout + result.stderr);
    fail(`${what} failed${result.signal ? ` (${result.signal})` : ""}`);
  }
}

// ---- dependencies

const lockText = readIfThere(inRoot("package-lock.json"));
if (lockText === undefined) fail("package-lock.json is missing");
const nodeMajor = process.versions.node.split(".")[0];
if (!(Number(nodeMajor) >= 20)) fail(`Node 20 or newer is needed, this is ${process.version}`);
const lockHash = createHash("sha256").update(lockText).digest("hex");
const dependencyStamp = `${lockHash} node${nodeMajor}\n`;
const dependencyStampFile = inRoot("node_modules", ".cosmology-cells-stamp");

/** Whether somebody has already installed exactly what the lock file says, by npm's own record of what is there. */
function installedByHand() {
  const record = readIfThere(inRoot("node_modules", ".package-lock.json"));
  if (record === undefined) return false;
  const present = JSON.parse(record).packages ?? {};
  return Object.entries(JSON.parse(lockText).packages)
    .filter(([path, entry]) => path !== "" && !entry.optional)
    .every(([path, entry]) => present[path]?.version === entry.version && existsSync(inRoot(path, "package.json")));
}

if (readIfThere(dependencyStampFile) !== dependencyStamp) {
  if (!installedByHand()) {
    say("installing the dependencies (npm ci) ...");
    const args = ["ci", "--include=dev", "--ignore-scripts", "--no-audit", "--no-fund"];
    const npm = process.env.npm_execpath;
    if (npm?.endsWith("npm-cli.js")) run(process.execPath, [npm, ...args], "npm ci");
    else run("npm", args, "npm ci", process.platform === "win32");
  }
  mkdirSync(inRoot("node_modules"), { recursive: true });
  writeFileSync(dependencyStampFile, dependencyStamp);
}

// ---- build

function sourceFiles(folder) {
  return readdirSync(folder, { withFileTypes: true })
    .sort((a, b) => (a.name < b.name ? -1 : 1))
    .flatMap((entry) => {
      const path = join(folder, entry.name);
      if (entry.isDirectory()) return sourceFiles(path);
      return /\.(ts|json)$/.test(entry.name) ? [path] : [];
    });
}

function sourceStamp() {
  const hash = createHash("sha256").update(dependencyStamp);
  const configurations = ["tsconfig.json", "tsconfig.build.json", "setup.mjs"].map((name) => inRoot(name));
  for (const path of [...configurations, ...sourceFiles(inRoot("cosmo")), ...sourceFiles(inRoot("kernel-ext"))]) {
    hash
      .update(`${relative(root, path)}\0`)
      .update(readFileSync(path))
      .update("\0");
  }
  return `${hash.digest("hex")}\n`;
}

/** Puts the finished folder in the place of the old one; a set-up running beside this one may get there first. */
function swapIn(fresh) {
  const place = inRoot("dist");
  const old = inRoot(`.dist-old-${process.pid}`);
  for (let attempt = 0; ; attempt++) {
    try {
      if (existsSync(place)) renameSync(place, old);
      renameSync(fresh, place);
      break;
    } catch (error) {
      if (attempt >= 20) throw error;
    } finally {
      rmSync(old, { recursive: true, force: true });
    }
  }
}

const buildStamp = sourceStamp();
if (process.argv.includes("--build") || readIfThere(inRoot("dist", ".stamp")) !== buildStamp) {
  say("building ...");
  const fresh = `.dist-${process.pid}`;
  process.on("exit", () => rmSync(inRoot(fresh), { recursive: true, force: true }));
  const compiler = inRoot("node_modules", "typescript", "bin", "tsc");
  run(process.execPath, [compiler, "-p", "tsconfig.build.json", "--outDir", fresh], "the TypeScript compiler");
  // The names that cells know without import are those that the package exports, types included: only the compiler
  // knows these, so they are written down here instead of being looked for at every start of a kernel.
  run(process.execPath, [inRoot(fresh, "kernel-ext", "kernel", "exportedNames.js")], "the list of exported names");
  writeFileSync(inRoot(fresh, ".stamp"), buildStamp);
  swapIn(inRoot(fresh));
}
