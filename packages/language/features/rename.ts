/** Renaming of components, coils, lines, constants, cycles, steps, parts: everywhere the name stands. Words of the notation cannot be renamed. */
import type { TextChange } from '@oilway/circuit';
import { isLineHead, isNoName } from '../parse/words.ts';
import type { Analysis, Occurrence } from './analysis.ts';
import { sameAs } from './navigation.ts';
import { tokenAt } from './text/scan.ts';

export type RenameAnswer<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly problem: string };

const NAME = /^(?:[\p{L}_][\p{L}\p{N}_]*|[0-9]+[A-DF-Z]+[0-9]+)$/u;
const FIXED: ReadonlySet<string> = new Set(['port', 'property']);

/** Span that would be renamed, with the present name. */
export function renameTarget(
  analysis: Analysis,
  offset: number,
): RenameAnswer<{ readonly start: number; readonly end: number; readonly name: string }> {
  const here = analysis.occurrenceAt(offset);
  if (!here) {
    const token = tokenAt(analysis.tokens, offset);
    if (token?.type === 'word' && isLineHead(token.text))
      return { ok: false, problem: `\`${token.text}\` is a word of the notation: it has no other name` };
    return { ok: false, problem: 'Nothing here has a name that could be changed' };
  }
  if (FIXED.has(here.kind))
    return { ok: false, problem: `${analysis.text.slice(here.origin.start, here.origin.end)} is the name of a port: ISO 1219 gives it` };
  return {
    ok: true,
    value: { start: here.origin.start, end: here.origin.end, name: analysis.text.slice(here.origin.start, here.origin.end) },
  };
}

export function renameAt(analysis: Analysis, offset: number, name: string): RenameAnswer<readonly TextChange[]> {
  const target = renameTarget(analysis, offset);
  if (!target.ok) return target;
  if (!NAME.test(name))
    return {
      ok: false,
      problem: `\`${name}\` is no name: a letter or _ first, then letters, digits, _ (or digits, capitals, digits: 1V1)`,
    };
  if (isNoName(name)) return { ok: false, problem: `\`${name}\` is a word of the notation and cannot be a name` };
  const places = sameAs(analysis, offset);
  const here = places[0];
  const taken = here && name !== target.value.name ? taker(analysis, here, name) : undefined;
  if (taken) return { ok: false, problem: `${name} is already the name of a ${taken.kind}` };
  const seen = new Set<string>();
  const changes: TextChange[] = [];
  for (const { origin } of places) {
    const key = `${origin.uri}:${origin.start}`;
    if (seen.has(key)) continue;
    seen.add(key);
    changes.push({ uri: origin.uri, start: origin.start, end: origin.end, text: name });
  }
  return { ok: true, value: changes };
}

/** Steps share a name space with the steps of their cycle, everything else with the circuit. */
function taker(analysis: Analysis, here: Occurrence, name: string): Occurrence | undefined {
  const scope = here.id.includes('.') ? here.id.slice(0, here.id.lastIndexOf('.') + 1) : '';
  const wanted = `${scope}${name}`;
  return analysis.occurrences.find(
    (one) => one.role === 'declaration' && one.id === wanted && one.symbol !== here.symbol && !FIXED.has(one.kind),
  );
}
