/** What computes and checks: the study and the rules, as server and study worker use them. What breaks inside is told apart from what is found. */
import { study, type Circuit, type Study } from '@oilway/circuit';
import { runRules, type Finding, type RuleContext } from '@oilway/rules';

export interface Checked {
  readonly findings: readonly Finding[];
  /** Rules that broke down, for the log. */
  readonly failed?: string;
}

export function checkCircuit(context: RuleContext): Checked {
  const { findings, failed } = runRules(context);
  return { findings, ...(failed ? { failed: failed.map((one) => `rule ${one.code}: ${one.why}`).join('\n') } : {}) };
}

export const computeStudy = (circuit: Circuit): Study => study(circuit, { clock: () => performance.now() });
