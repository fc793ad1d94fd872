/**
 * Compares a picture with the one in the tree. A picture that differs, or is not there yet, is written beside it as
 * `name.new.svg` and the test fails; whoever has looked at the new one renames it.
 */
import { existsSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { expect } from "vitest";

export function expectPicture(name: string, svg: string): void {
  const kept = join(__dirname, `${name}.svg`);
  const fresh = join(__dirname, `${name}.new.svg`);
  const content = `${svg}\n`;
  if (existsSync(kept) && readFileSync(kept, "utf8") === content) {
    rmSync(fresh, { force: true });
    return;
  }
  writeFileSync(fresh, content);
  expect.fail(`the picture differs from ${kept}; the new one is ${fresh}: look at both, then rename the new one`);
}
