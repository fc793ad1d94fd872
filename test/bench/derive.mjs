/** A long chain through `derive --fast`, CSV to CSV, as a shell runs it: wall time, processor time, peak memory. */
import { spawnSync } from "node:child_process";
import {
  closeSync,
  createReadStream,
  existsSync,
  mkdirSync,
  openSync,
  readFileSync,
  rmSync,
  statSync,
  writeSync,
} from "node:fs";
import { join } from "node:path";
import { createInterface } from "node:readline";
import { chainModels } from "./models.mjs";
import { built, root } from "./suite.mjs";

const folder = join(root, "out", "bench");

/** What the file has; the parameters are those of chainModels, the others are carried through. */
const header = ["row", "weight", "misfit", "hubble", "baryonDensity", "coldMatterDensity", "logAmplitude", "tilt"];

/** What is added: twenty columns together. */
const added = [
  "lastScatteringRedshift",
  "lastScatteringSoundHorizon",
  "acousticAngle",
  "dragRedshift",
  "dragSoundHorizon",
  "dampingWavenumber",
  "age",
  "equalityRedshift",
  "matterFraction",
  "transverseDistance(0.51)",
  "hubbleRate(0.51)",
  "volumeDistance(0.295)",
];

/** Writes the seeded chain, unless it is there; rows of one chunk at a time, so that memory stays small. */
function writeChain(path, rows) {
  const chunk = 20_000;
  const file = openSync(path, "w");
  writeSync(file, `${header.join(",")}\n`);
  for (let start = 0; start < rows; start += chunk) {
    const models = chainModels(Math.min(chunk, rows - start), 1000 + start / chunk);
    const lines = models.map(([hubble, baryons, cold], i) => {
      const row = start + i;
      const misfit = 1200 + ((row * 7919) % 1000) / 100;
      const tilt = 0.965 + ((row * 104729) % 1000) / 1e5;
      const amplitude = 3.04 + ((row * 1299709) % 1000) / 1e5;
      const cells = [row, 1 + (row % 5), misfit, hubble.toFixed(6), baryons.toFixed(8), cold.toFixed(8)];
      return `${cells.join(",")},${amplitude},${tilt}\n`;
    });
    writeSync(file, lines.join(""));
  }
  closeSync(file);
}

/** Every so-manyth row of the output against the full computation: the largest relative difference. Throws for a row too few. */
async function check(path, rows) {
  const { evaluateModel } = built("cosmo/index.js");
  const step = Math.floor(rows / 5);
  let names;
  let count = 0;
  let largest = 0;
  for await (const line of createInterface({ input: createReadStream(path) })) {
    const cells = line.split(line.includes('"') ? /,(?=(?:[^"]*"[^"]*")*[^"]*$)/ : ",");
    if (names === undefined) {
      names = cells.map((cell) => cell.replaceAll('"', ""));
      continue;
    }
    if (count % step === 0) {
      const value = (name) => Number(cells[names.indexOf(name)]);
      const [hubble, baryonDensity, coldMatterDensity] = header.slice(3, 6).map(value);
      const numbers = evaluateModel({ hubble, baryonDensity, coldMatterDensity });
      for (const name of added) {
        const [plain, argument] = name.split(/[()]/);
        const exact = argument === undefined ? numbers.value(plain) : numbers.value(plain, Number(argument));
        const difference = Math.abs(value(name) / exact - 1);
        if (!(difference < 1e-6)) throw new Error(`derive is off by ${difference} in ${name}, row ${count}`);
        largest = Math.max(largest, difference);
      }
    }
    count++;
  }
  if (count !== rows) throw new Error(`derive wrote ${count} of ${rows} rows`);
  return { columns: names.length, largest };
}

/** @param rows rows of the chain; @param workers worker threads. */
export async function timeDerive(say, rows, workers = 2) {
  mkdirSync(folder, { recursive: true });
  const input = join(folder, `chain-${rows}.csv`);
  const output = join(folder, `derived-${rows}.csv`);
  const usage = join(folder, "usage.json");
  if (!existsSync(input)) {
    say(`writing a chain of ${rows} rows ...`);
    writeChain(input, rows);
  }
  rmSync(output, { force: true });
  rmSync(usage, { force: true });
  say(`derive, ${rows} rows, ${workers} workers ...`);
  const command = [
    ...["--require", join(root, "test", "bench", "usage.cjs"), join(root, "bin.cjs"), "derive", input],
    ...["--add", added.join(", "), "--fast", "--workers", String(workers), "--out", output],
  ];
  const before = performance.now();
  const result = spawnSync(process.execPath, command, {
    encoding: "utf8",
    env: { ...process.env, BENCH_USAGE_FILE: usage },
  });
  const wall = (performance.now() - before) / 1000;
  if (result.status !== 0) throw new Error(`derive ended with ${result.status}: ${result.stderr.slice(-2000)}`);
  const { memory, processor } = JSON.parse(readFileSync(usage, "utf8"));
  const { columns, largest } = await check(output, rows);
  const bytes = { input: statSync(input).size, output: statSync(output).size };
  rmSync(output, { force: true });
  return { rows, workers, columns, wall, processor, memory, largest, bytes };
}
