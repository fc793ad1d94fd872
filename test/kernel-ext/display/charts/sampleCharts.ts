/** Charts over invented data, close in kind to what cells show: none of the numbers is a result of anything. */
import { barChart, type Chart, intervalChart, lineChart } from "../../../../kernel-ext/display";

const onePlusZ = Float64Array.from({ length: 2000 }, (_, index) => 10 ** (0.02 + (3.98 * index) / 1999));
const redshifts = onePlusZ.map((value) => value - 1);
const comoving = onePlusZ.map((value) => 14000 * (1 - 1 / Math.sqrt(value)));

/** Three curves over redshift, both axes logarithmic, two rules close together. */
export function distances(): Chart {
  return lineChart({
    title: "Distances over redshift",
    description: "Three invented distances: one levels off, one falls after a maximum, one rises throughout.",
    x: { label: "redshift", symbol: "z", scale: "onePlusRedshift" },
    y: { label: "distance", unit: "Mpc", scale: "log" },
    series: [
      { label: "comoving D_C", x: redshifts, y: comoving },
      { label: "angular diameter D_A", x: redshifts, y: comoving.map((value, i) => value / (onePlusZ[i] as number)) },
      { label: "luminosity D_L", x: redshifts, y: comoving.map((value, i) => value * (onePlusZ[i] as number)) },
    ],
    rules: [
      { axis: "x", at: 1089.9, label: "z_* = 1089.9" },
      { axis: "x", at: 1060, label: "z_drag = 1060.0" },
    ],
  });
}

/** A bump with a band, and a second panel beneath it. */
export function bump(): Chart {
  const z = Float64Array.from({ length: 401 }, (_, index) => 1600 - 3 * index);
  return lineChart({
    title: "Visibility function and optical depth",
    description: "An invented bump near redshift 1090, and below it a depth that passes 1 there.",
    x: { label: "redshift", symbol: "z", reverse: true },
    y: { label: "visibility", symbol: "g(z)" },
    series: [{ label: "g", x: z, y: z.map((value) => 0.0049 * Math.exp(-(((value - 1088) / 80) ** 2) / 2)) }],
    bands: [{ axis: "x", from: 1008, to: 1168, label: "width" }],
    rules: [
      { axis: "x", at: 1090, label: "z_*" },
      { axis: "x", at: 1088, label: "peak" },
    ],
    below: {
      y: { label: "optical depth", symbol: "tau", scale: "log" },
      series: [{ label: "tau", x: z, y: z.map((value) => Math.exp((value - 1090) / 80)) }],
      rules: [{ axis: "y", at: 1, label: "tau = 1" }],
    },
  });
}

/** Curves that lie on each other over many decades. */
export function fractions(): Chart {
  const z = Float64Array.from({ length: 900 }, (_, index) => 1 + 2 * index);
  const fall = (center: number, floor: number): Float64Array =>
    z.map((value) => 1.08 / (1 + Math.exp((center - value) / 45)) + floor);
  return lineChart({
    title: "Ionized fraction in three tiers",
    description: "Three invented curves fall from about 1 to floors a factor of ten apart.",
    x: { label: "redshift", symbol: "z" },
    y: { label: "ionized fraction", symbol: "x_e", scale: "log" },
    series: [
      { label: "saha", x: z, y: fall(1400, 1e-7) },
      { label: "peebles", x: z, y: fall(1280, 2e-4) },
      { label: "calibrated", x: z, y: fall(1275, 1.9e-4) },
    ],
    rules: [{ axis: "y", at: 0.5, label: "half" }],
  });
}

/** Points with error bars beside a curve. */
export function measured(): Chart {
  return lineChart({
    title: "Expansion rate and the points of a survey",
    description: "An invented curve rises from 67 to 201 and passes three invented points within their errors.",
    x: { label: "redshift", symbol: "z" },
    y: { label: "Hubble rate", symbol: "H(z)", unit: "km/s/Mpc" },
    series: [{ label: "base model", x: [0, 0.5, 1, 1.5, 2], y: [67, 88, 120, 158, 201] }],
    points: [{ label: "survey", x: [0.3, 0.8, 1.4], y: [80, 103, 155], error: [4, 6, 9] }],
  });
}

/** Values beside printed ones. */
export function beside(): Chart {
  return intervalChart({
    title: "Acoustic scale beside printed values",
    description: "Two invented computed values lie within the errors of two invented printed ones.",
    panels: [
      {
        axis: { label: "acoustic angle", symbol: "100 theta_*", unit: "0.01 rad" },
        rows: [
          { label: "this model", value: 1.0411, group: "computed" },
          { label: "an invented table, column 6", value: 1.04101, error: 0.00029, group: "printed" },
        ],
      },
      {
        axis: { label: "acoustic multipole", symbol: "l_A" },
        rows: [
          { label: "this model", value: 301.5, error: 0.1, group: "computed" },
          { label: "an invented table, column 1", value: 301.471, error: 0.09, group: "printed" },
        ],
      },
    ],
  });
}

/** Bars to both sides of zero for two groups, in two units. */
export function effects(): Chart {
  const row = (label: string, one: number, other: number) => ({
    label,
    bars: [
      { group: "angle", value: one },
      { group: "age", value: other },
    ],
  });
  return barChart({
    title: "What moves the angle and the age",
    description: "Invented slopes of two quantities to both sides of zero, in two units.",
    panels: [
      {
        axis: { label: "by the logarithm of the parameter" },
        rows: [row("hubble H_0", 0.2, -1), row("coldMatterDensity omega_c", 0.14, -0.31), row("baryons", -0.07, 0)],
      },
      { axis: { label: "by the parameter itself" }, rows: [row("curvature Omega_k", -1.6, -0.43)] },
    ],
  });
}

export const sampleCharts: Readonly<Record<string, () => Chart>> = {
  distances,
  bump,
  fractions,
  measured,
  beside,
  effects,
};
