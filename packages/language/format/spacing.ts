/** Which tokens of one line stand apart. */
import type { Raw } from '../parse/scanner.ts';
import { isReserved } from '../parse/words.ts';

const TIGHT_BEFORE: ReadonlySet<string> = new Set([',', ')', ':', '.']);
const CALLS: ReadonlySet<string> = new Set(['min', 'max', 'sqrt']);
const OPERATORS: ReadonlySet<string> = new Set(['+', '-', '*', '/', '=', '±', '+-']);

const isSign = (token: Raw | undefined, image: string): boolean => token?.kind === 'sign' && token.image === image;

/** A minus that belongs to the number after it: first in a setting, after a small word, a bracket or another sign. */
function isUnary(tokens: readonly Raw[], index: number): boolean {
  const before = tokens[index - 1];
  if (before === undefined) return true;
  if (before.kind === 'sign') return before.image !== ')' && before.image !== '?';
  if (before.kind !== 'word') return false;
  if (isReserved(before.image)) return true;
  // The word of a setting: it follows a bracket or a comma.
  const beforeThat = tokens[index - 2];
  return beforeThat === undefined || isSign(beforeThat, '(') || isSign(beforeThat, ',');
}

/** True where a space stands between token `index - 1` and token `index`; the tokens are those of the whole text. */
export function spaceBefore(tokens: readonly Raw[], index: number): boolean {
  const left = tokens[index - 1];
  const right = tokens[index];
  if (left === undefined || right === undefined) return false;
  if (right.kind === 'sign' && TIGHT_BEFORE.has(right.image)) return false;
  if (isSign(left, '(') || isSign(left, '.')) return false;
  if (isSign(right, '(')) return !(left.kind === 'word' && CALLS.has(left.image));
  if (isSign(left, ':')) {
    // `3:1` is one figure, `350 mm: 0 kN` is a knot of a table, `pressure: P1` names a line.
    const before = tokens[index - 2];
    const after = tokens[index + 1];
    return !(before?.kind === 'number' && right.kind === 'number' && after?.kind !== 'unit');
  }
  if (isSign(left, '-') && isUnary(tokens, index - 1)) return false;
  if (left.kind === 'sign' && OPERATORS.has(left.image)) return true;
  return true;
}
