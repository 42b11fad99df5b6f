/** Nearest word: did you mean. */

/** Edit distance with swaps of neighbours, given up above `limit`. */
export function distance(a: string, b: string, limit: number): number {
  if (Math.abs(a.length - b.length) > limit) return limit + 1;
  let before: number[] = [];
  let last: number[] = Array.from({ length: b.length + 1 }, (_, i) => i);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    let least = i;
    for (let j = 1; j <= b.length; j++) {
      const cost = a[i - 1] === b[j - 1] ? 0 : 1;
      let best = Math.min((last[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1, (last[j - 1] ?? 0) + cost);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) best = Math.min(best, (before[j - 2] ?? 0) + 1);
      row.push(best);
      if (best < least) least = best;
    }
    if (least > limit) return limit + 1;
    before = last;
    last = row;
  }
  return last[b.length] ?? 0;
}

const CODE = /^(\p{L}+)([0-9]+)$/u;

/** Codes such as `C1` and `R1` differ by one letter and mean different things: of two codes the letters, or nearly them, must agree. */
function unlikeCodes(a: string, b: string): boolean {
  const first = CODE.exec(a);
  const second = CODE.exec(b);
  if (first === null || second === null) return false;
  const [, letters = '', digits = ''] = first;
  const [, others = '', otherDigits = ''] = second;
  if (letters.toLowerCase() === others.toLowerCase()) return false;
  return digits !== otherDigits || letters.length < 2 || others.length < 2;
}

/** The word most like `word`: one change in a short word, two in a long one; case alone counts as none. */
export function nearest(word: string, words: Iterable<string>): string | undefined {
  if (word.length > 60) return undefined;
  const limit = word.length <= 4 ? 1 : 2;
  const lower = word.toLowerCase();
  let best: string | undefined;
  let least = limit + 0.5;
  for (const candidate of words) {
    if (candidate === word || unlikeCodes(word, candidate)) continue;
    const away = candidate.toLowerCase() === lower ? 0.25 : distance(word, candidate, limit);
    if (away < least && !(word.length === 1 && away >= 1)) {
      least = away;
      best = candidate;
    }
  }
  return best;
}
