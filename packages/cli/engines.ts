/** What computes and what checks, handed to the language service. */
import type { Engines } from '@oilway/language';
import { runRules } from '@oilway/rules';
import { study } from '@oilway/circuit';

/** Longest computation of one circuit unless told otherwise, s. */
export const USUAL_LIMIT = 120;

/**
 * The engines, and where failures are noted: of single rules (a fault of the program: their findings are missing), and a circuit that is not computed
 * within `limit` seconds.
 */
export function engines(failures: string[], limit = USUAL_LIMIT, now: () => number = Date.now): Engines {
  return {
    study: (circuit) => {
      const end = now() + limit * 1000;
      let cut = false;
      const answer = study(circuit, {
        cancelled: () => {
          cut ||= now() > end;
          return cut;
        },
      });
      if (cut)
        failures.push(
          `${circuit.name ?? 'circuit'} is not computed within ${limit} s: figures and findings are missing (--limit gives it longer)`,
        );
      return answer;
    },
    rules: (context) => {
      const { findings, failed = [] } = runRules(context);
      for (const one of failed) failures.push(`internal error, please report it: rule ${one.code}: ${one.why}`);
      return findings;
    },
  };
}
