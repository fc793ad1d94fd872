/**
 * The known name that a mistyped one most probably meant, or undefined when none is near.
 *
 * Distance: optimal string alignment (insert, delete, replace, swap of neighbors, each 1), letter case ignored; a name is
 * near when the distance is at most a third of its length, or when one is the beginning of the other.
 *
 * @example nearestName("hubbel", ["hubble", "helium"]) // "hubble"
 */
export function nearestName(name: string, known: readonly string[]): string | undefined {
  const asked = name.toLowerCase();
  let best: string | undefined;
  let bestDistance = Number.POSITIVE_INFINITY;
  for (const candidate of known) {
    const distance = alignmentDistance(asked, candidate.toLowerCase());
    if (distance < bestDistance) {
      bestDistance = distance;
      best = candidate;
    }
  }
  if (best !== undefined && bestDistance <= Math.max(1, Math.floor(Math.max(best.length, asked.length) / 3)))
    return best;
  if (asked.length < 3) return undefined;
  return known.find((candidate) => candidate.toLowerCase().startsWith(asked));
}

function alignmentDistance(a: string, b: string): number {
  let beforePrevious: number[] = [];
  let previous = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const change = a[i - 1] === b[j - 1] ? 0 : 1;
      let cost = Math.min(previous[j]! + 1, row[j - 1]! + 1, previous[j - 1]! + change);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1])
        cost = Math.min(cost, beforePrevious[j - 2]! + 1);
      row.push(cost);
    }
    beforePrevious = previous;
    previous = row;
  }
  return previous[b.length]!;
}
