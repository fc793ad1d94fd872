/**
 * How wide a text will be drawn, without a font to ask: an estimate from classes of letters. It errs to the wide side
 * (the widths of wide sans-serif faces such as DejaVu Sans), so that what is laid out with it is not cut off.
 */

const classes: readonly (readonly [RegExp, number])[] = [
  [/[ijl.,:;'|!\u2009\u202f]/, 0.34],
  [/[ftrI()[\]/ -]/, 0.42],
  [/[mwMW%@\u2014]/, 0.95],
  [/[A-Z\u0391-\u03a9\u2212+\u00b1\u00d7=<>~#&]/, 0.76],
  [/[\u2070\u00b9\u00b2\u00b3\u2074-\u207f\u2080-\u209f*]/, 0.45],
];

/**
 * Estimated width of a line of text in pixels.
 *
 * @param text one line
 * @param size font size in pixels
 * @param bold bold faces are about a tenth wider
 */
export function estimatedWidth(text: string, size: number, bold = false): number {
  let total = 0;
  for (const character of text) {
    total += classes.find(([pattern]) => pattern.test(character))?.[1] ?? 0.62;
  }
  return total * size * (bold ? 1.1 : 1);
}

/** Breaks a text into lines no wider than `width`, at spaces. */
export function wrapText(text: string, width: number, size: number, bold = false): string[] {
  const lines: string[] = [];
  let line = "";
  for (const word of text.split(" ")) {
    const longer = line === "" ? word : `${line} ${word}`;
    if (line !== "" && estimatedWidth(longer, size, bold) > width) {
      lines.push(line);
      line = word;
    } else {
      line = longer;
    }
  }
  lines.push(line);
  return lines;
}
