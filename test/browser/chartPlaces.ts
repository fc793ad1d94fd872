/** What a chart's SVG shows when a browser has laid it out. */
export interface ChartPlaces {
  /** Size of the picture in pixels. */
  readonly width: number;
  readonly height: number;
  /** Size of the rectangle around everything drawn with a stroke (grid, axes, curves); around the fields of a chart that has none. */
  readonly plotWidth: number;
  readonly plotHeight: number;
  /** How many marks carry data: filled or stroked paths. */
  readonly marks: number;
  readonly texts: readonly string[];
}

/**
 * A function for the page: measures every SVG that the selector finds. A text, for it runs in the browser.
 *
 * Lines and paths count only where they have a size; a chart whose marks collapsed to a point has no plot area.
 */
export function measureCharts(selector: string): string {
  return `[...document.querySelectorAll(${JSON.stringify(selector)})].map((svg) => {
    const frame = svg.getBoundingClientRect();
    const stroked = [...svg.querySelectorAll("line[stroke], path[stroke]")];
    const drawn = stroked.length > 0 ? stroked : [...svg.querySelectorAll("path[fill]")];
    const boxes = drawn.map((mark) => mark.getBoundingClientRect());
    const left = Math.min(...boxes.map((box) => box.left)), right = Math.max(...boxes.map((box) => box.right));
    const top = Math.min(...boxes.map((box) => box.top)), bottom = Math.max(...boxes.map((box) => box.bottom));
    const marks = [...svg.querySelectorAll("path[stroke], path[fill]")].filter((mark) => {
      const box = mark.getBoundingClientRect();
      return box.width > 2 && box.height > 2;
    });
    return {
      width: frame.width, height: frame.height,
      plotWidth: right - left, plotHeight: bottom - top,
      marks: marks.length,
      texts: [...svg.querySelectorAll("text")].map((text) => text.textContent),
    };
  })`;
}

/** The titles that the charts of the demo notebooks must carry on their axes, chart by chart in the order of the cells. */
export const axisTitles: { readonly [notebook: string]: readonly (readonly string[])[] } = {
  "1-distances-of-the-bins.ipynb": [
    ["redshift z", "distance [Mpc]"],
    ["redshift z", "length of the ruler θ [deg]"],
    ["redshift z", "number density [1e-4 Mpc⁻³]"],
  ],
  "2-acoustic-scale.ipynb": [
    ["1 + z", "free electrons a hydrogen nucleus x_e"],
    ["redshift z", "visibility per unit redshift g"],
    ["1 + z", "comoving sound horizon r_s [Mpc]"],
    ["100 θ_*", "l_A"],
  ],
  "3-forecast-chain.ipynb": [
    ["H_0 [km/s/Mpc]", "r_drag [Mpc]", "100 θ_*"],
    ["H_0 [km/s/Mpc]", "ω_b", "D_V(1.1) [Mpc]"],
    ["H_0", "r_drag", "D_V(1.1)"],
    ["distance", "ruler", "ratio"],
    ["distance", "ruler", "ratio"],
    ["distance", "ruler", "ratio"],
  ],
};

/** Notebooks whose charts are made of many small plots, a matrix of pairs or a row of distributions. */
export const smallPlots: ReadonlySet<string> = new Set(["3-forecast-chain.ipynb"]);
