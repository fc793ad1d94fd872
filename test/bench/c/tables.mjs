/**
 * Writes the start-up tables of the batch engine as a C header, for suite.c: made once a process there, so no part of what is timed.
 * They come from the built engine itself; only what a module keeps to itself is made anew here, from the functions it is made of.
 */
import { writeFileSync } from "node:fs";
import { built } from "../suite.mjs";

/** The fixed nodes of horizons.ts, read from where an instance keeps them, and Gauss-Legendre rules for the short stretches between. */
function horizonNodes({ Horizons }, { gaussLegendre }) {
  const fresh = new Horizons();
  const lateBegin = fresh.weights.findIndex((weight) => weight !== 0);
  const slice = (instance, from, to) => ({
    nodes: instance.nodes.slice(from, to),
    logs: instance.logs.slice(from, to),
    weights: instance.weights.slice(from, to),
  });
  const late = slice(fresh, lateBegin);
  fresh.setEarly(1, 0);
  const early = slice(fresh, 0, fresh.weights.indexOf(0));
  const toDrag = gaussLegendre(2);
  const toFixed = gaussLegendre(4);
  if (early.nodes.length + toDrag.nodes.length + toFixed.nodes.length !== lateBegin) {
    throw new Error("c/tables.mjs no longer knows the nodes of cosmo/batch/horizons.ts");
  }
  return { early, late, toDrag, toFixed };
}

