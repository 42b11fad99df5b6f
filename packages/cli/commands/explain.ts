/** `oilway explain`: the page of one rule, or the list of all codes. */
import { RULES } from '@oilway/rules';
import type { Rule } from '@oilway/rules';
import type { Paint } from '../text/colour.ts';
import { table } from '../text/table.ts';
import type { Exit, Output } from './outcome.ts';

/** The rule of a code, whatever its case. */
function ruleOf(code: string): Rule | undefined {
  return RULES.find((rule) => rule.code.toUpperCase() === code.toUpperCase());
}

export function explain(code: string | undefined, output: Output, paint: Paint): Exit {
  if (code === undefined) {
    const columns = [{ title: 'code' }, { title: 'severity' }, { title: 'what it finds' }];
    const rows = [...RULES].sort((a, b) => (a.code < b.code ? -1 : 1)).map((rule) => [rule.code, rule.severity, rule.title]);
    for (const line of table(columns, rows, paint.strong)) output.out(line);
    return 0;
  }
  const rule = ruleOf(code);
  if (rule === undefined) {
    const near = RULES.filter((one) => one.code.startsWith(code.slice(0, 1).toUpperCase())).map((one) => one.code);
    output.err(
      `oilway: there is no rule ${code}${near.length === 0 ? '' : ` (of that letter: ${near.join(', ')})`}; oilway explain lists all`,
    );
    return 2;
  }
  output.out(paint.strong(`${rule.code} ${rule.title}`));
  output.out(`${paint[rule.severity](rule.severity)}, ${rule.name}`);
  output.out('');
  output.out(`why:    ${rule.why}`);
  output.out(`ground: ${rule.ground}`);
  output.out(`mend:   ${rule.mend}`);
  output.out('');
  output.out(rule.page.trim());
  return 0;
}
