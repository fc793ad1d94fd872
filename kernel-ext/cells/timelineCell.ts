import { julianYear } from "../../cosmo/constants";
import { NoAnswerError } from "../../cosmo/errors";
import type { ModelGivens } from "../../cosmo/model";
import type { QuantityValue } from "../../cosmo/quantity";
import { evaluateModel } from "../../cosmo/solve";
import { type CellResult, cellOutput, formatNumber, lineChart, table } from "../display";
import { compileModel } from "./compileModel";
import { modelTable } from "./modelTable";
import { notesOf, sourcesOf } from "./quantityTable";
import { spacedRedshifts } from "./redshiftList";
import { timelineEvents } from "./timelineEvents";

/** One event with its place in time. */
export interface TimelineEntry {
  event: string;
  redshift: number;
  /** Gyr since a = 0. */
  age: number;
  /** Of the background radiation, K. */
  temperature: number;
}

/** What the next cell gets: the events that the model has, earliest first. */
export type TimelineValues = TimelineEntry[];

/**
 * The history in events: age, temperature and redshift from nucleosynthesis to today, earliest first.
 *
 * Helium recombinations by half ionization, hydrogen by x_e = 1/2, z_* and z_drag by unit depth, acceleration by q = 0,
 * equalities by equal densities; nucleosynthesis at 1e9 K (common practice, no source).
 *
 * @param model the model, see ModelGivens; `recombination` chooses the tier.
 * Errors: a model without a Big Bang, which has no ages. Events that a model does not have are told in notes.
 * @returns `values`: an array of { event, redshift, age in Gyr, temperature in K }.
 * Accuracy 1e-8, nucleosynthesis apart: its age leaves out the pairs of electrons and positrons, which have nearly gone by then.
 * @example timelineCell({ hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }).values.at(-1)?.age // 13.8
 */
export function timelineCell(model: ModelGivens): CellResult<TimelineValues> {
  const where = "timelineCell";
  const numbers = evaluateModel(compileModel(model, where), { where });
  // Asked first: a model without a Big Bang has no ages, and nothing of what follows.
  const everything: QuantityValue[] = [numbers.quantity("age")];
  const missing = new Map<string, string[]>();
  const note = (reason: string, event: string) => missing.set(reason, [...(missing.get(reason) ?? []), event]);

  const found = timelineEvents.flatMap((each) => {
    try {
      const { redshift, behind } = each.find(numbers);
      if (redshift < 0) {
        note(`still to come, at z = ${redshift.toPrecision(5)}`, each.event);
        return [];
      }
      const age = numbers.quantity("ageAt", redshift);
      const temperature = numbers.quantity("radiationTemperature", redshift);
      everything.push(...behind, age, temperature);
      return [{ ...each, redshift, age: age.value, temperature: temperature.value }];
    } catch (failure) {
      if (!(failure instanceof NoAnswerError)) throw failure;
      note(failure.reason, each.event);
      return [];
    }
  });
  found.sort((one, other) => one.age - other.age);

  const events = table({
    title: "From nucleosynthesis to today",
    columns: [
      { key: "event", label: "event" },
      { key: "redshift", label: "", symbol: "z", digits: 7 },
      { key: "age", label: "age", align: "right" },
      { key: "temperature", label: "temperature", symbol: "T", unit: "K", digits: 6 },
      { key: "definition", label: "defined by" },
    ],
    rows: found.map(({ event, redshift, age, temperature, definition }) => ({
      event,
      redshift,
      age: ageText(age),
      temperature,
      definition,
    })),
    notes: ["ages count from a = 0; that of nucleosynthesis leaves out electron-positron pairs"],
  });

  // Without radiation there is no temperature to draw, so the axis is the expansion itself.
  const cold = !(numbers.model.photonTemperature > 0);
  const level = (z: number) => (cold ? 1 + z : numbers.value("radiationTemperature", z));
  const earliest = found[0]!.redshift;
  const grid = spacedRedshifts(0, Math.max(1, 3 * earliest), 160, "onePlusRedshift").reverse();
  const toYears = 1e9;
  const yearsAt = (z: number) => toYears * numbers.value("ageAt", z);
  // Digits that can be seen: a picture should not hang on the last bit of a quadrature.
  const drawn = (value: number) => Number(value.toPrecision(6));
  const name = "events";
  const chart = lineChart({
    title: cold ? "Expansion over age" : "Temperature over age",
    description: `${cold ? "1 + z" : "Radiation temperature"} over the age of the universe, both logarithmic, with ${found
      .map(({ label, redshift, age }) => `${label} at z = ${Number(redshift.toPrecision(4))} (${ageText(age, 3)})`)
      .join(", ")}.`,
    x: {
      label: "age",
      symbol: "t",
      unit: "yr",
      scale: "log",
      domain: [drawn(yearsAt(grid[0]!)), drawn(1.5 * yearsAt(0))],
    },
    y: {
      label: cold ? "1 + z" : "radiation temperature",
      ...(cold ? {} : { symbol: "T", unit: "K" }),
      scale: "log",
      // Room below today for the names of the late events, which are pushed down where they are close.
      domain: [drawn(level(0) * (level(0) / level(grid[0]!)) ** 0.12), drawn(2 * level(grid[0]!))],
    },
    series: [{ label: name, x: grid.map(yearsAt), y: grid.map(level) }],
    points: [
      {
        label: name,
        x: found.map((each) => toYears * each.age),
        y: found.map((each) => level(each.redshift)),
      },
    ],
    rules: found.map((each) => ({
      axis: "y" as const,
      at: drawn(level(each.redshift)),
      label: `${each.label}, z ${formatNumber(each.redshift, { digits: each.redshift < 1000 ? 3 : 4 })}`,
    })),
    height: 440,
  });
  return cellOutput({
    title: "Timeline",
    summary: `${found.length} events in ${ageText(found.at(-1)!.age, 6)}`,
    tables: [events, modelTable(numbers.model)],
    charts: [chart],
    notes: [
      ...notesOf(everything),
      ...[...missing].map(([reason, names]) => `${names.join(", ")}: ${reason}`),
      ...(numbers.model.givens.uncertainty === undefined
        ? []
        : ["the errors of the givens are not carried to this table"]),
    ],
    sources: sourcesOf(everything),
    values: found.map(({ event, redshift, age, temperature }) => ({ event, redshift, age, temperature })),
  });
}

/** Units from the largest, in years; Julian years and days. */
const units: readonly (readonly [unit: string, years: number])[] = [
  ["Gyr", 1e9],
  ["Myr", 1e6],
  ["kyr", 1e3],
  ["yr", 1],
  ["d", 86400 / julianYear],
  ["h", 3600 / julianYear],
  ["min", 60 / julianYear],
  ["s", 1 / julianYear],
];

/** An age in the largest unit of which there is at least one. */
function ageText(age: number, digits = 6): string {
  const years = 1e9 * age;
  const [unit, size] = units.find(([, each]) => years >= each) ?? units.at(-1)!;
  return `${formatNumber(years / size, { digits })} ${unit}`;
}
