import { expect } from "vitest";
import { type CellResult, displaySymbol } from "../../../kernel-ext/display";
import { expectPicture } from "../display/charts/expectPicture";

/** What every cell's output must have: tables, a chart, conventions, sources, and no number that is none. */
export async function expectCell(name: string, cell: CellResult<unknown>): Promise<void> {
  const bundle = await cell[displaySymbol]();
  const text = bundle["text/plain"] as string;
  expect(cell.tables.length).toBeGreaterThanOrEqual(2);
  expect(cell.charts.length).toBeGreaterThanOrEqual(1);
  expect(cell.sources.length).toBeGreaterThan(0);
  expect(text).toContain("conventions: constants codata2022, closure ");
  expect(text).toContain("Sources");
  expect(text).not.toMatch(/NaN|undefined|Infinity|\[object/);
  expect(bundle["text/html"] as string).not.toMatch(/NaN|undefined|Infinity|\[object/);
  for (const [index, chart] of cell.charts.entries()) {
    expectPicture(`../../cells/charts/${name}${index === 0 ? "" : `-${index}`}`, await chart.toSvg());
  }
}
