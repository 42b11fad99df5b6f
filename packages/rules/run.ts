/** Runs all rules over a circuit: hides what follows from another finding, marks what is accepted, puts them in order. */
import { accept } from './allow.ts';
import { knownFigures } from './known.ts';
import { outcome } from './outcome.ts';
import type { Finding, Rule, RuleContext } from './rule.ts';
import { RULES } from './table.ts';

export interface RulesResult {
  /** Findings of the text first, then those of the figures; each group in text order. Accepted ones bear their reason. */
  readonly findings: readonly Finding[];
  /** Rules that failed (a fault of the program, never of the circuit): their findings are missing, and that is to be said. */
  readonly failed?: readonly { readonly code: string; readonly why: string }[];
}

export function runRules(given: RuleContext, rules: readonly Rule[] = RULES): RulesResult {
  const context = given.study === undefined ? given : { ...given, study: knownFigures(given.study) };
  const found: Finding[] = [];
  const failed: { code: string; why: string }[] = [];
  for (const rule of rules) {
    if (rule.needs === 'computed' && context.study === undefined) continue;
    try {
      found.push(...rule.detect(context));
    } catch (error) {
      failed.push({ code: rule.code, why: error instanceof Error ? error.message : String(error) });
    }
  }
  const findings = order(accept(context, [...hide(found), ...outcome(context, found)]));
  return failed.length === 0 ? { findings } : { findings, failed };
}

/** Same cause, one finding: the ones that follow are taken out and named in the one that stays. */
function hide(found: readonly Finding[]): Finding[] {
  const covers = (one: Finding, other: Finding): boolean =>
    one !== other &&
    ((one.place === other.place && one.hides?.includes(other.code) === true) ||
      one.hidesAt?.some((h) => h.code === other.code && h.place === other.place) === true);
  const hidden = new Map<Finding, Finding[]>();
  for (const other of found) {
    const by = found.filter((one) => covers(one, other));
    for (const one of by) hidden.set(one, [...(hidden.get(one) ?? []), other]);
  }
  const gone = new Set([...hidden.values()].flat());
  return found.flatMap((finding) => {
    if (gone.has(finding)) return [];
    const { hides: _hides, hidesAt: _at, ...rest } = finding;
    const covered = hidden.get(finding) ?? [];
    if (covered.length === 0) return [rest];
    const related = [...rest.related, ...covered.map((c) => ({ message: `follows from this: ${c.code} ${c.what}`, origin: c.origin }))];
    return [{ ...rest, related, hides: [...new Set(covered.map((c) => c.code))].sort() }];
  });
}

function order(findings: readonly Finding[]): Finding[] {
  return [...findings].sort(
    (a, b) =>
      Number(a.computed) - Number(b.computed) ||
      (a.origin.uri < b.origin.uri ? -1 : a.origin.uri > b.origin.uri ? 1 : 0) ||
      a.origin.start - b.origin.start ||
      (a.code < b.code ? -1 : a.code > b.code ? 1 : 0) ||
      (a.place < b.place ? -1 : a.place > b.place ? 1 : 0),
  );
}
