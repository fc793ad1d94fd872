/**
 * How series are told apart: colour, dash and point shape together, so that a chart can be read without colour.
 *
 * The colours are the colour-blind-safe set of Okabe & Ito (2008), "Color Universal Design", without its yellow and
 * black: neither can be read on both a white and a dark page. They stand in the order of their contrast with both.
 */

/** The look of one series. */
export interface SeriesLook {
  readonly color: string;
  /** Lengths of stroke and gap in pixels; empty for a solid line. */
  readonly dash: readonly number[];
  /** A Vega symbol shape. */
  readonly shape: string;
}

/** Text, axes and rules: a grey with the same contrast (about 4.1) on white and on #1e1e1e, the usual dark page. */
export const ink = "#7d7d7d";

const colors = {
  blue: "#0072B2",
  vermilion: "#D55E00",
  bluishGreen: "#009E73",
  reddishPurple: "#CC79A7",
  skyBlue: "#56B4E9",
  orange: "#E69F00",
};

/** The looks in the order in which series get them. */
export const seriesLooks: readonly SeriesLook[] = [
  { color: colors.blue, dash: [], shape: "circle" },
  { color: colors.vermilion, dash: [8, 4], shape: "triangle-up" },
  { color: colors.bluishGreen, dash: [2, 3], shape: "square" },
  { color: colors.reddishPurple, dash: [10, 3, 2, 3], shape: "diamond" },
  { color: colors.skyBlue, dash: [14, 4], shape: "cross" },
  { color: colors.orange, dash: [5, 2], shape: "triangle-down" },
];

/** The look of the series with this number. */
export function seriesLook(index: number): SeriesLook {
  return seriesLooks[index % seriesLooks.length] as SeriesLook;
}
