/** Lines of equal height on a grid. */

/** A point in grid units: (0, 0) is the middle of the first cell. */
type Point = readonly [number, number];

/**
 * The lines along which a grid of heights takes a level, closed where they do not end at the edge; the grid counts as 0 around itself, so that all
 * close.
 *
 * Method: marching squares (Lorensen & Cline 1987 in the plane): linear interpolation along the sides of each square of four neighbouring cells; in
 * a saddle the middle's mean decides.
 *
 * @param cells row by row; @param bins cells along a row
 */
export function contourLines(cells: ArrayLike<number>, bins: number, level: number): Point[][] {
  const rows = cells.length / bins;
  const height = (i: number, j: number): number =>
    i < 0 || j < 0 || i >= bins || j >= rows ? 0 : (cells[j * bins + i] as number);
  const next = new Map<string, { readonly point: Point; readonly to: string }[]>();
  const crossing = (i: number, j: number, a: number, b: number, alongX: boolean): Point => {
    const share = (level - a) / (b - a);
    return alongX ? [i + share, j] : [i, j + share];
  };
  for (let j = -1; j < rows; j++) {
    for (let i = -1; i < bins; i++) {
      const [a, b, c, d] = [height(i, j), height(i + 1, j), height(i + 1, j + 1), height(i, j + 1)] as const;
      const inside = [a, b, c, d].map((each) => each >= level);
      if (inside.every((each) => each === inside[0])) continue;
      // The sides in turn: below, right, above, left; each with its own name, which the neighbouring square shares.
      const sides = [
        { name: `h${i},${j}`, cut: inside[0] !== inside[1], point: () => crossing(i, j, a, b, true) },
        { name: `v${i + 1},${j}`, cut: inside[1] !== inside[2], point: () => crossing(i + 1, j, b, c, false) },
        { name: `h${i},${j + 1}`, cut: inside[2] !== inside[3], point: () => crossing(i, j + 1, d, c, true) },
        { name: `v${i},${j}`, cut: inside[3] !== inside[0], point: () => crossing(i, j, a, d, false) },
      ];
      const cut = sides.filter((side) => side.cut);
      const middle = (a + b + c + d) / 4 >= level;
      const pairs =
        cut.length === 2
          ? [[cut[0], cut[1]]]
          : middle === inside[0]
            ? [
                [cut[0], cut[1]],
                [cut[2], cut[3]],
              ]
            : [
                [cut[0], cut[3]],
                [cut[1], cut[2]],
              ];
      for (const [one, other] of pairs) {
        link(next, one!.name, one!.point(), other!.name);
        link(next, other!.name, other!.point(), one!.name);
      }
    }
  }
  return chains(next);
}

function link(next: Map<string, { point: Point; to: string }[]>, from: string, point: Point, to: string): void {
  const list = next.get(from);
  if (list === undefined) next.set(from, [{ point, to }]);
  else list.push({ point, to });
}

/** Puts the pieces together into closed lines, the first point repeated at the end. */
function chains(next: Map<string, { point: Point; to: string }[]>): Point[][] {
  const lines: Point[][] = [];
  const done = new Set<string>();
  for (const start of next.keys()) {
    if (done.has(start)) continue;
    const line: Point[] = [];
    let at = start;
    let before = "";
    while (!done.has(at)) {
      done.add(at);
      const ways = next.get(at)!;
      line.push(ways[0]!.point);
      const way = ways.find((each) => each.to !== before) ?? ways[0]!;
      before = at;
      at = way.to;
    }
    line.push(line[0]!);
    lines.push(line);
  }
  return lines;
}
