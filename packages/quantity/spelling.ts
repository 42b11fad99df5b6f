/** Spellings of units: the table's symbols and aliases, and those that follow from them by rule (superscripts, middle dots, degree and micro signs). */
import type { Dimension } from './dimension.ts';
import { UNITS, type Unit } from './units.ts';

/** All spellings of one written form: `in2` is also `in²` and `in^2`, `kg.m2` also `kg·m²`, `um` also `µm` (both code points). */
function spellings(form: string): readonly string[] {
  let all = [form];
  const also = (change: (text: string) => string) => {
    all = [...new Set([...all, ...all.map(change)])];
  };
  also((text) => text.replace(/(?<=[A-Za-z])2/g, '²').replace(/(?<=[A-Za-z])3/g, '³'));
  also((text) => text.replace(/(?<=[A-Za-z])([23])/g, '^$1'));
  also((text) => text.replace(/\./g, '·'));
  also((text) => text.replace(/\./g, '⋅'));
  also((text) => text.replace(/^deg(?=$|[CFR/])/, '°'));
  if (/^u(m|s)$/.test(form)) all.push(form.replace('u', '\u00b5'), form.replace('u', '\u03bc'));
  return all;
}

const BY_SPELLING: ReadonlyMap<string, Unit> = new Map(
  UNITS.flatMap((unit) => [unit.symbol, ...unit.aliases].flatMap(spellings).map((spelling) => [spelling, unit] as const)),
);

const LONGEST = Math.max(...[...BY_SPELLING.keys()].map((spelling) => spelling.length));

/** Every accepted spelling with its unit, for lexers, colouring and completion. */
export const UNIT_SPELLINGS: readonly { readonly spelling: string; readonly unit: Unit }[] = [...BY_SPELLING].map(([spelling, unit]) => ({
  spelling,
  unit,
}));

/** The unit of exactly this spelling. */
export function unitOf(spelling: string): Unit | undefined {
  return BY_SPELLING.get(spelling);
}

/** Units of one dimension, in table order. */
export function unitsOf(dimension: Dimension): readonly Unit[] {
  return UNITS.filter((unit) => unit.dimension === dimension);
}

/** A letter, digit or sign that would carry a unit on. */
const CARRIES_ON = /[\p{L}\p{N}_°²³⁴^]/u;

/**
 * The longest unit that starts at `offset` and ends at a word's end.
 * `m` does not match the start of `motor`, nor `N` that of `N.x`; `L` before `/Q1` does match (a division follows).
 * A word that merely begins like a unit with a slash (`L/minute`) matches only as far as a whole unit ends.
 */
export function matchUnit(text: string, offset: number): { readonly unit: Unit; readonly length: number } | undefined {
  for (let length = Math.min(LONGEST, text.length - offset); length > 0; length--) {
    const unit = BY_SPELLING.get(text.slice(offset, offset + length));
    if (unit === undefined) continue;
    const last = text[offset + length - 1] ?? '';
    const next = text[offset + length] ?? '';
    const nextButOne = text[offset + length + 1] ?? '';
    if (last !== '%' && next !== '' && CARRIES_ON.test(next)) continue;
    if (/[.·⋅]/.test(next) && /\p{L}/u.test(nextButOne)) continue;
    return { unit, length };
  }
  return undefined;
}

/** Edit distance with swaps of neighbours. */
function distance(a: string, b: string): number {
  const rows: number[][] = [];
  for (let i = 0; i <= a.length; i++) {
    const row: number[] = [];
    for (let j = 0; j <= b.length; j++) {
      if (i === 0 || j === 0) {
        row.push(i + j);
        continue;
      }
      const cost = a[i - 1] === b[j - 1] ? 0 : 1;
      let best = Math.min((rows[i - 1]?.[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1, (rows[i - 1]?.[j - 1] ?? 0) + cost);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) best = Math.min(best, (rows[i - 2]?.[j - 2] ?? 0) + 1);
      row.push(best);
    }
    rows.push(row);
  }
  return rows[a.length]?.[b.length] ?? 0;
}

/** The unit most like a mistyped word (case counts little), of the dimension asked for if one is; nothing if none is near. */
export function nearestUnit(word: string, dimension?: Dimension): Unit | undefined {
  let best: Unit | undefined;
  let least = Number.POSITIVE_INFINITY;
  const lower = word.toLowerCase();
  for (const [spelling, unit] of BY_SPELLING) {
    if (dimension !== undefined && unit.dimension !== dimension) continue;
    const away = distance(lower, spelling.toLowerCase()) + (spelling === unit.symbol ? 0 : 0.05) + distance(word, spelling) * 0.01;
    if (away < least) {
      least = away;
      best = unit;
    }
  }
  const allowed = word.length <= 2 ? 1.2 : word.length <= 4 ? 1.3 : 2.3;
  return least <= allowed ? best : undefined;
}
