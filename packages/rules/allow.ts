/** `allow` statements: findings accepted with a reason, and permissions that accept nothing. */
import type { Allow } from '@oilway/circuit';
import type { Finding, RuleContext } from './rule.ts';
import { ruleOf } from './table.ts';

/** The state of a finding is that of the permission, or one of its kind (`STOP from Drill.Out` is a STOP). */
function sameState(allow: Allow, finding: Finding): boolean {
  const places = allow.where.places;
  if (places === undefined || places.length === 0) return true;
  const state = finding.state;
  return (
    state !== undefined &&
    places.some((p) => state === p || state.startsWith(`${p} `) || state.startsWith(`${p}.`) || state.endsWith(`.${p}`))
  );
}

function samePlace(allow: Allow, finding: Finding): boolean {
  if (allow.on === undefined) return true;
  const place = allow.port === undefined ? allow.on : `${allow.on}.${allow.port}`;
  return finding.place === place || finding.place.startsWith(`${place}.`) || (allow.port !== undefined && finding.place === allow.on);
}

function accepts(allow: Allow, finding: Finding): boolean {
  return allow.rule === finding.code && samePlace(allow, finding) && sameState(allow, finding);
}

/** Findings that an `allow` accepts bear its reason; permissions that accepted nothing become findings. */
export function accept(context: RuleContext, findings: readonly Finding[]): Finding[] {
  const used = new Set<Allow>();
  const marked = findings.map((finding) => {
    const allow = context.circuit.allows.find((a) => accepts(a, finding));
    if (allow === undefined) return finding;
    used.add(allow);
    return { ...finding, accepted: allow.reason };
  });
  const unused = context.circuit.allows.filter((a) => !used.has(a)).flatMap((a) => tellUnused(context, a) ?? []);
  return [...marked, ...unused];
}

function tellUnused(context: RuleContext, allow: Allow): Finding | undefined {
  const rule = ruleOf(allow.rule);
  // What figures decide is not known to be unused before they are there.
  const figures = rule !== undefined && (rule.needs === 'computed' || rule.figures === true);
  if (figures && context.study === undefined) return undefined;
  const on = allow.on === undefined ? '' : ` on ${allow.port === undefined ? allow.on : `${allow.on}.${allow.port}`}`;
  const { uri, start, end } = allow.origin;
  const base = { code: 'ALLOW-UNUSED', origin: allow.origin, related: [], place: `${allow.rule}${on}`, computed: figures };
  if (rule === undefined) {
    return {
      ...base,
      severity: 'information',
      what: `No rule ${allow.rule} is checked here, so this permission accepts nothing.`,
      fixes: [],
    };
  }
  return {
    ...base,
    severity: 'warning',
    what: `${allow.rule}${on} is not found: this permission accepts nothing.`,
    why: 'A permission that is left standing would hide the finding if it came back for another reason.',
    mend: 'Take the statement out.',
    fixes: [{ title: 'Take the permission out', safe: true, changes: [{ uri, start, end, text: '' }] }],
  };
}
