/** Findings of the language itself: what is wrong at its characters. */
import type { Origin } from '@oilway/circuit';
import type { Finding, Fix, Related, Severity } from '@oilway/rules';

export interface FindingParts {
  /** `SYNTAX`, `NAME`, `PORT`, `VALUE`, `CHAIN`, `M07` units, `M08` settings missing, `NOT-COMPUTED`. */
  readonly code: string;
  readonly severity?: Severity | undefined;
  readonly what: string;
  readonly why?: string | undefined;
  readonly mend?: string | undefined;
  readonly origin: Origin;
  readonly related?: readonly Related[] | undefined;
  readonly place?: string | undefined;
  readonly fixes?: readonly Fix[] | undefined;
}

export function finding(parts: FindingParts): Finding {
  const { code, severity = 'error', what, why, mend, origin, related = [], place = '', fixes = [] } = parts;
  return {
    code,
    severity,
    what,
    ...(why === undefined ? {} : { why }),
    ...(mend === undefined ? {} : { mend }),
    origin,
    related,
    place,
    fixes,
    computed: false,
  };
}
