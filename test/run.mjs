/**
 * Runs everything that must hold: formatter and linter, the type check, the emitted declarations under the compiler that
 * cells use, then vitest. Arguments go on to vitest. Ends with one plain line that counts all of it:
 * `N passed, N failed, N skipped`.
 */
import { spawnSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

const root = dirname(dirname(fileURLToPath(import.meta.url)));
const tool = (...parts) => join(root, "node_modules", ...parts);

const count = { passed: 0, failed: 0, skipped: 0 };

function check(name, args) {
  const result = spawnSync(process.execPath, args, { cwd: root, encoding: "utf8", stdio: ["ignore", "pipe", "pipe"] });
  const passed = result.status === 0;
  count[passed ? "passed" : "failed"]++;
  process.stdout.write(`${passed ? "ok    " : "FAILED"} ${name}\n`);
  if (!passed) process.stdout.write(`${result.stdout ?? ""}${result.stderr ?? ""}${result.error ?? ""}\n`);
}

check("format and lint (biome)", [tool("@biomejs", "biome", "bin", "biome"), "check", "--colors=off", "."]);
check("types (TypeScript 5.9)", [tool("typescript", "bin", "tsc"), "-p", "tsconfig.json"]);
check("emitted declarations (TypeScript 5.0.4, as in cells)", [
  tool("@tslab", "typescript-for-tslab", "bin", "tsc"),
  ...["--noEmit", "--strict", "--skipLibCheck", "false"],
  ...["--target", "es2022", "--lib", "es2022", "--module", "commonjs", "--moduleResolution", "node10"],
  ...["--esModuleInterop", "--types", "node"],
  join("dist", "kernel-ext", "index.d.ts"),
  join("dist", "cosmo", "index.d.ts"),
]);

const folder = mkdtempSync(join(tmpdir(), "cosmology-cells-test-"));
const report = join(folder, "vitest.json");
const vitest = spawnSync(
  process.execPath,
  [
    ...[tool("vitest", "vitest.mjs"), "run", "--reporter=default", "--reporter=json", `--outputFile.json=${report}`],
    ...process.argv.slice(2),
  ],
  { cwd: root, stdio: ["ignore", "inherit", "inherit"] },
);
try {
  const result = JSON.parse(readFileSync(report, "utf8"));
  count.passed += result.numPassedTests;
  count.failed += result.numFailedTests;
  count.skipped += result.numPendingTests + result.numTodoTests;
  // A file that cannot be loaded, or an error outside of all tests, counts although no test of it ran.
  const withoutTests = result.testResults.filter(
    (file) => file.status === "failed" && file.assertionResults.length === 0,
  );
  count.failed += withoutTests.length;
  if (vitest.status !== 0 && result.numFailedTests + withoutTests.length === 0) count.failed++;
} catch (error) {
  process.stdout.write(`vitest left no report: ${error.message}\n`);
  count.failed++;
} finally {
  rmSync(folder, { recursive: true, force: true });
}

process.stdout.write(`\n${count.passed} passed, ${count.failed} failed, ${count.skipped} skipped\n`);
process.exitCode = count.failed > 0 ? 1 : 0;
