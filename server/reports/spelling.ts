/** Case and accents do not make another word. */
export function foldWord(word: string): string {
  return word.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase();
}

/**
 * Slips between two words: letters left out, added, mistaken, or two neighbours swapped (optimal
 * string alignment distance).
 */
export function countSlips(a: string, b: string): number {
  const rows: number[][] = Array.from({ length: a.length + 1 }, (_, i) => [i]);
  const at = (i: number, j: number): number => rows[i]?.[j] ?? 0;
  for (let j = 0; j <= b.length; j += 1) rows[0]?.splice(j, 1, j);
  for (let i = 1; i <= a.length; i += 1) {
    for (let j = 1; j <= b.length; j += 1) {
      const isSame = a[i - 1] === b[j - 1];
      let least = Math.min(at(i - 1, j) + 1, at(i, j - 1) + 1, at(i - 1, j - 1) + (isSame ? 0 : 1));
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) {
        least = Math.min(least, at(i - 2, j - 2) + 1);
      }
      rows[i]?.push(least);
    }
  }
  return at(a.length, b.length);
}

/** The candidate that a slip or two turn the word into; undefined where none is near enough. */
export function nearestWord(word: string, candidates: readonly string[]): string | undefined {
  const folded = foldWord(word);
  const most = folded.length < 4 ? 0 : folded.length < 7 ? 1 : 2;
  return candidates.map((candidate) => ({ candidate, slips: countSlips(folded, candidate) }))
    .filter(({ slips }) => slips > 0 && slips <= most)
    .sort((a, b) => a.slips - b.slips)[0]?.candidate;
}
