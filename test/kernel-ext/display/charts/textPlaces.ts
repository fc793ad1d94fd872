/** What {@link inspect} finds in a picture. */
export interface TextPlaces {
  readonly count: number;
  /** Texts that are cut off. */
  readonly out: readonly string[];
  /** Pairs of texts that lie on each other. */
  readonly over: readonly string[];
}

/** Runs in the page: texts that stick out of their picture, and pairs of texts that overlap. */
export const inspect = `(() => {
  const frame = document.querySelector("svg").getBoundingClientRect();
  const texts = [...document.querySelectorAll("svg text")].map((node) => ({ words: node.textContent, box: node.getBoundingClientRect() }));
  const out = texts.filter(({ box }) => box.left < frame.left - 0.5 || box.right > frame.right + 0.5 || box.top < frame.top - 0.5 || box.bottom > frame.bottom + 0.5);
  const over = [];
  for (const [i, one] of texts.entries()) for (const other of texts.slice(i + 1)) {
    const wide = Math.min(one.box.right, other.box.right) - Math.max(one.box.left, other.box.left);
    const high = Math.min(one.box.bottom, other.box.bottom) - Math.max(one.box.top, other.box.top);
    if (wide > 1 && high > 4) over.push(one.words + " / " + other.words);
  }
  return { count: texts.length, out: out.map(({ words }) => words), over };
})()`;
