/**
 * The candidate most like `word`, where one is near enough to be meant; undefined otherwise.
 * Near: at most a third of the letters (and never more than three) are wrong, missing, extra or swapped with a neighbour.
 */
export function suggest(word: string, candidates: Iterable<string>): string | undefined {
  let best: string | undefined;
  let least = Math.min(3, Math.max(1, Math.floor(word.length / 3))) + 1;
  for (const candidate of candidates) {
    if (Math.abs(candidate.length - word.length) >= least) continue;
    const edits = editDistance(word.toLowerCase(), candidate.toLowerCase());
    if (edits < least) {
      best = candidate;
      least = edits;
    }
  }
  return best;
}

/** Optimal string alignment distance: insertions, deletions, substitutions, swaps of neighbours. */
export function editDistance(a: string, b: string): number {
  let before: number[] = [];
  let row = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i += 1) {
    const next = [i];
    for (let j = 1; j <= b.length; j += 1) {
      const same = a[i - 1] === b[j - 1] ? 0 : 1;
      next[j] = Math.min(row[j] + 1, next[j - 1] + 1, row[j - 1] + same);
      const isSwap = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1];
      if (isSwap) next[j] = Math.min(next[j], before[j - 2] + 1);
    }
    before = row;
    row = next;
  }
  return row[b.length];
}
