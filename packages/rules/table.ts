/** The table of rules: a new rule is one file and one line here. */
import type { Rule } from './rule.ts';
import { A01 } from './rules/A01-pump-no-relief.ts';
import { A02 } from './rules/A02-relief-behind-valve.ts';
import { A03 } from './rules/A03-relief-above-rating.ts';
import { A04 } from './rules/A04-relief-below-need.ts';
import { A06 } from './rules/A06-relief-no-tank.ts';
import { A07 } from './rules/A07-comp-no-safety-relief.ts';
import { A09 } from './rules/A09-deadhead-idle.ts';
import { A10 } from './rules/A10-no-outlet-check.ts';
import { A19 } from './rules/A19-pump-parallel-no-check.ts';
import { B01 } from './rules/B01-hl-no-check.ts';
import { B02 } from './rules/B02-hl-pilot-wrong-side.ts';
import { B03 } from './rules/B03-hl-unload-not-lowest.ts';
import { B04 } from './rules/B04-hl-motor-sizing.ts';
import { B06 } from './rules/B06-hl-check-orientation.ts';
import { C01 } from './rules/C01-acc-no-isolation.ts';
import { C02 } from './rules/C02-acc-no-bleed.ts';
import { D01 } from './rules/D01-overrun-no-holding.ts';
import { E01 } from './rules/E01-meterout-intensify.ts';
import { E03 } from './rules/E03-meterin-overrun.ts';
import { F05 } from './rules/F05-drain-external-required.ts';
import { F07 } from './rules/F07-sequence-order.ts';
import { F17 } from './rules/F17-both-solenoids.ts';
import { H14 } from './rules/H14-open-port.ts';
import { L04 } from './rules/L04-step-no-exit.ts';
import { L07 } from './rules/L07-pressure-switch-order.ts';
import { M01 } from './rules/M01-dup-id.ts';
import { M07 } from './rules/M07-units.ts';
import { M08 } from './rules/M08-setting-missing.ts';

export const RULES: readonly Rule[] = [
  A01,
  A02,
  A03,
  A04,
  A06,
  A07,
  A09,
  A10,
  A19,
  B01,
  B02,
  B03,
  B04,
  B06,
  C01,
  C02,
  D01,
  E01,
  E03,
  F05,
  F07,
  F17,
  H14,
  L04,
  L07,
  M01,
  M07,
  M08,
];

const BY_CODE = new Map(RULES.map((rule) => [rule.code, rule]));

export function ruleOf(code: string): Rule | undefined {
  return BY_CODE.get(code);
}

/** Code -> page: what the rule says of itself, as Markdown. */
export const codePages: Readonly<Record<string, string>> = Object.fromEntries(RULES.map((rule) => [rule.code, pageOf(rule)]));

function pageOf(rule: Rule): string {
  const text = 'from the text, as one types';
  const when =
    rule.needs === 'computed'
      ? 'from the computed states and steps'
      : rule.figures === true
        ? `${text}, and from the figures once they are there`
        : text;
  return `# ${rule.code} ${rule.title}

${rule.why}

- Usually: ${rule.severity}
- Mend: ${rule.mend}
- Published ground: ${rule.ground}
- Decided ${when}

## How it is decided

${rule.page.trim()}
`;
}
