/**
 * The full suite by the batch engine, by the same algorithm in plain C, by C on GSL and by Python on SciPy: answers compared first,
 * then all of them timed in turn, round by round.
 */
import { spawnSync } from "node:child_process";
import { existsSync, mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { writeTables } from "./c/tables.mjs";
import { chainModels, givensOf, modelLines, wideModels } from "./models.mjs";
import { built, median, root, suite } from "./suite.mjs";

const folder = join(root, "out", "bench");
const inFolder = (name) => join(folder, name);
const source = (...parts) => join(root, "test", "bench", ...parts);
const coefficients = JSON.parse(
  readFileSync(join(root, "cosmo", "recombination", "calibrationCoefficients.json"), "utf8"),
).coefficients.map(String);

/** Debian's own Python, for Debian's SciPy. */
const python = "/usr/bin/python3";

function run(command, args, env) {
  const result = spawnSync(command, args, { encoding: "utf8", env: env ?? process.env, maxBuffer: 1 << 28 });
  if (result.error !== undefined) throw result.error;
  if (result.status !== 0) {
    throw new Error(
      `${command} ${args[0]} ended with ${result.status ?? result.signal}: ${result.stderr.slice(-2000)}`,
    );
  }
  return result.stdout;
}

const runs = (command, args, env) => {
  const { status, error } = spawnSync(command, args, { env: env ?? process.env, stdio: "ignore" });
  return error === undefined && status === 0;
};

/** What a program printed: values by model, seconds, and times of one model where it gives them. */
function read(text, count) {
  const lines = text.trim().split("\n");
  const rows = lines.slice(0, count).map((line) => line.split(" ").map(Number));
  const [, wall, processor] = lines[lines.length - 1].split(" ").map(Number);
  const one = lines
    .find((line) => line.startsWith("one "))
    ?.split(" ")
    .slice(1)
    .map(Number);
  if (rows.length !== count || !rows.every((row) => row.length === suite.length && row.every(Number.isFinite))) {
    throw new Error(`a program left values out:\n${lines.slice(0, 3).join("\n")}`);
  }
  if (!(wall > 0 && processor > 0)) throw new Error(`a program gave no time: ${lines[lines.length - 1]}`);
  return { rows, wall, processor, one };
}

/** Without two settings of some machines' BLAS, which are no business of an analyst's script. */
const plainEnvironment = () => {
  const { OPENBLAS_CORETYPE: _type, OPENBLAS_L2_SIZE: _size, ...rest } = process.env;
  return rest;
};

/**
 * The programs that can run here; of the others, why not. `tolerance`: the largest relative difference from the full
 * computation, in any quantity but k_D and in k_D, about three times what was measured on chain and wide models.
 */
function programs(say, sizes) {
  const list = [
    {
      name: "batch engine",
      key: "engine",
      tolerance: [1e-6, 1e-6],
      rounds: sizes.engineRounds,
      models: sizes.chain,
      call: (path, count, rounds) => run(process.execPath, [source("engine.mjs"), path, String(count), String(rounds)]),
    },
  ];
  mkdirSync(folder, { recursive: true });
  if (!runs("gcc", ["--version"])) {
    say("gcc is missing (apt-get install gcc): no C programs");
  } else {
    writeTables(inFolder("tables.h"));
    for (const [key, name, flags] of [
      ["c", "same algorithm, plain C -O3", []],
      ["cNative", "the same, -O3 -march=native", ["-march=native"]],
    ]) {
      const binary = inFolder(`suite-${key}`);
      run("gcc", ["-O3", ...flags, "-I", folder, "-o", binary, source("c", "suite.c"), "-lm"]);
      list.push({
        name,
        key,
        tolerance: [1e-6, 1e-6],
        rounds: sizes.engineRounds,
        models: sizes.chain,
        call: (path, count, rounds) => run(binary, [path, String(count), String(rounds)]),
      });
    }
    const binary = inFolder("suite-gsl");
    const compiled = existsSync("/usr/include/gsl/gsl_odeiv2.h");
    if (!compiled) say("GSL is missing (apt-get install libgsl-dev): no C on GSL");
    else {
      run("gcc", ["-O3", "-march=native", "-o", binary, source("gsl", "suite.c"), "-lgsl", "-lgslcblas", "-lm"]);
      for (const [key, name, stepper, tolerance] of [
        ["gsl", "C on GSL, stepper at 1e-6", "1e-6", [1e-5, 5e-5]],
        ["gslExact", "C on GSL, answers to 1e-6", "1e-7", [1e-6, 3e-6]],
      ]) {
        list.push({
          name,
          key,
          tolerance,
          rounds: 1,
          models: sizes.gsl,
          call: (path, count) => run(binary, [path, String(count), stepper, ...coefficients]),
        });
      }
    }
  }
  if (!runs(python, ["-c", "import scipy.integrate"], plainEnvironment())) {
    say(`SciPy is missing (apt-get install python3-scipy): no Python on SciPy`);
  } else {
    list.push({
      name: "Python on SciPy, LSODA at 1e-6",
      key: "scipy",
      tolerance: [1e-5, 5e-5],
      rounds: 1,
      models: sizes.scipy,
      call: (path, count) =>
        run(python, [source("scipy", "suite.py"), path, String(count), ...coefficients], plainEnvironment()),
    });
  }
  return list;
}

const damping = suite.indexOf("dampingWavenumber");

/** Largest relative difference by quantity. */
const differences = (rows, reference) =>
  suite.map((_, k) => Math.max(...rows.map((row, i) => Math.abs(row[k] / reference[i][k] - 1))));

/** All programs against the full computation on chain and wide models; throws where one disagrees. */
function compare(list) {
  const models = [...chainModels(10, 7), ...wideModels(10, 8)];
  const path = inFolder("compared.txt");
  writeFileSync(path, modelLines(models));
  const { evaluateModel } = built("cosmo/index.js");
  const reference = models.map((row) => {
    const numbers = evaluateModel(givensOf(row));
    return suite.map((name) => numbers.value(name));
  });
  const answers = list.map((program) => ({ program, ...read(program.call(path, models.length, 1), models.length) }));
  const compared = answers.map(({ program, rows }) => ({
    key: program.key,
    name: program.name,
    largest: differences(rows, reference),
  }));
  answers.forEach(({ program }, i) => {
    compared[i].largest.forEach((value, k) => {
      const limit = program.tolerance[k === damping ? 1 : 0];
      if (!(value <= limit)) {
        throw new Error(`${program.name} is off by ${value.toExponential(1)} in ${suite[k]}, more than ${limit}`);
      }
    });
  });
  const engine = answers.find(({ program }) => program.key === "engine");
  const port = answers.find(({ program }) => program.key === "c");
  const portFromEngine = port === undefined ? undefined : Math.max(...differences(port.rows, engine.rows));
  return { models: models.length, compared, portFromEngine };
}

/** Compares, then times; `say` hears what is skipped and what is under way. */
export function timePrograms(say, short) {
  const sizes = short
    ? { rounds: 2, chain: 2000, engineRounds: 10, gsl: 60, scipy: 6 }
    : { rounds: 7, chain: 2000, engineRounds: 50, gsl: 300, scipy: 25 };
  const list = programs(say, sizes);
  say("comparing answers ...");
  const comparison = compare(list);
  if (comparison.portFromEngine > 1e-11) {
    say(
      `plain C differs from the engine by ${comparison.portFromEngine.toExponential(1)}: c/suite.c is no true copy now`,
    );
  }
  const path = inFolder("chain.txt");
  writeFileSync(path, modelLines(chainModels(sizes.chain)));
  const samples = Object.fromEntries(list.map(({ key }) => [key, []]));
  let one;
  for (let round = 0; round < sizes.rounds; round++) {
    say(`timing, round ${round + 1} of ${sizes.rounds} ...`);
    for (const program of list) {
      const result = read(program.call(path, program.models, program.rounds), program.models);
      const computed = program.models * program.rounds;
      samples[program.key].push({
        wall: (1e6 * result.wall) / computed,
        processor: (1e6 * result.processor) / computed,
      });
      one ??= result.one;
    }
  }
  // Ratios round by round: what a slow minute does to one program it does to its neighbor.
  const timed = list.map(({ key, name }) => {
    const times = samples[key];
    const middle = (pick) => median(times.map(pick));
    return {
      key,
      name,
      microseconds: { wall: middle((t) => t.wall), processor: middle((t) => t.processor) },
      overEngine: {
        wall: median(times.map((t, i) => t.wall / samples.engine[i].wall)),
        processor: median(times.map((t, i) => t.processor / samples.engine[i].processor)),
      },
      samples: times,
    };
  });
  return {
    rounds: sizes.rounds,
    comparison,
    timed,
    oneModel: {
      first: { wall: one[0], processor: one[1] },
      newPlan: { wall: one[2], processor: one[3] },
      samePlan: { wall: one[4], processor: one[5] },
    },
  };
}

/** The two tables, as rows of cells. */
export function programTables({ comparison, timed }) {
  const short = { lastScatteringRedshift: "z_*", dragRedshift: "z_drag", lastScatteringSoundHorizon: "r_*" };
  Object.assign(short, { dragSoundHorizon: "r_drag", acousticAngle: "theta_*", dampingWavenumber: "k_D" });
  const answers = [
    [`largest relative difference, ${comparison.models} models`, ...suite.map((name) => short[name] ?? name)],
    ...comparison.compared.map(({ name, largest }) => [name, ...largest.map((value) => value.toExponential(1))]),
  ];
  const number = (value) => (value < 100 ? value.toPrecision(3) : Math.round(value).toString());
  const times = [
    ["one core", "us a model", "processor us", "models/s", "over the engine", "by processor"],
    ...timed.map(({ name, microseconds, overEngine }) => [
      name,
      number(microseconds.wall),
      number(microseconds.processor),
      number(1e6 / microseconds.processor),
      number(overEngine.wall),
      number(overEngine.processor),
    ]),
  ];
  return { answers, times };
}
