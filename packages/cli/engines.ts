/** What computes and what checks, handed to the language service. */
import type { Engines } from '@oilway/language';
import { runRules } from '@oilway/rules';
import { study } from '@oilway/circuit';

/** The engines, and where failures of single rules are noted (a fault of the program: their findings are missing). */
export function engines(failures: string[]): Engines {
  return {
    study,
    rules: (context) => {
      const { findings, failed = [] } = runRules(context);
      for (const one of failed) failures.push(`rule ${one.code}: ${one.why}`);
      return findings;
    },
  };
}
