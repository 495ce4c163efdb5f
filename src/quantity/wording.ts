/** The known word nearest to a mistyped one, or null where none is near. Restricted edit distance (Damerau, 1964). */
export function nearest(word: string, known: readonly string[]): string | null {
  const limit = Math.max(1, Math.floor(word.length / 3));
  let best: string | null = null;
  let least = limit + 1;
  for (const candidate of known) {
    if (candidate.toLowerCase() === word.toLowerCase()) return candidate;
    if (Math.abs(candidate.length - word.length) > limit) continue;
    const d = distance(word.toLowerCase(), candidate.toLowerCase());
    if (d < least) [least, best] = [d, candidate];
  }
  return best;
}

/** "; did you mean X?" or nothing. */
export function didYouMean(word: string, known: readonly string[]): string {
  const near = nearest(word, known);
  return near === null ? '' : `; did you mean ${near}?`;
}

/** What a person typed, quoted and cut to a length that fits one line. */
export function quoted(value: unknown): string {
  const text = typeof value === 'string' ? value : (JSON.stringify(value) ?? String(value));
  const flat = text.replace(/[\u0000-\u001f\u007f-\u009f\u2028\u2029\u202a-\u202e\u2066-\u2069]+/g, ' ');
  return `'${flat.length > 60 ? `${flat.slice(0, 57)}...` : flat}'`;
}

function distance(a: string, b: string): number {
  let before: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const same = a[i - 1] === b[j - 1];
      row[j] = Math.min(last[j] + 1, row[j - 1] + 1, last[j - 1] + (same ? 0 : 1));
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) row[j] = Math.min(row[j], before[j - 2] + 1);
    }
    [before, last] = [last, row];
  }
  return last[b.length];
}
