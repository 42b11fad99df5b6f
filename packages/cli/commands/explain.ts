/** `oilway explain`: the page of one rule, or the list of all codes. */
import { RULES, codePages, ruleOf } from '@oilway/rules';
import type { Paint } from '../text/colour.ts';
import { table } from '../text/table.ts';
import type { Exit, Output } from './outcome.ts';

export function explain(code: string | undefined, output: Output, paint: Paint): Exit {
  if (code === undefined) {
    const columns = [{ title: 'code' }, { title: 'severity' }, { title: 'what it finds' }];
    const rows = [...RULES].sort((a, b) => (a.code < b.code ? -1 : 1)).map((rule) => [rule.code, rule.severity, rule.title]);
    for (const line of table(columns, rows, paint.strong)) output.out(line);
    return 0;
  }
  const page = codePages[ruleOf(code.toUpperCase())?.code ?? ''];
  if (page === undefined) {
    const near = RULES.filter((one) => one.code.startsWith(code.slice(0, 1).toUpperCase())).map((one) => one.code);
    output.err(
      `oilway: there is no rule ${code}${near.length === 0 ? '' : ` (of that letter: ${near.join(', ')})`}; oilway explain lists all`,
    );
    return 2;
  }
  const [title = '', ...rest] = page.trim().split('\n');
  output.out(paint.strong(title.replace(/^# /, '')));
  for (const line of rest) output.out(line);
  return 0;
}
