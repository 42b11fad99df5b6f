/** What a rule is, what it sees, and what it says. One rule is one file in `rules/`. */
import type { Circuit, Origin, Study, TextChange } from '@oilway/circuit';

export type Severity = 'error' | 'warning' | 'information';

export interface Related {
  readonly message: string;
  readonly origin: Origin;
}

/** A mechanical mend. Only `safe` fixes may join a "fix all". */
export interface Fix {
  readonly title: string;
  readonly safe: boolean;
  readonly changes: readonly TextChange[];
}

/** One finding: the same object in the editor, in the command and in exports. */
export interface Finding {
  /** Rule code `A01`, or a code of the language itself (`SYNTAX`, `NAME`, `UNIT` ...). */
  readonly code: string;
  readonly severity: Severity;
  /** What is wrong, in trade words, with component, port, state and figures (have / need). */
  readonly what: string;
  /** Why it matters, one sentence; with the published ground. */
  readonly why?: string;
  /** What would mend it. */
  readonly mend?: string;
  /** Published ground ("ISO 4413, protection against unintended pressures"). */
  readonly ground?: string;
  readonly origin: Origin;
  readonly related: readonly Related[];
  /** Component id or place it is about: half of the fingerprint (code + place + state). */
  readonly place: string;
  readonly state?: string;
  readonly fixes: readonly Fix[];
  /** Codes of findings at the same place that this one hides. */
  readonly hides?: readonly string[];
  /** Findings at other places that follow from this one and are hidden by it (A06 at a relief hides A01 at the pump). */
  readonly hidesAt?: readonly { readonly code: string; readonly place: string }[];
  /** True where it was decided from computed figures (it appears a moment after the others). */
  readonly computed: boolean;
  /** Set when an `allow` statement accepted it: the reason. Accepted findings are not shown as problems. */
  readonly accepted?: string;
}

export interface RuleContext {
  readonly circuit: Circuit;
  /** Absent while only the text is known: rules of topology then speak, computed rules wait. */
  readonly study?: Study;
  /** The document's text by URI, for fixes. */
  text(uri: string): string;
}

export interface Rule {
  readonly code: string;
  readonly name: string;
  readonly title: string;
  /** Severity as usually given; a finding may differ where the rule says so. */
  readonly severity: Severity;
  readonly why: string;
  readonly ground: string;
  readonly mend: string;
  /** `topology`: needs the circuit only. `computed`: needs the study. */
  readonly needs: 'topology' | 'computed';
  /** A rule of topology that says more once the study is there. */
  readonly figures?: true;
  /** Markdown: how it is decided, near misses that stay clean. Printed by `oilway explain` and on the rule's page. */
  readonly page: string;
  detect(context: RuleContext): Finding[];
}