/** Writes the header; `photonTemperature` is that of every model. */
export function writeTables(path, photonTemperature = 2.7255) {
  const grid = built("cosmo/batch/temperatureGrid.js");
  const differences = built("cosmo/batch/backwardDifferences.js");
  const quadrature = built("cosmo/batch/gridQuadrature.js");
  const { atomTables, hydrogenColumns, heliumColumns, coldPointsPerRoot } = built("cosmo/batch/atomTables.js");
  const { AtomMarch } = built("cosmo/batch/atomMarch.js");
  const { GridDamping } = built("cosmo/batch/gridDamping.js");
  const { GridDepths } = built("cosmo/batch/gridDepths.js");
  const { gasPerUnit } = built("cosmo/batch/closeRow.js");
  const { constantsSets, lightSpeed, atoms } = built("cosmo/constants/index.js");
  const expansion = built("cosmo/expansion/index.js");
  const { hundredKmPerSecondPerMpc, photonDensity } = built("cosmo/model/index.js");

  const constants = constantsSets.codata2022;
  const atom = atomTables("calibrated", constants);
  const gas = gasPerUnit(constants);
  const march = new AtomMarch(atom, gas.comptonRate);
  march.fillEscapes(photonTemperature);
  const { nodes } = new GridDamping(constants);
  const photons = photonDensity(photonTemperature, constants);
  const lines = ["/* Written by test/bench/c/tables.mjs from the built batch engine; do not edit. */"];
  const whole = (values) => {
    for (const [name, value] of Object.entries(values)) lines.push(`enum { ${name} = ${value} };`);
  };
  // With an exponent always, so that C takes no long number for a whole one.
  const real = (value) => value.toExponential();
  const number = (values) => {
    for (const [name, value] of Object.entries(values)) {
      if (!Number.isFinite(value)) throw new Error(`${name} is ${value}`);
      lines.push(`static const double ${name} = ${real(value)};`);
    }
  };
  const array = (values) => {
    for (const [name, list] of Object.entries(values)) {
      if (!Array.from(list).every(Number.isFinite)) throw new Error(`${name} is not finite`);
      lines.push(`static const double ${name}[] = {${Array.from(list, real).join(",")}};`);
    }
  };

  const neutrinos = { lowest: -17, points: 2801 };
  const continuum = { amplitudes: [0.36, 0.66], exponents: [0.86, 0.9], perRoot: 80, highest: 48 };
  const sobolev = { perDepth: 40, deepest: 28 };
  const tripletOverSinglet =
    (atoms.heliumTripletRate * atoms.hydrogenCrossSectionAtSinglet * atoms.heliumSinglet2p ** 3) /
    (atoms.heliumSingletRate * atoms.hydrogenCrossSectionAtTriplet * atoms.heliumTriplet2p ** 3);
  const fixedStart = 1 / 850;
  const { early, late, toDrag, toFixed } = horizonNodes(
    built("cosmo/batch/horizons.js"),
    built("cosmo/numerics/index.js"),
  );

  whole({
    gridSize: grid.gridSize,
    mainFirst: grid.mainFirst,
    heliumEnd: grid.heliumEnd,
    heliumPoints: grid.heliumBlock.end,
    coarseStride: grid.heliumBlock.stride,
    heliumAtMainTop: grid.heliumAtMainTop,
    equilibriumPoints: grid.equilibriumPoints,
    blocks: grid.gridBlocks.length,
    hydrogenColumns,
    heliumColumns,
    coldPerRoot: coldPointsPerRoot,
    searchStart: grid.firstPointBelow(2450),
    searchEnd: grid.firstPointBelow(4300),
    continuumPerRoot: continuum.perRoot,
    highestRoot: continuum.highest,
    sobolevPerDepth: sobolev.perDepth,
    deepest: sobolev.deepest,
    hotNodes: nodes.temperatures.length,
    earlyNodes: early.nodes.length,
    lateNodes: late.nodes.length,
  });
  lines.push(`static const int blockFirst[] = {${grid.gridBlocks.map((block) => block.first)}};`);
  lines.push(`static const int blockEnd[] = {${grid.gridBlocks.map((block) => block.end)}};`);
  lines.push(`static const int blockStride[] = {${grid.gridBlocks.map((block) => block.stride)}};`);
  lines.push(`static const int gridPlaces[] = {${Array.from(grid.gridPlaces)}};`);
  number({
    gridStep: grid.gridStep,
    mainTop: grid.mainTop,
    slopeWeight: differences.slopeWeight,
    photonTemperature,
    photons,
    speciesPerNumber: expansion.masslessSpeciesDensity(1, photons),
    neutrinoTemperatureOfOne: expansion.neutrinoTemperature(1, photonTemperature),
    electronvoltOverBoltzmann: constants.elementaryCharge / constants.boltzmann,
    hydrogenPerBaryons: gas.hydrogenDensity,
    heliumMass: atoms.heliumToHydrogenMass,
    scatteringPerHydrogen: (lightSpeed * constants.thomsonCrossSection) / hundredKmPerSecondPerMpc,
    unitRate: hundredKmPerSecondPerMpc,
    unitDistance: expansion.unitHubbleDistance,
    unitTime: expansion.unitHubbleTime,
    hydrogenTwoPhoton: atoms.hydrogenTwoPhotonRate,
    heliumTwoPhoton: atoms.heliumTwoPhotonRate,
    lowestLogMass: neutrinos.lowest,
    fixedStart,
  });
  array({
    temperatures: grid.gridTemperatures,
    pastWeights: differences.pastWeights,
    predictionWeights: differences.predictionWeights,
    innerCell: quadrature.innerCell,
    cellPolynomial: quadrature.cellPolynomial,
    edgeWeights: quadrature.edgeWeights,
    tailWeights: new GridDepths().weights,
    rates: atom.hydrogen,
    helium: atom.helium,
    hydrogenSaha: atom.hydrogenSaha,
    cold: atom.coldRecombination,
    escapes: march.escapes,
    compton: march.compton,
    neutrinoEnergy: Array.from({ length: neutrinos.points }, (_, i) =>
      expansion.fermiDiracEnergy(Math.exp(neutrinos.lowest + grid.gridStep * i)),
    ),
    continuumEscapes: Array.from({ length: 2 * (continuum.highest * continuum.perRoot + 3) }, (_, i) => {
      const line = i % 2;
      const g = (Math.max((i >> 1) - 1, 0) / continuum.perRoot) ** 8 * (line === 1 ? tripletOverSinglet : 1);
      return 1 / (1 + continuum.amplitudes[line] * g ** continuum.exponents[line]);
    }),
    sobolev: Array.from({ length: sobolev.deepest * sobolev.perDepth + 3 }, (_, i) => {
      const depth = (i - 1) / sobolev.perDepth;
      return depth === 0 ? 1 : -Math.expm1(-depth) / depth;
    }),
    hotTemperature: nodes.temperatures,
    hotLogTemperature: nodes.logTemperatures,
    hotWeight: nodes.weights,
    hotOnce: nodes.once,
    hotTwice: nodes.twice,
    earlyNode: early.nodes,
    earlyLog: early.logs,
    earlyWeight: early.weights,
    lateNode: late.nodes,
    lateLog: late.logs,
    lateWeight: late.weights,
    dragNode: toDrag.nodes,
    dragWeight: toDrag.weights,
    fixedNode: toFixed.nodes,
    fixedWeight: toFixed.weights,
  });
  writeFileSync(path, `${lines.join("\n")}\n`);
}
