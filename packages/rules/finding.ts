/** Makes findings: what a rule tells of one place, with what is common to the rule filled in. */
import type { Origin } from '@oilway/circuit';
import type { Finding, Fix, Related, Rule, Severity } from './rule.ts';

/** What a rule says of one place. */
export interface Told {
  readonly what: string;
  readonly origin: Origin;
  readonly place: string;
  readonly severity?: Severity;
  readonly state?: string;
  readonly why?: string;
  readonly mend?: string;
  readonly related?: readonly Related[];
  readonly fixes?: readonly (Fix | undefined)[];
  readonly hides?: readonly string[];
  readonly hidesAt?: readonly { readonly code: string; readonly place: string }[];
  /** Decided from computed figures; default: as the rule says. */
  readonly computed?: boolean;
}

export type About = Omit<Rule, 'detect'>;

export function tell(rule: About, told: Told): Finding {
  return {
    code: rule.code,
    severity: told.severity ?? rule.severity,
    what: told.what,
    why: `${(told.why ?? rule.why).replace(/\.$/, '')} (${rule.ground}).`,
    mend: told.mend ?? rule.mend,
    ground: rule.ground,
    origin: told.origin,
    related: told.related ?? [],
    place: told.place,
    ...(told.state === undefined ? {} : { state: told.state }),
    fixes: (told.fixes ?? []).filter((fix) => fix !== undefined),
    ...(told.hides === undefined ? {} : { hides: told.hides }),
    ...(told.hidesAt === undefined ? {} : { hidesAt: told.hidesAt }),
    computed: told.computed ?? rule.needs === 'computed',
  };
}

/** Rule, place and state: what stays the same when lines move. */
export function fingerprintOf(finding: Finding): string {
  return [finding.code, finding.place, ...(finding.state === undefined ? [] : [finding.state])].join('|');
}
